// A sum of money as it stands in a sentence: £1,234.50, or £1,234 when the pence are none.
import { formatPence, type Pence } from '#shared/money.ts';

export function MoneyText({ pence }: { pence: Pence }) {
  return <span className="tnum nowrap">{formatPence(pence)}</span>;
}
