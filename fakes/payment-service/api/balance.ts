// /v1/balance and /v1/balance_transactions: what has come in, what the service kept of it, and when it can be paid out.
import type Stripe from 'stripe';
import { z } from 'zod';
import { isAvailable, presentTransaction } from '../payments/present.ts';
import type { Service } from '../service.ts';
import { missing, unknownReference } from './api-errors.ts';
import type { Call } from './endpoint.ts';
import { created, isWithin, readParams, text } from './form-encoding.ts';
import { pageFields, toPage } from './lists.ts';

const nothing = z.strictObject({});
const listSchema = z.strictObject({
  ...pageFields,
  created: created.optional(),
  currency: text(3).optional(),
  payout: text().optional(),
  source: text().optional(),
  type: text().optional(),
});

export function getTransaction(service: Service, call: Call) {
  readParams(nothing, call.params);
  const transaction = presentTransaction(service, call.id);
  if (!transaction) throw missing('balance_transaction', call.id);
  return transaction;
}

export function listTransactions(service: Service, call: Call) {
  const { created: window, currency, payout, source, type, ...page } = readParams(listSchema, call.params);
  // No payout has been made yet, so none can be named.
  if (payout) throw unknownReference('payout', payout, 'payout');
  const transactions = service.store.transactions
    .list()
    .filter((one) => isWithin(one.created, window))
    .filter((one) => !currency || one.currency === currency)
    .filter((one) => !source || one.source === source)
    .filter((one) => !type || one.type === type)
    .map((one) => presentTransaction(service, one.id) ?? one);
  return toPage(transactions, page, '/v1/balance_transactions');
}

function sumsOf(transactions: readonly Stripe.BalanceTransaction[]): Stripe.Balance.Available[] {
  const sums = new Map<string, number>([['gbp', 0]]);
  for (const { currency, net } of transactions) sums.set(currency, (sums.get(currency) ?? 0) + net);
  return [...sums].map(([currency, amount]) => ({ amount, currency, source_types: { card: amount } }));
}

export function getBalance(service: Service, call: Call): Stripe.Balance {
  readParams(nothing, call.params);
  const transactions = service.store.transactions.list();
  return {
    object: 'balance',
    available: sumsOf(transactions.filter((one) => isAvailable(service, one))),
    connect_reserved: [{ amount: 0, currency: 'gbp' }],
    livemode: false,
    pending: sumsOf(transactions.filter((one) => !isAvailable(service, one))),
  };
}
