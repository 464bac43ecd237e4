// Where the payment service tells us things: verified on the raw body, kept, and answered at once.
import express, { Router } from 'express';
import type Stripe from 'stripe';
import { z } from 'zod';
import type { Deps } from '#server/deps.ts';
import { AppError, Invalid } from '#server/platform/errors.ts';
import { nudge } from '#server/platform/queue.ts';
import { keepEvent } from './event-store.ts';

const BODY_LIMIT = '512kb';
const objectSchema = z.object({ object: z.string(), id: z.string().default('') });

function verify(deps: Deps, body: unknown, signature: string | undefined): Stripe.Event {
  if (!Buffer.isBuffer(body)) throw new AppError(415, 'invalid', 'Send the event as application/json.');
  try {
    return deps.payments.webhooks.constructEvent(body, signature ?? '', deps.config.payment.webhookSecret);
  } catch {
    throw new Invalid(
      { signature: 'The signature does not fit the body, or is too old.' },
      'This event is not signed for us.',
    );
  }
}

export function createWebhookRouter(deps: Deps): Router {
  const router = Router();
  router.post('/', express.raw({ type: 'application/json', limit: BODY_LIMIT }), async (req, res) => {
    const event = verify(deps, req.body, req.get('stripe-signature'));
    const object = objectSchema.parse(event.data.object);
    const isWrongMode = event.livemode !== (deps.config.mode === 'live');
    await deps.db.transaction(async (trx) => {
      await keepEvent(trx, {
        id: event.id,
        type: event.type,
        objectKind: object.object,
        objectId: object.id,
        happenedAt: new Date(event.created * 1000),
        receivedAt: deps.clock.now(),
        payload: event,
        isRefused: isWrongMode,
        fault: isWrongMode ? 'a test event on a live site, or the other way round' : null,
      });
      await nudge(trx, 'work-payment-events');
    });
    if (isWrongMode)
      throw new Invalid({ livemode: 'This event is for the other mode.' }, 'Kept, but not worked.');
    res.status(200).json({ received: true });
  });
  return router;
}
