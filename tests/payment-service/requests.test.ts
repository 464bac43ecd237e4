// The stand-in's API as the payment SDK sees it: sessions, repeats, lists, and every class of refusal.
import Stripe from 'stripe';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { giftOf, payGift, sdkFor, startStandIn } from './stand-in.ts';
import type { StandIn } from './stand-in.ts';

let standIn: StandIn;
beforeAll(async () => {
  standIn = await startStandIn();
});
afterAll(() => standIn.tearDown());

const create = (params: Stripe.Checkout.SessionCreateParams, options?: Stripe.RequestOptions) =>
  standIn.stripe.checkout.sessions.create(params, options);

/** The error that a call is refused with. */
async function refusal(call: Promise<unknown>): Promise<Stripe.errors.StripeError> {
  const error: unknown = await call.then(
    () => new Error('it was not refused'),
    (reason: unknown) => reason,
  );
  if (!(error instanceof Stripe.errors.StripeError)) throw error;
  return error;
}

describe('a new session', () => {
  it('carries what was asked, an address to pay at, and a day to do it in', async () => {
    const params = giftOf(2050, { customer_email: 'nell@hythe.example', submit_type: 'donate' });
    const session = await create(params);
    expect(session).toMatchObject({
      object: 'checkout.session',
      amount_total: 2050,
      currency: 'gbp',
      client_reference_id: params.client_reference_id,
      metadata: params.metadata,
      customer_email: 'nell@hythe.example',
      status: 'open',
      payment_status: 'unpaid',
      payment_intent: null,
      livemode: false,
      url: `${standIn.apiUrl}/pay/${session.id}`,
    });
    expect(session.id).toMatch(/^cs_test_[A-Za-z0-9]{58}$/);
    expect(session.expires_at - session.created).toBe(86_400);
    expect(session.lastResponse.requestId).toMatch(/^req_/);
    expect(session.lastResponse.apiVersion).toBe(Stripe.API_VERSION);
  });

  it('tells its line items apart, or inside when asked', async () => {
    const session = await create(giftOf(500));
    const items = await standIn.stripe.checkout.sessions.listLineItems(session.id);
    expect(items.data).toMatchObject([
      { object: 'item', amount_total: 500, description: 'A gift', quantity: 1 },
    ]);
    const whole = await standIn.stripe.checkout.sessions.retrieve(session.id, { expand: ['line_items'] });
    expect(whole.line_items?.data[0]?.id).toBe(items.data[0]?.id);
    expect(session.line_items).toBeUndefined();
  });

  it('is closed on demand, once', async () => {
    const session = await create(giftOf(500));
    const closed = await standIn.stripe.checkout.sessions.expire(session.id);
    expect(closed).toMatchObject({ status: 'expired', url: null });
    expect((await refusal(standIn.stripe.checkout.sessions.expire(session.id))).message).toContain(
      '`expired`',
    );
  });

  it('takes an end from half an hour to a day ahead', async () => {
    const now = Math.floor(Date.now() / 1000);
    expect((await create(giftOf(500, { expires_at: now + 3600 }))).expires_at).toBe(now + 3600);
    for (const expires_at of [now + 60, now + 2 * 86_400])
      expect((await refusal(create(giftOf(500, { expires_at })))).param).toBe('expires_at');
  });
});

