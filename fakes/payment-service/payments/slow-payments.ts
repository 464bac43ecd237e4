// Payments that the bank confirms, or fails, some while after the giver has left the page.
import { presentSession } from './present.ts';
import type { Service } from '../service.ts';
import type { SessionRow } from '../state/rows.ts';
import { findNamed } from '../state/store.ts';
import { SLOW_REFUSAL } from '../test-cards.ts';
import { recordEvent } from '../webhooks/record-event.ts';
import { failedCharge, paidCharge } from './charge-object.ts';
import { awaitFee } from './fees.ts';
import { refusedIntent } from './intent-object.ts';
import { paidIntent, saveCharge, saveIntent, saveSession } from './take-payment.ts';

function partsOf(service: Service, sessionId: string) {
  const row = service.store.sessions.find(sessionId);
  const intent = findNamed(service.store.intents, row?.session.payment_intent);
  const charge = findNamed(service.store.charges, intent?.latest_charge);
  return row && intent?.status === 'processing' && charge ? { row, intent, charge } : undefined;
}

export function confirmSlow(service: Service, sessionId: string): void {
  service.store.timers.remove(`confirm:${sessionId}`);
  const parts = partsOf(service, sessionId);
  if (!parts) return;
  const charge = paidCharge(parts.charge);
  saveCharge(service, charge, 'charge.succeeded');
  awaitFee(service, charge);
  saveIntent(service, paidIntent(parts.intent, charge), 'payment_intent.succeeded');
  const paid: SessionRow = { ...parts.row, session: { ...parts.row.session, payment_status: 'paid' } };
  saveSession(service, paid);
  recordEvent(service, 'checkout.session.async_payment_succeeded', presentSession(service, paid.session));
}

export function failSlow(service: Service, sessionId: string): void {
  service.store.timers.remove(`confirm:${sessionId}`);
  const parts = partsOf(service, sessionId);
  if (!parts) return;
  const charge = failedCharge(parts.charge, SLOW_REFUSAL);
  saveCharge(service, charge, 'charge.failed');
  saveIntent(service, refusedIntent(parts.intent, SLOW_REFUSAL, charge.id), 'payment_intent.payment_failed');
  recordEvent(service, 'checkout.session.async_payment_failed', presentSession(service, parts.row.session));
}
