// The gift in the double-entry books: each entry with its lines, both sides summed.
import { formatDay } from '#shared/dates.ts';
import type { GiftEntry } from '#shared/giving/desk-schemas.ts';
import { add, formatLedger, most, negate, NOTHING, type Pence } from '#shared/money.ts';
import { HeadRow } from '#src/ui/HeadRow.tsx';

const ENTRY_NAMES: Record<string, string> = { received: 'Gift received', 'card-fee': 'Card fee' };
const HEADS = [
  { label: 'Account' },
  { label: 'Fund' },
  { label: 'Debit £', className: 'num' },
  { label: 'Credit £', className: 'num' },
];
const debitOf = (sum: Pence): string => (sum > 0 ? formatLedger(sum) : '');
const creditOf = (sum: Pence): string => (sum < 0 ? formatLedger(negate(sum)) : '');

function Entry({ entry }: { entry: GiftEntry }) {
  return (
    <tbody role="rowgroup">
      <tr role="row" className="dayrule2">
        <th role="rowheader" scope="rowgroup" colSpan={4}>
          {ENTRY_NAMES[entry.kind] ?? entry.kind}, {formatDay(entry.day)}
        </th>
      </tr>
      {entry.lines.map((line) => (
        <tr role="row" key={`${line.account}-${line.fund}-${line.amountPence}`}>
          <th role="rowheader" scope="row">
            {line.account}
          </th>
          <td role="cell" className="fund">
            {line.fund}
          </td>
          <td role="cell" className="num" data-l="debit £">
            {debitOf(line.amountPence)}
          </td>
          <td role="cell" className="num" data-l="credit £">
            {creditOf(line.amountPence)}
          </td>
        </tr>
      ))}
    </tbody>
  );
}

export function GiftBooks({ entries }: { entries: readonly GiftEntry[] }) {
  const lines = entries.flatMap((entry) => entry.lines);
  const debitPence = add(...lines.map((line) => most(line.amountPence, NOTHING)));
  return (
    <table role="table" className="ruled books">
      <caption className="vh">Entries of this gift</caption>
      <HeadRow heads={HEADS} />
      {entries.map((entry) => (
        <Entry key={entry.id} entry={entry} />
      ))}
      <tfoot role="rowgroup">
        <tr role="row">
          <th role="rowheader" scope="row" colSpan={2}>
            Both sides
          </th>
          <td role="cell" className="num" data-l="debit £">
            {formatLedger(debitPence)}
          </td>
          <td role="cell" className="num" data-l="credit £">
            {formatLedger(debitPence)}
          </td>
        </tr>
      </tfoot>
    </table>
  );
}
