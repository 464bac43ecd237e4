// The stand-in's answers beside the payment service's own published example objects (its open API description, MIT).
import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { chargeOf, giftOf, intentOf, payGift, startStandIn } from '#tests/payment-service/stand-in.ts';
import type { StandIn } from '#tests/payment-service/stand-in.ts';
import { findShared } from '#tests/support/shared-facts.ts';

const path = findShared('facts/payment-service/fixtures3.json');
const isThere = path !== undefined;

const exampleSchema = z.record(z.string(), z.unknown());
const examples = isThere
  ? z.object({ resources: z.record(z.string(), exampleSchema) }).parse(JSON.parse(readFileSync(path, 'utf8')))
      .resources
  : {};

function kindOf(value: unknown): string {
  if (value === null) return 'null';
  return Array.isArray(value) ? 'array' : typeof value;
}

/** Every key of the example must stand in the answer, as the same kind of JSON value or as null. */
function differences(example: unknown, answer: unknown, at: string): string[] {
  if (answer === undefined) return [`${at} is missing`];
  if (answer === null || example === null) return [];
  if (kindOf(example) !== kindOf(answer)) return [`${at} is ${kindOf(answer)}, not ${kindOf(example)}`];
  if (Array.isArray(example) && Array.isArray(answer))
    return example.length > 0 && answer.length > 0 ? differences(example[0], answer[0], `${at}[0]`) : [];
  const [keys, values] = [exampleSchema.safeParse(example), exampleSchema.safeParse(answer)];
  if (!keys.success || !values.success) return [];
  return Object.entries(keys.data).flatMap(([key, value]) =>
    differences(value, values.data[key], `${at}.${key}`),
  );
}

/** The answer as it came over the wire: the SDK adds to its own copies. */
const read = async (standIn: StandIn, address: string): Promise<unknown> => {
  const response = await fetch(`${standIn.apiUrl}${address}`, {
    headers: { authorization: `Bearer ${standIn.options.key}` },
  });
  expect(response.status).toBe(200);
  return response.json();
};

/** What an event is about is whatever happened; the example shows a plan. */
const withoutSubject = (event: unknown) => ({ ...exampleSchema.parse(event), data: { object: {} } });

describe.skipIf(!isThere)('the published example', () => {
  let standIn: StandIn;
  let addresses: Record<string, string>;
  beforeAll(async () => {
    standIn = await startStandIn();
    const paid = await payGift(standIn);
    await standIn.control('/fees/settle');
    const open = await standIn.stripe.checkout.sessions.create(
      giftOf(2000, { customer_email: 'nell@hythe.example' }),
    );
    const refused = await payGift(standIn, '4000000000000002');
    const asked = await payGift(standIn, '4000002500003155');
    const slow = await payGift(standIn, '4000009900000012');
    const charge = await standIn.stripe.charges.retrieve(chargeOf(paid).id);
    const [transaction] = (await standIn.stripe.balanceTransactions.list({ source: charge.id })).data;
    const [event] = (await standIn.stripe.events.list({ limit: 1 })).data;
    addresses = {
      'checkout.session paid': `/v1/checkout/sessions/${paid.id}`,
      'checkout.session open': `/v1/checkout/sessions/${open.id}`,
      'payment_intent paid': `/v1/payment_intents/${intentOf(paid).id}`,
      'payment_intent refused': `/v1/payment_intents/${intentOf(refused).id}`,
      'payment_intent asked': `/v1/payment_intents/${intentOf(asked).id}`,
      'payment_intent slow': `/v1/payment_intents/${intentOf(slow).id}`,
      'charge paid': `/v1/charges/${charge.id}`,
      'charge refused': `/v1/charges/${chargeOf(refused).id}`,
      'charge slow': `/v1/charges/${chargeOf(slow).id}`,
      'balance_transaction paid': `/v1/balance_transactions/${transaction?.id}`,
      'event newest': `/v1/events/${event?.id}`,
      'balance now': '/v1/balance',
    };
  });
  afterAll(() => standIn.tearDown());

  it.each([
    'checkout.session paid',
    'checkout.session open',
    'payment_intent paid',
    'payment_intent refused',
    'payment_intent asked',
    'payment_intent slow',
    'charge paid',
    'charge refused',
    'charge slow',
    'balance_transaction paid',
    'event newest',
    'balance now',
  ])('of %s has no key that the stand-in lacks', async (name) => {
    const resource = name.split(' ')[0] ?? '';
    const example = examples[resource];
    expect(example).toBeDefined();
    const answer = await read(standIn, addresses[name] ?? '');
    const [left, right] =
      resource === 'event' ? [withoutSubject(example), withoutSubject(answer)] : [example, answer];
    expect(differences(left, right, resource)).toEqual([]);
  });

  it('of a line item has no key that the stand-in lacks', async () => {
    const [session] = (await standIn.stripe.checkout.sessions.list({ limit: 1 })).data;
    const list = await read(standIn, `/v1/checkout/sessions/${session?.id}/line_items`);
    const item = z.object({ data: z.array(exampleSchema) }).parse(list).data[0];
    expect(differences(examples.item, item, 'item')).toEqual([]);
  });
});

it.runIf(!isThere)(
  'the published example objects are absent here, so the answers are not compared with them',
  () => {
    expect(isThere).toBe(false);
  },
);
