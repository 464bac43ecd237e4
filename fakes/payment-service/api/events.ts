// /v1/events: what happened in the last thirty days, for a caller that no webhook reached.
import type Stripe from 'stripe';
import { z } from 'zod';
import { presentEvent } from '../payments/present.ts';
import type { Service } from '../service.ts';
import { nowSeconds } from '../state/clock.ts';
import { invalid, missing } from './api-errors.ts';
import type { Call } from './endpoint.ts';
import { created, isWithin, readParams, text, truth } from './form-encoding.ts';
import { pageFields, toPage } from './lists.ts';

const KEPT_SECONDS = 30 * 24 * 60 * 60;

const nothing = z.strictObject({});
const listSchema = z.strictObject({
  ...pageFields,
  created: created.optional(),
  delivery_success: truth.optional(),
  type: text().optional(),
  types: z.array(text()).max(20).optional(),
});

const isKept = (service: Service, event: Stripe.EventBase): boolean =>
  event.created >= nowSeconds(service) - KEPT_SECONDS;

export function getEvent(service: Service, call: Call) {
  readParams(nothing, call.params);
  const event = service.store.events.find(call.id);
  if (!event || !isKept(service, event)) throw missing('event', call.id);
  return presentEvent(service, event);
}

function wasDelivered(service: Service, event: Stripe.EventBase): boolean {
  const delivery = service.store.deliveries.find(event.id);
  return !delivery || delivery.state === 'delivered';
}

/** `payment_intent.*` stands for every type that begins so. */
const matches = (type: string, asked: string): boolean =>
  asked.endsWith('*') ? type.startsWith(asked.slice(0, -1)) : type === asked;

export function listEvents(service: Service, call: Call) {
  const {
    created: window,
    delivery_success: success,
    type,
    types,
    ...page
  } = readParams(listSchema, call.params);
  if (type && types) throw invalid('You may only provide one of the parameters: `type`, `types`.');
  const asked = types ?? (type ? [type] : undefined);
  const events = service.store.events
    .list()
    .filter((event) => isKept(service, event) && isWithin(event.created, window))
    .filter((event) => !asked || asked.some((one) => matches(event.type, one)))
    .filter((event) => success === undefined || wasDelivered(service, event) === success)
    .map((event) => presentEvent(service, event));
  return toPage(events, page, '/v1/events');
}
