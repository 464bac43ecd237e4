// How events reach the site: signed, again until taken, and dropped, doubled, delayed or turned round on demand.
import Stripe from 'stripe';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { KEY, SECRET, payGift, startStandIn, typesIn, until } from './stand-in.ts';
import type { StandIn } from './stand-in.ts';

let standIn: StandIn;
beforeEach(async () => {
  standIn = await startStandIn();
  await standIn.control('/fees/delay', { delayMs: 600_000 });
});
afterEach(() => standIn.tearDown());

const PAID = [
  'payment_intent.created',
  'charge.succeeded',
  'payment_intent.succeeded',
  'checkout.session.completed',
];
const { webhooks } = new Stripe(KEY);
const arrived = (count: number) => until(() => standIn.receiver.received.length >= count);
const idsOf = () =>
  standIn.receiver.received.map(({ body, signature }) => webhooks.constructEvent(body, signature, SECRET).id);

it('an event is a signed snapshot in the SDK’s own version, whatever the moved clock says', async () => {
  await standIn.control('/clock', { to: '2025-03-01T12:00:00Z' });
  const session = await payGift(standIn);
  await arrived(4);
  const last = standIn.receiver.received[3];
  const event = webhooks.constructEvent(last?.body ?? '', last?.signature ?? '', SECRET);
  expect(event).toMatchObject({
    object: 'event',
    type: 'checkout.session.completed',
    api_version: Stripe.API_VERSION,
    livemode: false,
    pending_webhooks: 1,
    data: { object: { id: session.id, payment_status: 'paid' } },
  });
  expect(new Date(event.created * 1000).getUTCFullYear()).toBe(2025);
  expect(() => webhooks.constructEvent(`${last?.body} `, last?.signature ?? '', SECRET)).toThrow();
  await until(async () => (await standIn.stripe.events.retrieve(event.id)).pending_webhooks === 0);
});

it('an event that is not taken comes again, signed anew, until it is', async () => {
  standIn.receiver.answer = 500;
  await payGift(standIn);
  await arrived(4);
  const undelivered = await standIn.stripe.events.list({ delivery_success: false });
  expect(undelivered.data.map((event) => event.pending_webhooks)).toEqual([1, 1, 1, 1]);
  standIn.receiver.answer = 200;
  await arrived(8);
  expect(idsOf().slice(0, 4)).toEqual(idsOf().slice(4, 8));
  await until(async () => (await standIn.stripe.events.list({ delivery_success: false })).data.length === 0);
  await payGift(standIn);
  await arrived(12);
  expect(new Set(idsOf()).size).toBe(8);
});

it('an event that is dropped never comes, but stands in the list of events for who asks', async () => {
  await standIn.control('/webhooks/mode', { dropNext: 3 });
  await payGift(standIn);
  await arrived(1);
  expect(typesIn(standIn.receiver)).toEqual(['checkout.session.completed']);
  await standIn.control('/webhooks/mode', { dropNext: 'all' });
  await payGift(standIn);
  expect(await standIn.control('/webhooks/flush')).toEqual({ delivered: 0, failed: 0 });
  const undelivered = await standIn.stripe.events.list({
    delivery_success: false,
    types: ['checkout.session.completed', 'charge.succeeded'],
  });
  expect(undelivered.data.map((event) => event.type)).toEqual([
    'checkout.session.completed',
    'charge.succeeded',
    'charge.succeeded',
  ]);
  await standIn.control(`/events/${undelivered.data[0]?.id}/resend`);
  await arrived(2);
  expect(idsOf()[1]).toBe(undelivered.data[0]?.id);
});

it('an event that is doubled comes twice under one id', async () => {
  await standIn.control('/webhooks/mode', { doubleNext: 1 });
  await payGift(standIn);
  await arrived(5);
  const ids = idsOf();
  expect(ids[0]).toBe(ids[1]);
  expect(new Set(ids).size).toBe(4);
});

it('events that are turned round come last first', async () => {
  await standIn.control('/webhooks/mode', { reorderNext: 4 });
  await payGift(standIn);
  await arrived(4);
  expect(typesIn(standIn.receiver)).toEqual(PAID.toReversed());
});

it('events wait while they are delayed, and a flush sends them at once', async () => {
  await standIn.control('/webhooks/mode', { delayMs: 60_000 });
  await payGift(standIn);
  expect(standIn.receiver.received).toEqual([]);
  expect(await standIn.control('/webhooks/flush')).toEqual({ delivered: 4, failed: 0 });
  expect(typesIn(standIn.receiver)).toEqual(PAID);
});

it('events that were on their way are still carried after a restart', async () => {
  await standIn.control('/webhooks/mode', { paused: true });
  await payGift(standIn);
  await standIn.restart();
  expect(standIn.receiver.received).toEqual([]);
  await standIn.control('/webhooks/mode', { paused: false });
  await arrived(4);
  expect(typesIn(standIn.receiver)).toEqual(PAID);
});

it('events are listed from an id on, and for thirty days', async () => {
  await payGift(standIn);
  const [newest] = (await standIn.stripe.events.list({ limit: 1 })).data;
  await payGift(standIn);
  const since = await standIn.stripe.events.list({ ending_before: newest?.id });
  expect(since.data.map((event) => event.type)).toEqual(PAID.toReversed());
  await standIn.control('/clock', { advanceMs: 31 * 86_400_000 });
  expect((await standIn.stripe.events.list()).data).toEqual([]);
});
