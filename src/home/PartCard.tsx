// One part of the figure on a card: what it costs, what is still needed, who makes it, and how to give to it.
import type { Ref } from 'react';
import { Link } from 'react-router-dom';
import type { Campaign, Part } from '#shared/campaign/campaign-schemas.ts';
import { MoneyText } from '#src/ui/MoneyText.tsx';
import { Stamp } from '#src/ui/Stamp.tsx';
import { Swatch } from '#src/ui/Swatch.tsx';
import { heightClass } from './height-class.ts';
import { heightRange, isOpen, middleMm } from './part-words.ts';
import { placeOf, stateWord, STATE_TONES } from './part-place.ts';

function Facts({ campaign, part }: { campaign: Campaign; part: Part }) {
  return (
    <dl className="facts">
      <div>
        <dt>Cost</dt>
        <dd>
          <MoneyText pence={part.costPence} />
        </dd>
      </div>
      {part.inKind.map(({ firm, amountPence }) => (
        <div key={firm}>
          <dt>Met in kind by {firm}</dt>
          <dd>
            <MoneyText pence={amountPence} />
          </dd>
        </div>
      ))}
      <div>
        <dt>Still needed</dt>
        <dd>{isOpen(part) ? <MoneyText pence={part.stillNeededPence} /> : 'nothing'}</dd>
      </div>
      <div>
        <dt>{part.topMm === null ? 'Place' : 'Height'}</dt>
        <dd>{heightRange(part) ?? placeOf(campaign.parts, part)}</dd>
      </div>
      {part.maker !== null && (
        <div>
          <dt>Made by</dt>
          <dd>{part.maker}</dd>
        </div>
      )}
    </dl>
  );
}

type Props = { campaign: Campaign; part: Part; headingRef: Ref<HTMLHeadingElement> };

export function PartCard({ campaign, part, headingRef }: Props) {
  return (
    <aside className={`at part-card ${heightClass(middleMm(part))}`} aria-labelledby="part-card-name">
      <h2 id="part-card-name" ref={headingRef} tabIndex={-1}>
        {part.name}
      </h2>
      <Stamp tone={STATE_TONES[part.state]} mark={<Swatch kind={part.state} />}>
        {stateWord(part)}
      </Stamp>
      <Facts campaign={campaign} part={part} />
      <p className="card-ways">
        {isOpen(part) && (
          <Link className="button" to={`/give?towards=${part.slug}`}>
            Give to it
          </Link>
        )}
        <Link className="close" to="/" preventScrollReset>
          Close<span className="visually-hidden"> {part.name}</span>
        </Link>
      </p>
    </aside>
  );
}
