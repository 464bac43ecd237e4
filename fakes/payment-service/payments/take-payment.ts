// What happens when a card is given: paid, refused, asked to confirm, or left to be confirmed later.
import type Stripe from 'stripe';
import { newId } from '../state/ids.ts';
import { nowSeconds } from '../state/clock.ts';
import type { SessionRow } from '../state/rows.ts';
import { findNamed } from '../state/store.ts';
import { readSettings } from '../state/settings.ts';
import { NOT_CONFIRMED, findCard } from '../test-cards.ts';
import type { Refusal, TestCard } from '../test-cards.ts';
import { recordEvent } from '../webhooks/record-event.ts';
import type { Service } from '../service.ts';
import { failedCharge, newCharge, paidCharge } from './charge-object.ts';
import { awaitFee } from './fees.ts';
import { newIntent, refusedIntent } from './intent-object.ts';
import { presentIntent, presentSession } from './present.ts';
import { completed } from './session-object.ts';

export function saveSession(service: Service, row: SessionRow): SessionRow {
  service.store.sessions.put(row.session.id, row);
  return row;
}

export function saveIntent(
  service: Service,
  intent: Stripe.PaymentIntent,
  happening: Stripe.Event.Type,
): void {
  service.store.intents.put(intent.id, intent);
  recordEvent(service, happening, presentIntent(service, intent.id) ?? intent);
}

export function saveCharge(service: Service, charge: Stripe.Charge, happening: Stripe.Event.Type): void {
  service.store.charges.put(charge.id, charge);
  recordEvent(service, happening, charge);
}

/** The session's intent; it is made when a card is first given, not before. */
function intentOf(service: Service, row: SessionRow): { row: SessionRow; intent: Stripe.PaymentIntent } {
  const kept = findNamed(service.store.intents, row.session.payment_intent);
  if (kept) return { row, intent: kept };
  const intent = newIntent(row, nowSeconds(service));
  const linked = saveSession(service, { ...row, session: { ...row.session, payment_intent: intent.id } });
  saveIntent(service, intent, 'payment_intent.created');
  return { row: linked, intent };
}

function chargeFor(
  service: Service,
  row: SessionRow,
  intent: Stripe.PaymentIntent,
  card: TestCard,
): Stripe.Charge {
  return newCharge({
    intent,
    card,
    created: nowSeconds(service),
    email: row.session.customer_details?.email ?? null,
    isAuthenticated: card.fate === 'asks',
    paymentMethod: newId('pm'),
  });
}

export function paidIntent(intent: Stripe.PaymentIntent, charge: Stripe.Charge): Stripe.PaymentIntent {
  return {
    ...intent,
    amount_received: charge.amount,
    last_payment_error: null,
    latest_charge: charge.id,
    next_action: null,
    payment_method: charge.payment_method,
    processing: null,
    status: 'succeeded',
  };
}

function pay(service: Service, row: SessionRow, intent: Stripe.PaymentIntent, card: TestCard): SessionRow {
  const charge = paidCharge(chargeFor(service, row, intent, card));
  saveCharge(service, charge, 'charge.succeeded');
  awaitFee(service, charge);
  saveIntent(service, paidIntent(intent, charge), 'payment_intent.succeeded');
  const paid = saveSession(service, { ...row, askedCard: null, session: completed(row.session, 'paid') });
  recordEvent(service, 'checkout.session.completed', presentSession(service, paid.session));
  return paid;
}

function refuse(
  service: Service,
  row: SessionRow,
  intent: Stripe.PaymentIntent,
  card: TestCard,
  refusal: Refusal,
) {
  const charge = failedCharge(chargeFor(service, row, intent, card), refusal);
  saveCharge(service, charge, 'charge.failed');
  saveIntent(service, refusedIntent(intent, refusal, charge.id), 'payment_intent.payment_failed');
  return saveSession(service, { ...row, askedCard: null });
}

function ask(service: Service, row: SessionRow, intent: Stripe.PaymentIntent, card: TestCard): SessionRow {
  const asking: Stripe.PaymentIntent = {
    ...intent,
    last_payment_error: null,
    next_action: { type: 'redirect_to_url' },
    payment_method: newId('pm'),
    status: 'requires_action',
  };
  const waiting = saveSession(service, { ...row, askedCard: card.number });
  saveIntent(service, asking, 'payment_intent.requires_action');
  return waiting;
}

function startSlow(
  service: Service,
  row: SessionRow,
  intent: Stripe.PaymentIntent,
  card: TestCard,
): SessionRow {
  const charge = chargeFor(service, row, intent, card);
  saveCharge(service, charge, 'charge.pending');
  const processing: Stripe.PaymentIntent = {
    ...intent,
    last_payment_error: null,
    latest_charge: charge.id,
    next_action: null,
    payment_method: charge.payment_method,
    processing: { type: 'card' },
    status: 'processing',
  };
  saveIntent(service, processing, 'payment_intent.processing');
  const dueAtMs = Date.now() + readSettings(service.store).slowDelayMs;
  service.store.timers.put(`confirm:${row.session.id}`, { kind: 'confirm', target: row.session.id, dueAtMs });
  const unpaid = saveSession(service, { ...row, askedCard: null, session: completed(row.session, 'unpaid') });
  recordEvent(service, 'checkout.session.completed', presentSession(service, unpaid.session));
  return unpaid;
}

/** Gives a card to an open session. */
export function payWithCard(service: Service, open: SessionRow, card: TestCard): SessionRow {
  return service.store.write(() => {
    const { row, intent } = intentOf(service, open);
    if (card.fate === 'asks') return ask(service, row, intent, card);
    if (card.fate === 'slow') return startSlow(service, row, intent, card);
    if (card.refusal) return refuse(service, row, intent, card, card.refusal);
    return pay(service, row, intent, card);
  });
}

/** The payer's answer when asked to confirm: it is I, or I leave it. */
export function answerConfirmation(service: Service, open: SessionRow, isConfirmed: boolean): SessionRow {
  const card = findCard(open.askedCard ?? '');
  if (!card) return open;
  return service.store.write(() => {
    const { row, intent } = intentOf(service, open);
    if (isConfirmed) return pay(service, row, intent, card);
    saveIntent(service, refusedIntent(intent, NOT_CONFIRMED, null), 'payment_intent.payment_failed');
    return saveSession(service, { ...row, askedCard: null });
  });
}
