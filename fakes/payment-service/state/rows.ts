// What is kept: the service's own objects as it would answer them, and the few rows that stand behind them.
import type Stripe from 'stripe';
import { z } from 'zod';

/** A stored answer object is trusted once its `object` says what it is: only this program writes the journal. */
const kept = <T>(name: string) =>
  z.custom<T>((value) => z.looseObject({ object: z.literal(name), id: z.string() }).safeParse(value).success);

export const sessionRowSchema = z.object({
  session: kept<Stripe.Checkout.Session>('checkout.session'),
  lineItems: z.array(kept<Stripe.LineItem>('item')),
  productDescription: z.string().nullable(),
  intentData: z.object({
    description: z.string().nullable(),
    metadata: z.record(z.string(), z.string()),
    receiptEmail: z.string().nullable(),
    statementSuffix: z.string().nullable(),
  }),
  /** The test card that waits for the giver's confirmation. */
  askedCard: z.string().nullable(),
});
export type SessionRow = z.infer<typeof sessionRowSchema>;

export const intentSchema = kept<Stripe.PaymentIntent>('payment_intent');
export const chargeSchema = kept<Stripe.Charge>('charge');
export const transactionSchema = kept<Stripe.BalanceTransaction>('balance_transaction');
export const eventSchema = kept<Stripe.EventBase>('event');

/** One event on its way to the webhook. `held` waits to be sent in another order. */
export const deliverySchema = z.object({
  eventId: z.string(),
  state: z.enum(['waiting', 'held', 'delivered', 'dropped']),
  order: z.number(),
  attempts: z.number(),
  copies: z.number(),
  dueAtMs: z.number(),
  lastAnswer: z.string().nullable(),
});
export type Delivery = z.infer<typeof deliverySchema>;

/** Something that happens by itself after a while of real time. */
export const timerSchema = z.object({
  kind: z.enum(['fee', 'confirm']),
  target: z.string(),
  dueAtMs: z.number(),
});
export type Timer = z.infer<typeof timerSchema>;

export const storedAnswerSchema = z.object({
  fingerprint: z.string(),
  status: z.number(),
  body: z.string(),
  createdMs: z.number(),
});

const countSchema = z.union([z.int().min(0), z.literal('all')]);
export const webhookModeSchema = z.object({
  dropNext: countSchema,
  doubleNext: countSchema,
  reorderNext: z.int().min(0),
  delayMs: z.int().min(0),
  paused: z.boolean(),
});
export type WebhookMode = z.infer<typeof webhookModeSchema>;

export const requestModeSchema = z.object({
  latencyMs: z.int().min(0),
  cutNext: z.int().min(0),
  failNext: z.int().min(0),
});

export const settingsSchema = z.object({
  offsetMs: z.number(),
  feeDelayMs: z.int().min(0),
  slowDelayMs: z.int().min(0),
  webhooks: webhookModeSchema,
  requests: requestModeSchema,
});
export type Settings = z.infer<typeof settingsSchema>;