describe('a key used again', () => {
  it('with the same parameters gives the same answer and makes nothing new', async () => {
    const params = giftOf(2000);
    const first = await create(params, { idempotencyKey: 'gi:same:1' });
    const again = await create(params, { idempotencyKey: 'gi:same:1' });
    expect(again).toEqual(first);
    expect(again.lastResponse.headers['idempotent-replayed']).toBe('true');
    expect(again.lastResponse.idempotencyKey).toBe('gi:same:1');
    const all = await standIn.stripe.checkout.sessions.list({ limit: 100 });
    const made = all.data.filter((one) => one.client_reference_id === params.client_reference_id);
    expect(made).toHaveLength(1);
  });

  it('with other parameters is refused', async () => {
    const params = giftOf(2000);
    await create(params, { idempotencyKey: 'gi:other:1' });
    const error = await refusal(
      create({ ...params, customer_email: 'a@b.example' }, { idempotencyKey: 'gi:other:1' }),
    );
    expect(error).toBeInstanceOf(Stripe.errors.StripeIdempotencyError);
    expect(error.statusCode).toBe(400);
  });

  it('while the first request is still at work is refused with 409, and a client that tries again is answered', async () => {
    await standIn.control('/requests/mode', { latencyMs: 300 });
    const params = giftOf(2000);
    const impatient = sdkFor(standIn.apiUrl, { maxNetworkRetries: 0 });
    const options = { idempotencyKey: 'gi:race:1' };
    const [first, second, third] = await Promise.allSettled([
      impatient.checkout.sessions.create(params, options),
      impatient.checkout.sessions.create(params, options),
      create(params, options),
    ]);
    await standIn.control('/requests/mode', { latencyMs: 0 });
    const refused = [first, second, third].filter((one) => one.status === 'rejected');
    expect(refused.length).toBeGreaterThan(0);
    for (const { reason } of refused)
      expect(reason).toMatchObject({ statusCode: 409, code: 'idempotency_key_in_use' });
    const ids = [first, second, third].flatMap((one) => (one.status === 'fulfilled' ? [one.value.id] : []));
    expect(new Set(ids).size).toBe(1);
  });

  it('after a refusal for its parameters may be put right', async () => {
    const options = { idempotencyKey: 'gi:right:1' };
    await refusal(create(giftOf(29), options));
    expect((await create(giftOf(30), options)).amount_total).toBe(30);
  });

  it('when the answer was lost on its way gives the SDK the one session that was made', async () => {
    const params = giftOf(2000);
    await standIn.control('/requests/mode', { cutNext: 1 });
    const session = await create(params);
    expect(session.lastResponse.headers['idempotent-replayed']).toBe('true');
    const all = await standIn.stripe.checkout.sessions.list({ limit: 100 });
    expect(all.data.filter((one) => one.client_reference_id === params.client_reference_id)).toHaveLength(1);
  });

  it('more than a day later makes a new session', async () => {
    const params = giftOf(2000);
    const first = await create(params, { idempotencyKey: 'gi:old:1' });
    await standIn.control('/clock', { advanceMs: 25 * 3_600_000 });
    const later = await create(params, { idempotencyKey: 'gi:old:1' });
    await standIn.control('/clock', { reset: true });
    expect(later.id).not.toBe(first.id);
  });
});

describe('a request that cannot be answered', () => {
  it('with another key is told so, without the key', async () => {
    const stranger = sdkFor(standIn.apiUrl, { key: 'sk_test_somebody_else' });
    const error = await refusal(stranger.balance.retrieve());
    expect(error).toBeInstanceOf(Stripe.errors.StripeAuthenticationError);
    expect(error.message).not.toContain('somebody_else');
  });

  it('without any key is told so, in a body with the key error', async () => {
    const response = await fetch(`${standIn.apiUrl}/v1/balance`);
    expect(response.status).toBe(401);
    expect(await response.json()).toMatchObject({ error: { type: 'invalid_request_error' } });
  });

  it('for a thing that is not there is 404 resource_missing', async () => {
    for (const call of [
      standIn.stripe.checkout.sessions.retrieve('cs_test_none'),
      standIn.stripe.paymentIntents.retrieve('pi_none'),
      standIn.stripe.charges.retrieve('ch_none'),
      standIn.stripe.balanceTransactions.retrieve('txn_none'),
      standIn.stripe.events.retrieve('evt_none'),
    ]) {
      const error = await refusal(call);
      expect(error).toBeInstanceOf(Stripe.errors.StripeInvalidRequestError);
      expect(error).toMatchObject({ statusCode: 404, code: 'resource_missing', param: 'id' });
    }
  });

  it('at an address that is not there is 404 with an error body', async () => {
    const error = await refusal(standIn.stripe.refunds.list());
    expect(error).toMatchObject({ statusCode: 404, type: 'StripeInvalidRequestError' });
    expect(error.message).toBe('Unrecognized request URL (GET: /v1/refunds).');
  });

  it.each([
    ['no sum of 29p', giftOf(29), { code: 'amount_too_small' }],
    ['no sum above the card service’s most', giftOf(100_000_000), { code: 'amount_too_large' }],
    [
      'no address to come back to',
      giftOf(500, { success_url: 'nowhere' }),
      { code: 'url_invalid', param: 'success_url' },
    ],
    [
      'an empty reference',
      giftOf(500, { client_reference_id: '' }),
      { code: 'parameter_invalid_empty', param: 'client_reference_id' },
    ],
    ['monthly payments, which are not there yet', giftOf(500, { mode: 'subscription' }), { param: 'mode' }],
    [
      'no such e-mail address',
      giftOf(500, { customer_email: 'nell' }),
      { code: 'email_invalid', param: 'customer_email' },
    ],
  ])('refuses %s', async (_name, params, expected) => {
    expect(await refusal(create(params))).toMatchObject({ statusCode: 400, ...expected });
  });

  it('names what is missing, and what it does not know, as the caller wrote it', async () => {
    const without = giftOf(500, { mode: undefined });
    expect(await refusal(create(without))).toMatchObject({ code: 'parameter_missing', param: 'mode' });
    const bare = giftOf(500, {
      line_items: [{ quantity: 1, price_data: { currency: 'gbp', product_data: { name: 'A gift' } } }],
    });
    expect(await refusal(create(bare))).toMatchObject({
      code: 'parameter_missing',
      param: 'line_items[0][price_data][unit_amount]',
    });
    const strange = { ...giftOf(500), lamp: 'lit' };
    expect(await refusal(create(strange))).toMatchObject({ code: 'parameter_unknown', param: 'lamp' });
  });

  it('when the service itself fails is tried again by the SDK', async () => {
    await standIn.control('/requests/mode', { failNext: 1 });
    expect((await create(giftOf(700))).amount_total).toBe(700);
    await standIn.control('/requests/mode', { failNext: 1 });
    const error = await refusal(sdkFor(standIn.apiUrl, { maxNetworkRetries: 0 }).balance.retrieve());
    expect(error).toBeInstanceOf(Stripe.errors.StripeAPIError);
    expect(error.statusCode).toBe(500);
  });

  it('expands what may be expanded and says what may not', async () => {
    const session = await payGift(standIn);
    const call = standIn.stripe.checkout.sessions.retrieve(session.id, { expand: ['lantern'] });
    expect((await refusal(call)).message).toBe('This property cannot be expanded (lantern).');
    const list = await standIn.stripe.charges.list({ limit: 1, expand: ['data.payment_intent'] });
    expect(list.data[0]?.payment_intent).toMatchObject({ object: 'payment_intent' });
  });
});

