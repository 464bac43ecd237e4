// /v1/checkout/sessions: make one, read one, list them, close one, read what is being paid for.
import { z } from 'zod';
import { expireSession } from '../payments/expiry.ts';
import { presentSession } from '../payments/present.ts';
import { newSession, totalOfItems } from '../payments/session-object.ts';
import { createSessionSchema } from '../payments/session-params.ts';
import type { CreateSession } from '../payments/session-params.ts';
import type { Service } from '../service.ts';
import { nowSeconds } from '../state/clock.ts';
import type { SessionRow } from '../state/rows.ts';
import { invalid, missing } from './api-errors.ts';
import type { Call } from './endpoint.ts';
import { created, isWithin, readParams, text } from './form-encoding.ts';
import { pageFields, pageSchema, toPage } from './lists.ts';

const LEAST: Record<string, { minorUnits: number; words: string }> = {
  gbp: { minorUnits: 30, words: '£0.30 gbp' },
  eur: { minorUnits: 50, words: '€0.50 eur' },
  usd: { minorUnits: 50, words: '$0.50 usd' },
};
const MOST_MINOR_UNITS = 99_999_999;
const DAY_SECONDS = 24 * 60 * 60;
const LEAST_OPEN_SECONDS = 30 * 60;
/** A caller that follows the moved clock may lag behind it by a breath. */
const SLACK_SECONDS = 5;

function checkCurrency({ line_items: items, currency }: CreateSession): string {
  const [first] = items.map((item) => item.price_data.currency);
  const param = 'line_items[0][price_data][currency]';
  if (!first || !LEAST[first]) throw invalid(`Invalid currency: ${first}.`, { param });
  if (items.some((item) => item.price_data.currency !== first) || (currency ?? first) !== first)
    throw invalid('All line items of a Checkout Session must have the same currency.', { param });
  return first;
}

function checkAmount(params: CreateSession): void {
  const least = LEAST[checkCurrency(params)];
  if (params.line_items.some((item) => item.price_data.unit_amount < 0 || (item.quantity ?? 1) < 1))
    throw invalid('This value must be greater than or equal to 0.', {
      code: 'parameter_invalid_integer',
      param: 'line_items',
    });
  const total = totalOfItems(params.line_items);
  if (least && total < least.minorUnits)
    throw invalid(`The Checkout Session's total amount due must add up to at least ${least.words}`, {
      code: 'amount_too_small',
    });
  if (total > MOST_MINOR_UNITS)
    throw invalid("The Checkout Session's total amount due must be no more than 999,999.99.", {
      code: 'amount_too_large',
    });
}

function expiryOf(asked: number | undefined, now: number): number {
  const expiresAt = asked ?? now + DAY_SECONDS;
  const param = 'expires_at';
  if (expiresAt < now + LEAST_OPEN_SECONDS - SLACK_SECONDS)
    throw invalid('The `expires_at` timestamp must be at least 30 minutes from Checkout Session creation.', {
      param,
    });
  if (expiresAt > now + DAY_SECONDS + SLACK_SECONDS)
    throw invalid('The `expires_at` timestamp must be less than 24 hours from Checkout Session creation.', {
      param,
    });
  return expiresAt;
}

export function createSession(service: Service, call: Call) {
  const params = readParams(createSessionSchema, call.params);
  checkAmount(params);
  const now = nowSeconds(service);
  const row = newSession(params, { created: now, expiresAt: expiryOf(params.expires_at, now) });
  service.store.sessions.put(row.session.id, row);
  return presentSession(service, row.session);
}

const nothing = z.strictObject({});

function getRow(service: Service, id: string): SessionRow {
  const row = service.store.sessions.find(id);
  if (!row) throw missing('checkout.session', id);
  return row;
}

export function getSession(service: Service, call: Call) {
  readParams(nothing, call.params);
  return presentSession(service, getRow(service, call.id).session);
}

const listSchema = z.strictObject({
  ...pageFields,
  created: created.optional(),
  status: z.enum(['open', 'complete', 'expired']).optional(),
  payment_intent: text().optional(),
  customer_details: z.strictObject({ email: text() }).optional(),
});

export function listSessions(service: Service, call: Call) {
  const {
    created: window,
    status,
    payment_intent: intent,
    customer_details: details,
    ...page
  } = readParams(listSchema, call.params);
  const sessions = service.store.sessions
    .list()
    .map((row) => presentSession(service, row.session))
    .filter((session) => isWithin(session.created, window))
    .filter((session) => !status || session.status === status)
    .filter((session) => !intent || session.payment_intent === intent)
    .filter((session) => !details || session.customer_details?.email === details.email);
  return toPage(sessions, page, '/v1/checkout/sessions');
}

export function closeSession(service: Service, call: Call) {
  readParams(nothing, call.params);
  const row = getRow(service, call.id);
  if (row.session.status !== 'open')
    throw invalid(
      `Only Checkout Sessions with a status in ["open"] can be expired. This Checkout Session has a status of \`${row.session.status}\`.`,
    );
  return presentSession(service, expireSession(service, row, call).session);
}

export function listLineItems(service: Service, call: Call) {
  const page = readParams(pageSchema, call.params);
  const items = getRow(service, call.id).lineItems;
  // Line items stand in the order in which they were given, unlike every other list.
  return toPage(items.toReversed(), page, `/v1/checkout/sessions/${call.id}/line_items`);
}
