// How it ended, told truly: paid, still being confirmed, or not paid.
import { useQuery } from '@tanstack/react-query';
import { useEffect } from 'react';
import { Link, useLoaderData } from 'react-router-dom';
import type { GiveOutcome } from '#shared/giving/give-schemas.ts';
import { useApi } from '#src/lib/use-api.ts';
import { giveOutcomeQuery } from './give-queries.ts';
import { OUTCOME_TITLES, type DonePageData } from './give-loaders.ts';
import { PaidSheet } from './PaidSheet.tsx';
import { StillConfirming } from './StillConfirming.tsx';
import { NotPaid } from './NotPaid.tsx';

const SOON_MS = 3_000;
const LATER_MS = 15_000;
const SOON_LOOKS = 20;

/** Looks again by itself while the card service has not said; a lost connection leaves what is known standing. */
function useOutcome({ intentId, outcome }: DonePageData): GiveOutcome {
  const { data } = useQuery({
    ...giveOutcomeQuery(useApi(), intentId),
    initialData: outcome,
    refetchInterval: ({ state }) => {
      if (state.data?.outcome !== 'confirming') return false;
      return state.dataUpdateCount < SOON_LOOKS ? SOON_MS : LATER_MS;
    },
  });
  return data;
}

const PAGES = { paid: PaidSheet, confirming: StillConfirming, 'not-paid': NotPaid } as const;

export function DonePage() {
  const loaded = useLoaderData<DonePageData>();
  const outcome = useOutcome(loaded);
  const title = OUTCOME_TITLES[outcome.outcome];
  const loadedTitle = loaded.title;
  useEffect(() => {
    if (title !== loadedTitle) document.title = document.title.replace(loadedTitle, title);
  }, [title, loadedTitle]);
  const Page = PAGES[outcome.outcome];
  return (
    <main id="main" className="page done">
      {/* The one place that changes by itself: a change is read out without moving the focus. */}
      <div role="status">
        <h1>{title}</h1>
        <Page outcome={outcome} intentId={loaded.intentId} />
      </div>
      <p className="ways sans">
        <Link to="/">See the figure as it stands</Link>
      </p>
    </main>
  );
}
