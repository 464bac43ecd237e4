// Starts the payment stand-in for a test, with a receiver of its webhooks that keeps what came.
import { mkdtemp, rm } from 'node:fs/promises';
import { createServer } from 'node:http';
import type { IncomingMessage } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { text } from 'node:stream/consumers';
import { setTimeout as wait } from 'node:timers/promises';
import Stripe from 'stripe';
import { startPaymentService } from '#fakes/payment-service/start-payment-service.ts';

export const KEY = 'sk_test_brackenhythe';
export const SECRET = 'whsec_brackenhythe';

export type Received = { body: string; signature: string };
export type Receiver = { url: string; received: Received[]; answer: number; stop(): Promise<void> };

async function startReceiver(): Promise<Receiver> {
  const receiver: Receiver = { url: '', received: [], answer: 200, stop: () => Promise.resolve() };
  const take = async (req: IncomingMessage): Promise<number> => {
    const body = await text(req);
    receiver.received.push({ body, signature: String(req.headers['stripe-signature']) });
    return receiver.answer;
  };
  const server = createServer((req, res) => {
    void take(req).then((status) => res.writeHead(status).end());
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  if (typeof address !== 'object' || address === null) throw new Error('the receiver is not listening');
  receiver.url = `http://127.0.0.1:${address.port}/webhook`;
  receiver.stop = () =>
    new Promise((resolve) => {
      server.close(() => resolve());
      server.closeAllConnections();
    });
  return receiver;
}

export function sdkFor(apiUrl: string, more: { key?: string; maxNetworkRetries?: number } = {}): Stripe {
  const { hostname, port } = new URL(apiUrl);
  return new Stripe(more.key ?? KEY, {
    host: hostname,
    port,
    protocol: 'http',
    maxNetworkRetries: more.maxNetworkRetries ?? 2,
    telemetry: false,
    timeout: 10_000,
  });
}

export async function startStandIn() {
  const stateFolder = await mkdtemp(join(tmpdir(), 'payment-service-'));
  const receiver = await startReceiver();
  const options = { key: KEY, stateFolder, webhook: { url: receiver.url, secret: SECRET } };
  const first = await startPaymentService(options);
  const standIn = {
    ...first,
    stripe: sdkFor(first.apiUrl),
    receiver,
    options,
    /** Moves a control and gives its answer. */
    async control(path: string, body?: object): Promise<unknown> {
      const response = await fetch(`${standIn.controlUrl}${path}`, {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify(body ?? {}),
      });
      if (!response.ok) throw new Error(`${path} answered ${response.status}: ${await response.text()}`);
      return response.json();
    },
    async restart(): Promise<void> {
      await standIn.stop();
      const again = await startPaymentService(options);
      Object.assign(standIn, again, { stripe: sdkFor(again.apiUrl) });
    },
    async tearDown(): Promise<void> {
      await standIn.stop();
      await receiver.stop();
      await rm(stateFolder, { recursive: true });
    },
  };
  return standIn;
}
export type StandIn = Awaited<ReturnType<typeof startStandIn>>;

let gifts = 0;
export function giftOf(amount: number, more: Partial<Stripe.Checkout.SessionCreateParams> = {}) {
  gifts += 1;
  const id = `gift-${gifts}`;
  const params: Stripe.Checkout.SessionCreateParams = {
    mode: 'payment',
    line_items: [
      { quantity: 1, price_data: { currency: 'gbp', unit_amount: amount, product_data: { name: 'A gift' } } },
    ],
    success_url: 'http://127.0.0.1:9/give/thanks?session={CHECKOUT_SESSION_ID}',
    cancel_url: 'http://127.0.0.1:9/give/check',
    client_reference_id: id,
    metadata: { gift: id },
    payment_intent_data: { metadata: { gift: id }, description: 'A gift towards the Lampwoman' },
    ...more,
  };
  return params;
}

/** A gift of £20 that was paid with the card, by the controls. */
export async function payGift(standIn: StandIn, card?: string, more: { confirm?: boolean } = {}) {
  const session = await standIn.stripe.checkout.sessions.create(giftOf(2000));
  await standIn.control(`/sessions/${session.id}/pay`, { ...(card && { card }), ...more });
  return standIn.stripe.checkout.sessions.retrieve(session.id, {
    expand: ['payment_intent.latest_charge.balance_transaction'],
  });
}

export function intentOf(session: Stripe.Checkout.Session): Stripe.PaymentIntent {
  if (typeof session.payment_intent !== 'object' || session.payment_intent === null)
    throw new Error('the payment intent was not expanded');
  return session.payment_intent;
}

export function chargeOf(session: Stripe.Checkout.Session): Stripe.Charge {
  const charge = intentOf(session).latest_charge;
  if (typeof charge !== 'object' || charge === null) throw new Error('the charge was not expanded');
  return charge;
}

export const typesIn = ({ received }: Receiver): string[] =>
  received.map(
    ({ body, signature }) => new Stripe(KEY).webhooks.constructEvent(body, signature, SECRET).type,
  );

export async function until(isSo: () => boolean | Promise<boolean>, patienceMs = 5000): Promise<void> {
  const end = Date.now() + patienceMs;
  while (!(await isSo())) {
    if (Date.now() > end) throw new Error(`it did not become so: ${isSo.toString()}`);
    await wait(20);
  }
}
