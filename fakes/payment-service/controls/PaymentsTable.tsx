// Every payment with its sum, its fee and how it stands.
import { formatMoment, formatSum } from '../pages/words.ts';
import type { Payment, readTruth } from './truth.ts';

type Props = { payments: readonly Payment[]; totals: ReturnType<typeof readTruth>['totals'] };

const money = (amount: number | null, currency: string | null): string =>
  amount === null ? 'not yet' : formatSum(amount, currency ?? 'gbp');

function PaymentRow({ payment }: { payment: Payment }) {
  return (
    <tr>
      <td>{formatMoment(new Date(payment.created * 1000))}</td>
      <td className="money">{money(payment.amount, payment.currency)}</td>
      <td>{(payment.status ?? `session ${payment.session_status}`).replaceAll('_', ' ')}</td>
      <td className="money">{money(payment.fee, payment.currency)}</td>
      <td className="money">{money(payment.net, payment.currency)}</td>
      <td>{payment.client_reference_id}</td>
      <td>{payment.url ? <a href={payment.url}>card page</a> : (payment.charge ?? '')}</td>
    </tr>
  );
}

export function PaymentsTable({ payments, totals }: Props) {
  return (
    <div className="sheet scroll" tabIndex={0} role="region" aria-label="Payments, newest first">
      <table>
        <caption>Payments, newest first</caption>
        <thead>
          <tr>
            <th scope="col">Begun</th>
            <th scope="col" className="money">
              Sum
            </th>
            <th scope="col">State</th>
            <th scope="col" className="money">
              Fee
            </th>
            <th scope="col" className="money">
              Net
            </th>
            <th scope="col">Reference</th>
            <th scope="col">Where</th>
          </tr>
        </thead>
        <tbody>
          {payments.map((payment) => (
            <PaymentRow key={payment.session} payment={payment} />
          ))}
        </tbody>
      </table>
      <p className="ash">
        {totals.paid} paid in all: {formatSum(totals.amount, 'gbp')}, of which fees so far{' '}
        {formatSum(totals.fee, 'gbp')}.
      </p>
    </div>
  );
}
