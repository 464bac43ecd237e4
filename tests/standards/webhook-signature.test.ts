// The webhook's signature: HMAC-SHA256 over `t.body`, as the payment service's documentation and its SDK have it.
import { createHmac } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { startTestApp, WEBHOOK_SECRET, type TestApp } from '#tests/support/app.ts';
import { setUpTown } from '#tests/support/factories.ts';

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
  await setUpTown(app);
});
afterAll(() => app.stop());

const eventOf = (id: string, more: object = {}) =>
  JSON.stringify({
    id,
    object: 'event',
    type: 'product.created',
    created: 1_800_000_000,
    livemode: false,
    data: { object: { id: 'prod_1', object: 'product' } },
    ...more,
  });
const seconds = () => Math.floor(Date.now() / 1000);
/** Reckoned here by hand, not by the SDK that the server checks with. */
const sign = (body: string, at: number, secret = WEBHOOK_SECRET) =>
  `t=${at},v1=${createHmac('sha256', secret).update(`${at}.${body}`).digest('hex')}`;
const post = (body: string, signature: string) =>
  app
    .agent()
    .post('/webhooks/payments')
    .set('Content-Type', 'application/json')
    .set('Stripe-Signature', signature)
    .send(body);
const kept = (id: string) => app.deps.db('payment_events').where({ id });

describe('an event', () => {
  test('signed by hand is kept and answered 200', async () => {
    const body = eventOf('evt_right');
    await post(body, sign(body, seconds())).expect(200);
    expect(await kept('evt_right')).toHaveLength(1);
  });

  test('told twice at once is kept once, and both are answered 200', async () => {
    const body = eventOf('evt_twice');
    const signature = sign(body, seconds());
    const answers = await Promise.all([post(body, signature), post(body, signature), post(body, signature)]);
    expect(answers.map((answer) => answer.status)).toEqual([200, 200, 200]);
    expect(await kept('evt_twice')).toHaveLength(1);
  });

  test.each([
    ['with another secret', (body: string) => sign(body, seconds(), 'whsec_other'), (body: string) => body],
    [
      'changed by one letter',
      (body: string) => sign(body, seconds()),
      (body: string) => body.replace('product', 'Product'),
    ],
    ['with one byte added', (body: string) => sign(body, seconds()), (body: string) => `${body} `],
    ['signed 301 seconds ago', (body: string) => sign(body, seconds() - 301), (body: string) => body],
    ['without a signature', () => '', (body: string) => body],
    ['with a made-up one', () => `t=${seconds()},v1=00`, (body: string) => body],
  ])('%s is refused and not kept', async (what, signed, sent) => {
    const id = `evt_bad_${what.length}`;
    const body = eventOf(id);
    await post(sent(body), signed(body)).expect(400);
    expect(await kept(id)).toHaveLength(0);
  });

  test('signed 299 seconds ago is still taken; a second signature beside it may be the right one', async () => {
    const old = eventOf('evt_old');
    await post(old, sign(old, seconds() - 299)).expect(200);
    const rotated = eventOf('evt_rotated');
    const right = sign(rotated, seconds());
    await post(rotated, right.replace(',v1=', `,v1=${'0'.repeat(64)},v1=`)).expect(200);
  });

  test('of the other mode is kept as refused, and not worked', async () => {
    const body = eventOf('evt_live', { livemode: true });
    await post(body, sign(body, seconds())).expect(400);
    expect(await kept('evt_live').first('state')).toEqual({ state: 'refused' });
  });

  test('that is too large, or no JSON by its own word, is turned away quickly', async () => {
    const large = eventOf('evt_large', { padding: 'x'.repeat(2_000_000) });
    await post(large, sign(large, seconds())).expect(413);
    await app.agent().post('/webhooks/payments').set('Content-Type', 'text/plain').send('{}').expect(415);
  });
});
