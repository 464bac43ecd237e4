// Closes sessions whose time is over, or which their maker closes.
import type Stripe from 'stripe';
import { nowSeconds } from '../state/clock.ts';
import type { SessionRow } from '../state/rows.ts';
import { findNamed } from '../state/store.ts';
import { recordEvent } from '../webhooks/record-event.ts';
import type { Cause } from '../webhooks/record-event.ts';
import type { Service } from '../service.ts';
import { presentSession } from './present.ts';

function cancelIntent(service: Service, session: Stripe.Checkout.Session, cause: Cause): void {
  const intent = findNamed(service.store.intents, session.payment_intent);
  if (!intent) return;
  const canceled: Stripe.PaymentIntent = {
    ...intent,
    canceled_at: nowSeconds(service),
    cancellation_reason: 'expired',
    next_action: null,
    status: 'canceled',
  };
  service.store.intents.put(canceled.id, canceled);
  recordEvent(service, 'payment_intent.canceled', canceled, { cause });
}

export function expireSession(service: Service, row: SessionRow, cause: Cause = {}): SessionRow {
  return service.store.write(() => {
    cancelIntent(service, row.session, cause);
    const expired: SessionRow = { ...row, askedCard: null, session: { ...row.session, status: 'expired' } };
    service.store.sessions.put(expired.session.id, expired);
    recordEvent(service, 'checkout.session.expired', presentSession(service, expired.session), { cause });
    return expired;
  });
}

export function expireOverdueSessions(service: Service): void {
  const now = nowSeconds(service);
  for (const row of service.store.sessions.list())
    if (row.session.status === 'open' && row.session.expires_at <= now) expireSession(service, row);
}
