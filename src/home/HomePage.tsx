// The broadside: the figure beside her staff, what is given, how to give, every part, and when things happen.
import { useQuery } from '@tanstack/react-query';
import { useMatch } from 'react-router-dom';
import { useApi } from '#src/lib/use-api.ts';
import { campaignQuery } from './campaign-queries.ts';
import { FigureColumn } from './FigureColumn.tsx';
import { GiveStrip } from './GiveStrip.tsx';
import { PartsLedger } from './PartsLedger.tsx';
import { standsToday } from './reach-words.ts';
import { Stages } from './Stages.tsx';
import { SumSentence } from './SumSentence.tsx';

export function HomePage() {
  const { data: campaign } = useQuery(campaignQuery(useApi()));
  const openSlug = useMatch('/parts/:slug')?.params.slug ?? null;
  if (!campaign) return null;
  return (
    <main id="main" className="home">
      <FigureColumn campaign={campaign} openSlug={openSlug} />
      <div className="column">
        <h1>{campaign.name}</h1>
        <p className="lead">{campaign.lead}</p>
        <SumSentence campaign={campaign} />
        <GiveStrip campaign={campaign} />
        <section id="today">
          <h2>{standsToday(campaign.pronoun)}</h2>
          <p className="describe">{campaign.description.join(' ')}</p>
        </section>
        <section id="parts">
          <h2>Every part and what it needs</h2>
          <PartsLedger campaign={campaign} />
        </section>
        <section id="stages">
          <h2>When things happen</h2>
          <Stages stages={campaign.stages} />
        </section>
      </div>
    </main>
  );
}
