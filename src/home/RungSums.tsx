// The money edge of the staff: what it costs to build to each height, and the lamp tag of what is given.
import type { Campaign } from '#shared/campaign/campaign-schemas.ts';
import { formatPence, type Pence } from '#shared/money.ts';
import { heightClass } from './height-class.ts';
import { formatMetres } from './part-words.ts';
import { labelRungs, type RungLabel } from './rung-labels.ts';

const CROWDED = { never: '', narrow: 'minor', always: 'crowded' } as const;

const labelClass = ({ crowded, isTop, topMm }: RungLabel): string =>
  ['at', heightClass(topMm), CROWDED[crowded], isTop ? 'top' : ''].filter(Boolean).join(' ');

export function RungSums({ reach, givenPence }: { reach: Campaign['reach']; givenPence: Pence }) {
  return (
    <ol className="rungs" aria-label="What each height costs, from the ground">
      {labelRungs(reach.rungs, reach.heightMm).map((rung) => (
        <li key={rung.slug} className={labelClass(rung)}>
          <span className="visually-hidden">
            {rung.name}, {formatMetres(rung.topMm)} m:{' '}
          </span>
          {formatPence(rung.sumPence)}
        </li>
      ))}
      <li className={`at now ${heightClass(reach.heightMm)}`}>
        <span className="visually-hidden">Given today, {formatMetres(reach.heightMm)} m: </span>
        {formatPence(givenPence)}
      </li>
    </ol>
  );
}
