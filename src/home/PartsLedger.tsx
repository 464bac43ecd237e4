// Every part and what it needs, from the top down; the lamp line crosses the table where it crosses the figure.
import { Link } from 'react-router-dom';
import type { Campaign, Part } from '#shared/campaign/campaign-schemas.ts';
import { add, formatPence, NOTHING } from '#shared/money.ts';
import { Ledger, type LedgerHead } from '#src/ui/Ledger.tsx';
import { Stamp } from '#src/ui/Stamp.tsx';
import { Swatch } from '#src/ui/Swatch.tsx';
import { formatMetres, heightRange, inSentence, isOpen } from './part-words.ts';
import { orderForLedger, placeOf, stateWord, STATE_TONES } from './part-place.ts';

const HEADS: readonly LedgerHead[] = [
  { key: 'part', label: 'Part' },
  { key: 'height', label: 'Height', isNumber: true },
  { key: 'cost', label: 'Cost', isNumber: true },
  { key: 'need', label: 'Still needed', isNumber: true },
  { key: 'state', label: 'State', className: 'state-head' },
];

function PartRow({
  part,
  height,
  className,
}: {
  part: Part;
  height: string;
  className?: string | undefined;
}) {
  return (
    <tr id={`row-${part.slug}`} className={className}>
      <th scope="row">
        <Link className="part-name" to={`/parts/${part.slug}`} preventScrollReset>
          {part.name}
        </Link>
        {isOpen(part) && (
          <Link className="give-to" to={`/give?towards=${part.slug}`}>
            give to it<span className="visually-hidden">: {inSentence(part.name)}</span>
          </Link>
        )}
        {part.inKind.map(({ firm, amountPence }) => (
          <span key={firm} className="in-kind">
            {formatPence(amountPence)} met by {firm} in kind
          </span>
        ))}
      </th>
      <td className="h n">{height}</td>
      <td className="n cost" data-l="Costs">
        {formatPence(part.costPence)}
      </td>
      <td className="n need" data-l="Needs">
        {isOpen(part) ? formatPence(part.stillNeededPence) : 'nothing'}
      </td>
      <td className="state">
        <Stamp tone={STATE_TONES[part.state]} mark={<Swatch kind={part.state} />}>
          {stateWord(part)}
        </Stamp>
      </td>
    </tr>
  );
}

function ReachRow({
  campaign,
  isAllPaid,
  isNonePaid,
}: {
  campaign: Campaign;
  isAllPaid: boolean;
  isNonePaid: boolean;
}) {
  const words = isAllPaid
    ? 'Every part below is paid for.'
    : isNonePaid
      ? 'The line starts here, on the ground.'
      : `${formatPence(campaign.givenPence)} builds everything below this line.`;
  return (
    <tr className="reach">
      <td colSpan={HEADS.length}>The reach today. {words}</td>
    </tr>
  );
}

function FigureRows({ campaign }: { campaign: Campaign }) {
  const { above, below } = orderForLedger(campaign.parts, campaign.reach.part);
  const row = (part: Part, className?: string) => (
    <PartRow key={part.slug} part={part} height={heightRange(part) ?? ''} className={className} />
  );
  return (
    <tbody>
      {above.map((part, index) => row(part, index === above.length - 1 ? 'above' : undefined))}
      <ReachRow campaign={campaign} isAllPaid={above.length === 0} isNonePaid={below.length === 0} />
      {below.map((part) => row(part))}
    </tbody>
  );
}

function CostRows({ campaign }: { campaign: Campaign }) {
  const { costs } = orderForLedger(campaign.parts, campaign.reach.part);
  if (costs.length === 0) return null;
  return (
    <tbody className="costs">
      <tr className="apart">
        <th colSpan={HEADS.length} scope="rowgroup">
          What adds no height, and when it falls due
        </th>
      </tr>
      {costs.map((cost) => (
        <PartRow key={cost.slug} part={cost} height={placeOf(campaign.parts, cost)} />
      ))}
    </tbody>
  );
}

export function PartsLedger({ campaign }: { campaign: Campaign }) {
  const { parts, heightMm, goalPence } = campaign;
  const stillPence = add(NOTHING, ...parts.map((part) => part.stillNeededPence));
  return (
    <Ledger
      folds
      heads={HEADS}
      caption="From the top down, as she stands. Gifts to the whole figure fill the parts from the ground up."
    >
      <FigureRows campaign={campaign} />
      <CostRows campaign={campaign} />
      <tfoot>
        <tr>
          <th scope="row">The whole figure</th>
          <td className="h n">{formatMetres(heightMm)} m</td>
          <td className="n cost" data-l="Costs">
            {formatPence(goalPence)}
          </td>
          <td className="n need" data-l="Needs">
            {stillPence > 0 ? formatPence(stillPence) : 'nothing'}
          </td>
          <td className="state" />
        </tr>
      </tfoot>
    </Ledger>
  );
}
