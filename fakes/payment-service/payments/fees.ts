// The service's fee, and the balance transaction that tells it some while after the charge.
import type Stripe from 'stripe';
import { recordEvent } from '../webhooks/record-event.ts';
import { newId } from '../state/ids.ts';
import { readSettings } from '../state/settings.ts';
import type { Service } from '../service.ts';

const RATE = { per: 15n, of: 1000n };
const FIXED = 20n;
const WORKING_DAYS_TO_AVAILABLE = 3;
const DAY_MS = 24 * 60 * 60 * 1000;

/** 1.5 % and 20p, half a penny up; never more than the sum itself. */
export function feeOf(amount: number): number {
  const part = (2n * BigInt(amount) * RATE.per + RATE.of) / (2n * RATE.of);
  return Math.min(amount, Number(part + FIXED));
}

/** The start of the third working day after. */
function availableFrom(created: number): number {
  let day = Math.floor((created * 1000) / DAY_MS) * DAY_MS;
  for (let left = WORKING_DAYS_TO_AVAILABLE; left > 0;) {
    day += DAY_MS;
    const weekday = new Date(day).getUTCDay();
    if (weekday !== 0 && weekday !== 6) left -= 1;
  }
  return day / 1000;
}

function newTransaction(charge: Stripe.Charge): Stripe.BalanceTransaction {
  const fee = feeOf(charge.amount);
  const detail = { amount: fee, application: null, currency: charge.currency };
  return {
    id: newId('txn'),
    object: 'balance_transaction',
    amount: charge.amount,
    available_on: availableFrom(charge.created),
    balance_type: 'payments',
    created: charge.created,
    currency: charge.currency,
    description: charge.description,
    exchange_rate: null,
    fee,
    fee_details: [{ ...detail, description: 'Stripe processing fees', type: 'stripe_fee' }],
    net: charge.amount - fee,
    reporting_category: 'charge',
    source: charge.id,
    status: 'pending',
    type: 'charge',
  };
}

export function awaitFee(service: Service, charge: Stripe.Charge): void {
  const dueAtMs = Date.now() + readSettings(service.store).feeDelayMs;
  service.store.timers.put(`fee:${charge.id}`, { kind: 'fee', target: charge.id, dueAtMs });
}

export function giveFee(service: Service, chargeId: string): void {
  const charge = service.store.charges.find(chargeId);
  service.store.timers.remove(`fee:${chargeId}`);
  if (!charge || charge.balance_transaction) return;
  const transaction = newTransaction(charge);
  const updated = { ...charge, balance_transaction: transaction.id };
  service.store.transactions.put(transaction.id, transaction);
  service.store.charges.put(charge.id, updated);
  recordEvent(service, 'charge.updated', updated, { previous: { balance_transaction: null } });
}
