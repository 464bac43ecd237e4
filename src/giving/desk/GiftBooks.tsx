// The gift in the double-entry books: each entry with its lines, and what the card service calls the payment.
import { formatDay } from '#shared/dates.ts';
import type { GiftChain, GiftEntry } from '#shared/giving/desk-schemas.ts';
import { add, formatLedger, negate, NOTHING, type Pence } from '#shared/money.ts';

type Props = { entries: GiftChain['entries']; payment: GiftChain['payment'] };

const ENTRY_NAMES: Record<string, string> = { received: 'Gift received', 'card-fee': 'Card fee' };
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

function CardFacts({ payment }: { payment: GiftChain['payment'] }) {
  const facts = [
    ['Card page', payment.sessionId],
    ['Payment', payment.paymentIntentId],
    ['Charge', payment.chargeId],
    ['Balance line', payment.balanceTransactionId],
  ] as const;
  return (
    <dl className="ids">
      {facts.map(([name, id]) => (
        <div key={name}>
          <dt>{name}</dt>
          <dd>{id ?? 'not told yet'}</dd>
        </div>
      ))}
    </dl>
  );
}

export function GiftBooks({ entries, payment }: Props) {
  const debits = add(
    ...entries
      .flatMap((entry) => entry.lines)
      .map((line) => (line.amountPence > 0 ? line.amountPence : NOTHING)),
  );
  return (
    <section className="sec" aria-labelledby="books">
      <h2 id="books">In the books</h2>
      <table role="table" className="ruled books">
        <caption className="vh">Entries of this gift</caption>
        <thead role="rowgroup">
          <tr role="row">
            <th role="columnheader" scope="col">
              Account
            </th>
            <th role="columnheader" scope="col">
              Fund
            </th>
            <th role="columnheader" scope="col" className="num">
              Debit £
            </th>
            <th role="columnheader" scope="col" className="num">
              Credit £
            </th>
          </tr>
        </thead>
        {entries.map((entry) => (
          <Entry key={entry.id} entry={entry} />
        ))}
        <tfoot role="rowgroup">
          <tr role="row">
            <th role="rowheader" scope="row" colSpan={2}>
              Both sides
            </th>
            <td role="cell" className="num" data-l="debit £">
              {formatLedger(debits)}
            </td>
            <td role="cell" className="num" data-l="credit £">
              {formatLedger(debits)}
            </td>
          </tr>
        </tfoot>
      </table>
      {payment.feePence === null && (
        <p className="ash small pad">The card fee is not told yet; it comes after the payment.</p>
      )}
      <CardFacts payment={payment} />
    </section>
  );
}
