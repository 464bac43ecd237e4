// What really happened, told without the API: every payment with its sum, its fee and whose it was.
import { presentSession } from '../payments/present.ts';
import type { Service } from '../service.ts';
import type { SessionRow } from '../state/rows.ts';
import { findNamed } from '../state/store.ts';

function toPayment(service: Service, { session }: SessionRow) {
  const { store } = service;
  const intent = findNamed(store.intents, session.payment_intent);
  const charge = findNamed(store.charges, intent?.latest_charge);
  const transaction = findNamed(store.transactions, charge?.balance_transaction);
  return {
    session: session.id,
    session_status: session.status,
    payment_status: session.payment_status,
    payment_intent: intent?.id ?? null,
    status: intent?.status ?? null,
    charge: charge?.id ?? null,
    balance_transaction: transaction?.id ?? null,
    client_reference_id: session.client_reference_id,
    metadata: session.metadata,
    amount: session.amount_total ?? 0,
    currency: session.currency,
    fee: transaction?.fee ?? null,
    net: transaction?.net ?? null,
    last4: charge?.payment_method_details?.card?.last4 ?? null,
    created: session.created,
    paid_at: intent?.status === 'succeeded' ? (charge?.created ?? null) : null,
    url: presentSession(service, session).url,
  };
}
export type Payment = ReturnType<typeof toPayment>;

const sum = (numbers: readonly (number | null)[]): number =>
  numbers.reduce<number>((total, one) => total + (one ?? 0), 0);

export function readTruth(service: Service) {
  const payments = service.store.sessions.list().map((row) => toPayment(service, row));
  const paid = payments.filter((payment) => payment.status === 'succeeded');
  return {
    payments,
    totals: {
      paid: paid.length,
      amount: sum(paid.map((payment) => payment.amount)),
      fee: sum(paid.map((payment) => payment.fee)),
      net: sum(paid.map((payment) => payment.net)),
    },
  };
}
