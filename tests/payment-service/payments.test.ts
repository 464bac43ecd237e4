// What becomes of a payment: each card's fate, the fee that comes later, the clock, and a restart.
import { readFile, truncate, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { chargeOf, giftOf, intentOf, payGift, startStandIn, until } from './stand-in.ts';
import type { StandIn } from './stand-in.ts';

let standIn: StandIn;
beforeAll(async () => {
  standIn = await startStandIn();
  await standIn.control('/fees/delay', { delayMs: 600_000 });
  await standIn.control('/async/delay', { delayMs: 600_000 });
});
afterAll(() => standIn.tearDown());

const eventTypes = async (): Promise<string[]> =>
  (await standIn.stripe.events.list({ limit: 100 }).autoPagingToArray({ limit: 1000 }))
    .map((event) => event.type)
    .toReversed();

async function eventsOf(work: () => Promise<unknown>): Promise<string[]> {
  const before = (await eventTypes()).length;
  await work();
  return (await eventTypes()).slice(before);
}

describe('a card that pays', () => {
  it('completes the session, the intent and the charge, and says so in order', async () => {
    const types = await eventsOf(() => payGift(standIn));
    expect(types).toEqual([
      'payment_intent.created',
      'charge.succeeded',
      'payment_intent.succeeded',
      'checkout.session.completed',
    ]);
    const session = await payGift(standIn);
    expect(session).toMatchObject({ status: 'complete', payment_status: 'paid', url: null });
    expect(intentOf(session)).toMatchObject({
      status: 'succeeded',
      amount_received: 2000,
      metadata: session.metadata,
    });
    expect(chargeOf(session)).toMatchObject({
      status: 'succeeded',
      captured: true,
      balance_transaction: null,
    });
  });

  it('gets its fee later, told by charge.updated', async () => {
    const session = await payGift(standIn);
    const types = await eventsOf(() => standIn.control('/fees/settle'));
    expect(new Set(types)).toEqual(new Set(['charge.updated']));
    const { stripe } = standIn;
    const charge = await stripe.charges.retrieve(chargeOf(session).id, { expand: ['balance_transaction'] });
    expect(charge.balance_transaction).toMatchObject({
      amount: 2000,
      fee: 50,
      net: 1950,
      fee_details: [{ amount: 50, type: 'stripe_fee' }],
      reporting_category: 'charge',
      status: 'pending',
    });
    const [event] = (await stripe.events.list({ type: 'charge.updated', limit: 1 })).data;
    expect(event?.data).toMatchObject({ previous_attributes: { balance_transaction: null } });
    const listed = await stripe.balanceTransactions.list({
      source: charge.id,
      type: 'charge',
      expand: ['data.source'],
    });
    expect(listed.data).toMatchObject([{ source: { id: charge.id } }]);
  });

  it('gets its fee by itself when nobody hurries it', async () => {
    await standIn.control('/fees/delay', { delayMs: 300 });
    const session = await payGift(standIn);
    await standIn.control('/fees/delay', { delayMs: 600_000 });
    expect(chargeOf(session).balance_transaction).toBeNull();
    await until(
      async () => (await standIn.stripe.charges.retrieve(chargeOf(session).id)).balance_transaction !== null,
    );
  });

  it('is counted in the balance, available once its day has come', async () => {
    await payGift(standIn);
    await standIn.control('/fees/settle');
    const before = await standIn.stripe.balance.retrieve();
    expect(before.pending[0]?.amount).toBeGreaterThanOrEqual(1950);
    await standIn.control('/clock', { advanceMs: 8 * 86_400_000 });
    const after = await standIn.stripe.balance.retrieve();
    await standIn.control('/clock', { reset: true });
    expect(after.pending[0]?.amount).toBe(0);
    expect(after.available[0]?.amount).toBe(
      (before.available[0]?.amount ?? 0) + (before.pending[0]?.amount ?? 0),
    );
  });
});

describe('a card that is refused', () => {
  it.each([
    ['4000000000000002', 'card_declined', 'generic_decline'],
    ['4000000000009995', 'card_declined', 'insufficient_funds'],
    ['4000000000009987', 'card_declined', 'lost_card'],
    ['4000000000000069', 'expired_card', 'expired_card'],
  ])('%s leaves the session open with the reason %s, %s', async (card, code, declineCode) => {
    const types = await eventsOf(async () => {
      const session = await payGift(standIn, card);
      expect(session).toMatchObject({ status: 'open', payment_status: 'unpaid' });
      expect(intentOf(session)).toMatchObject({
        status: 'requires_payment_method',
        last_payment_error: { type: 'card_error', code, decline_code: declineCode },
      });
      expect(chargeOf(session)).toMatchObject({ status: 'failed', failure_code: code, paid: false });
    });
    expect(types).toEqual(['payment_intent.created', 'charge.failed', 'payment_intent.payment_failed']);
  });

  it('can be followed by a better one, on the same intent', async () => {
    const refused = await payGift(standIn, '4000000000000002');
    await standIn.control(`/sessions/${refused.id}/pay`, { card: '4242424242424242' });
    const paid = await standIn.stripe.checkout.sessions.retrieve(refused.id, { expand: ['payment_intent'] });
    expect(intentOf(paid)).toMatchObject({
      id: intentOf(refused).id,
      status: 'succeeded',
      last_payment_error: null,
    });
    const charges = await standIn.stripe.charges.list({ payment_intent: intentOf(paid).id });
    expect(charges.data.map((charge) => charge.status)).toEqual(['succeeded', 'failed']);
  });
});

describe('a card that asks for confirmation', () => {
  const ASKS = '4000002500003155';

  it('waits for it, and is paid once it is given', async () => {
    const waiting = await payGift(standIn, ASKS);
    expect(intentOf(waiting)).toMatchObject({
      status: 'requires_action',
      next_action: { type: 'redirect_to_url', redirect_to_url: { url: `${waiting.url}/confirm` } },
    });
    const paid = await payGift(standIn, ASKS, { confirm: true });
    expect(paid.payment_status).toBe('paid');
    expect(chargeOf(paid).payment_method_details?.card?.three_d_secure).toMatchObject({
      result: 'authenticated',
    });
  });

  it('is not paid when it is left', async () => {
    const left = await payGift(standIn, ASKS, { confirm: false });
    expect(left).toMatchObject({ status: 'open', payment_status: 'unpaid' });
    expect(intentOf(left)).toMatchObject({
      status: 'requires_payment_method',
      last_payment_error: { code: 'payment_intent_authentication_failure' },
    });
  });

  it('is cancelled with its session when it was never answered', async () => {
    const waiting = await payGift(standIn, ASKS);
    await standIn.stripe.checkout.sessions.expire(waiting.id);
    const intent = await standIn.stripe.paymentIntents.retrieve(intentOf(waiting).id);
    expect(intent).toMatchObject({ status: 'canceled', cancellation_reason: 'expired', next_action: null });
  });
});

describe('a card that is confirmed later', () => {
  const SLOW = '4000009900000012';

  it('completes unpaid, then is paid', async () => {
    const session = await payGift(standIn, SLOW);
    expect(session).toMatchObject({ status: 'complete', payment_status: 'unpaid' });
    expect(intentOf(session).status).toBe('processing');
    expect(chargeOf(session).status).toBe('pending');
    const types = await eventsOf(() => standIn.control('/async/confirm'));
    expect(types).toEqual([
      'charge.succeeded',
      'payment_intent.succeeded',
      'checkout.session.async_payment_succeeded',
    ]);
    expect((await standIn.stripe.checkout.sessions.retrieve(session.id)).payment_status).toBe('paid');
  });

  it('completes unpaid, then fails when told to', async () => {
    const session = await payGift(standIn, SLOW);
    const types = await eventsOf(() => standIn.control('/async/fail'));
    expect(types).toEqual([
      'charge.failed',
      'payment_intent.payment_failed',
      'checkout.session.async_payment_failed',
    ]);
    expect((await standIn.stripe.checkout.sessions.retrieve(session.id)).payment_status).toBe('unpaid');
  });

  it('is paid by itself after a while', async () => {
    await standIn.control('/async/delay', { delayMs: 100 });
    const session = await payGift(standIn, SLOW);
    await standIn.control('/async/delay', { delayMs: 600_000 });
    await until(
      async () => (await standIn.stripe.checkout.sessions.retrieve(session.id)).payment_status === 'paid',
    );
  });
});

describe('the clock', () => {
  it('dates what is made, and closes sessions whose time is over', async () => {
    const session = await standIn.stripe.checkout.sessions.create(giftOf(2000));
    await standIn.control('/clock', { advanceMs: 86_400_000 + 1000 });
    const expired = await standIn.stripe.events.list({ type: 'checkout.session.expired', limit: 100 });
    const later = await standIn.stripe.checkout.sessions.create(giftOf(2000));
    await standIn.control('/clock', { reset: true });
    expect(expired.data.map((event) => event.data.object)).toContainEqual(
      expect.objectContaining({ id: session.id, status: 'expired', url: null }),
    );
    expect((await standIn.stripe.checkout.sessions.retrieve(session.id)).status).toBe('expired');
    expect(later.created - session.created).toBeGreaterThanOrEqual(86_401);
  });

  it('is set to a moment and told', async () => {
    await standIn.control('/clock', { to: '2025-10-01T09:00:00Z' });
    const clock: unknown = await (await fetch(`${standIn.controlUrl}/clock`)).json();
    const session = await standIn.stripe.checkout.sessions.create(giftOf(2000));
    await standIn.control('/clock', { reset: true });
    expect(clock).toMatchObject({ now: expect.stringMatching(/^2025-10-01T09:00:0/) as unknown });
    expect(session.created).toBeGreaterThanOrEqual(Date.UTC(2025, 9, 1, 9) / 1000);
    expect(session.created).toBeLessThan(Date.UTC(2025, 9, 1, 9, 1) / 1000);
  });
});

describe('a restart', () => {
  it('keeps sessions, payments, fees to come, events, keys and the clock', async () => {
    const paid = await payGift(standIn);
    const waiting = await payGift(standIn, '4000002500003155');
    const params = giftOf(900);
    const made = await standIn.stripe.checkout.sessions.create(params, { idempotencyKey: 'gi:restart:1' });
    await standIn.control('/clock', { advanceMs: 3_600_000 });
    const events = await standIn.stripe.events.list({ limit: 100 });
    await standIn.restart();
    expect((await standIn.stripe.events.list({ limit: 100 })).data.map((event) => event.id)).toEqual(
      events.data.map((event) => event.id),
    );
    expect(await standIn.stripe.checkout.sessions.retrieve(paid.id)).toMatchObject({
      payment_status: 'paid',
    });
    const again = await standIn.stripe.checkout.sessions.create(params, { idempotencyKey: 'gi:restart:1' });
    expect(again.id).toBe(made.id);
    const open = await standIn.stripe.checkout.sessions.retrieve(waiting.id);
    expect(open.url).toBe(`${standIn.apiUrl}/pay/${waiting.id}`);
    await standIn.control('/fees/settle');
    expect((await standIn.stripe.charges.retrieve(chargeOf(paid).id)).balance_transaction).toMatch(/^txn_/);
    const clock: unknown = await (await fetch(`${standIn.controlUrl}/clock`)).json();
    await standIn.control('/clock', { reset: true });
    expect(clock).toMatchObject({ offsetMs: 3_600_000 });
  });

  it('after a kill in the middle of a line loses that line alone', async () => {
    const kept = await standIn.stripe.checkout.sessions.create(giftOf(900));
    const journal = join(standIn.options.stateFolder, 'journal.jsonl');
    const before = (await readFile(journal)).length;
    const lost = await standIn.stripe.checkout.sessions.create(giftOf(900));
    const whole = await readFile(journal);
    await standIn.stop();
    await writeFile(journal, whole);
    await truncate(journal, before + 40);
    await standIn.restart();
    expect((await standIn.stripe.checkout.sessions.retrieve(kept.id)).id).toBe(kept.id);
    await expect(standIn.stripe.checkout.sessions.retrieve(lost.id)).rejects.toMatchObject({
      statusCode: 404,
    });
  });
});

it('the truth tells every payment with its sum, fee and reference', async () => {
  const session = await payGift(standIn);
  await standIn.control('/fees/settle');
  const truth: unknown = await (await fetch(`${standIn.controlUrl}/truth`)).json();
  expect(truth).toMatchObject({
    payments: expect.arrayContaining([
      expect.objectContaining({
        session: session.id,
        status: 'succeeded',
        amount: 2000,
        fee: 50,
        net: 1950,
        client_reference_id: session.client_reference_id,
      }),
    ]) as unknown,
  });
});