describe('lists', () => {
  it('give the newest first, by pages that the SDK walks to the end, and back from an id', async () => {
    const made: string[] = [];
    for (let count = 0; count < 5; count += 1) made.unshift((await create(giftOf(400))).id);
    const firstPage = await standIn.stripe.checkout.sessions.list({ limit: 2 });
    expect(firstPage.data.map((one) => one.id)).toEqual(made.slice(0, 2));
    expect(firstPage.has_more).toBe(true);
    const walked = await standIn.stripe.checkout.sessions.list({ limit: 2 }).autoPagingToArray({ limit: 5 });
    expect(walked.map((one) => one.id)).toEqual(made);
    const newer = await standIn.stripe.checkout.sessions.list({ limit: 2, ending_before: made[3] });
    expect(newer.data.map((one) => one.id)).toEqual(made.slice(1, 3));
    expect(newer.has_more).toBe(true);
  });

  it('end: the last page has no more', async () => {
    const all = await standIn.stripe.checkout.sessions.list({ limit: 2 }).autoPagingToArray({ limit: 1000 });
    const beyond = await standIn.stripe.checkout.sessions.list({ starting_after: all.at(-1)?.id });
    expect(beyond).toMatchObject({ data: [], has_more: false });
  });

  it('refuse a page of more than a hundred and an id that is not in them', async () => {
    expect(await refusal(Promise.resolve(standIn.stripe.charges.list({ limit: 101 })))).toMatchObject({
      param: 'limit',
    });
    const lost = Promise.resolve(standIn.stripe.charges.list({ starting_after: 'ch_none' }));
    expect(await refusal(lost)).toMatchObject({ code: 'resource_missing', param: 'starting_after' });
  });

  it('are narrowed by state, time and payment', async () => {
    const session = await payGift(standIn);
    const { stripe } = standIn;
    const open = await stripe.checkout.sessions.list({ status: 'open', limit: 100 });
    expect(open.data.every((one) => one.status === 'open')).toBe(true);
    const intent = typeof session.payment_intent === 'object' ? session.payment_intent?.id : undefined;
    const byIntent = await stripe.checkout.sessions.list({ payment_intent: intent });
    expect(byIntent.data.map((one) => one.id)).toEqual([session.id]);
    expect((await stripe.charges.list({ payment_intent: intent })).data).toHaveLength(1);
    const future = await stripe.checkout.sessions.list({ created: { gt: session.created + 3 * 86_400 } });
    expect(future.data).toEqual([]);
  });
});
