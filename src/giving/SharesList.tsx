// What a gift builds: one part, or both halves of a gift that was split.
import type { GiveOutcome } from '#shared/giving/give-schemas.ts';
import { formatPence } from '#shared/money.ts';

type Props = Pick<GiveOutcome, 'shares' | 'splitNote'>;

export function SharesList({ shares, splitNote }: Props) {
  const only = shares.length === 1 ? shares[0] : undefined;
  if (only)
    return (
      <>
        {only.name}
        {splitNote ? <p className="told">{splitNote}</p> : null}
      </>
    );
  return (
    <>
      <ul className="shares">
        {shares.map(({ name, amountPence, isMeant }) => (
          <li key={name}>
            {formatPence(amountPence)}: {name}
            {isMeant ? ', as you asked' : ''}
          </li>
        ))}
      </ul>
      {splitNote ? <p className="told">{splitNote}</p> : null}
    </>
  );
}
