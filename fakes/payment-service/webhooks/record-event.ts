// Writes down that something happened, as a snapshot that never changes, and hands it to the courier.
import Stripe from 'stripe';
import { newId } from '../state/ids.ts';
import { nowSeconds } from '../state/clock.ts';
import type { Service } from '../service.ts';
import { takeEvent } from './courier.ts';

/** The API request that made it happen, if one did. */
export type Cause = { requestId?: string; idempotencyKey?: string | null };
type More = { cause?: Cause; previous?: Stripe.Event.Data.PreviousAttributes };

export function recordEvent(
  service: Service,
  type: Stripe.Event.Type,
  object: object,
  more: More = {},
): void {
  const event: Stripe.EventBase = {
    id: newId('evt'),
    object: 'event',
    api_version: Stripe.API_VERSION,
    created: nowSeconds(service),
    data: { object, ...(more.previous && { previous_attributes: more.previous }) },
    livemode: false,
    pending_webhooks: 0,
    request: { id: more.cause?.requestId ?? null, idempotency_key: more.cause?.idempotencyKey ?? null },
    type,
  };
  service.store.events.put(event.id, event);
  takeEvent(service, event.id);
}
