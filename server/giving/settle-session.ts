// Asks the payment service how a session stands and brings our own rows up to it. Safe to repeat at any time.
import type Stripe from 'stripe';
import { pence } from '#shared/money.ts';
import type { Deps } from '#server/deps.ts';
import { Upstream } from '#server/platform/errors.ts';
import { checked } from '#server/platform/payments.ts';
import { lockIntent, markChecked, markIntent, type GiftIntent } from './intent-store.ts';
import { postFeeOfPayment } from './fee-service.ts';
import { receiveGift, type PaidSession } from './receive-gift.ts';

const paymentOf = (session: Stripe.Checkout.Session): Stripe.PaymentIntent | null =>
  typeof session.payment_intent === 'object' ? session.payment_intent : null;
const chargeOf = (payment: Stripe.PaymentIntent | null): Stripe.Charge | null =>
  payment && typeof payment.latest_charge === 'object' ? payment.latest_charge : null;

/** @throws Upstream when the payment service is away or answers what we cannot read. */
export async function fetchSession(deps: Deps, sessionId: string): Promise<Stripe.Checkout.Session> {
  try {
    const session = await deps.payments.checkout.sessions.retrieve(sessionId, {
      expand: ['payment_intent.latest_charge.balance_transaction'],
    });
    return checked(session, 'checkout.session', sessionId);
  } catch (error) {
    throw toUpstream(deps, error);
  }
}

function toUpstream(deps: Deps, error: unknown): unknown {
  if (!(error instanceof deps.payments.errors.StripeError)) return error;
  deps.log.warn({ err: error }, 'the card service did not answer as asked');
  return new Upstream();
}

/** Closes a card page that nobody may pay any more; when it is past closing, says how it stands. */
export async function expireSession(deps: Deps, sessionId: string): Promise<Stripe.Checkout.Session> {
  try {
    return checked(await deps.payments.checkout.sessions.expire(sessionId), 'checkout.session', sessionId);
  } catch (error) {
    if (!(error instanceof deps.payments.errors.StripeInvalidRequestError)) throw toUpstream(deps, error);
    return fetchSession(deps, sessionId);
  }
}

function paidPart(deps: Deps, session: Stripe.Checkout.Session): PaidSession | null {
  const payment = paymentOf(session);
  if (session.payment_status !== 'paid' || !payment) return null;
  const charge = chargeOf(payment);
  return {
    sessionId: session.id,
    paymentIntentId: payment.id,
    chargeId: charge?.id ?? null,
    // What was asked and what was truly received, each with its own currency; a payer may be shown another.
    amountsPence: [pence(payment.amount_received), pence(session.amount_total ?? -1)],
    currencies: [payment.currency, session.currency ?? 'none'],
    paidAt: charge ? new Date(charge.created * 1000) : deps.clock.now(),
  };
}

async function markUnpaid(deps: Deps, intent: GiftIntent, session: Stripe.Checkout.Session): Promise<void> {
  await deps.db.transaction(async (trx) => {
    const locked = await lockIntent(trx, intent.id);
    if (!locked || locked.state === 'paid' || locked.state === 'mismatched') return;
    await markChecked(trx, intent.id, deps.clock.now());
    if (session.status === 'expired') await markIntent(trx, intent.id, 'expired');
    else if (session.status === 'complete') {
      const hasFailed =
        paymentOf(session)?.status === 'requires_payment_method' || paymentOf(session)?.status === 'canceled';
      await markIntent(trx, intent.id, hasFailed ? 'failed' : 'confirming');
    }
  });
}

/** Brings the intent up to its session: a gift when it is paid, its true state when it is not. */
export async function settleSession(
  deps: Deps,
  intent: GiftIntent,
  session: Stripe.Checkout.Session,
): Promise<void> {
  if (session.client_reference_id !== intent.id) {
    await deps.db.transaction((trx) =>
      markIntent(trx, intent.id, 'mismatched', 'the session names another gift'),
    );
    return;
  }
  const paid = paidPart(deps, session);
  if (!paid) return markUnpaid(deps, intent, session);
  await deps.db.transaction(async (trx) => {
    await receiveGift(deps, trx, intent.id, paid);
    await markChecked(trx, intent.id, deps.clock.now());
  });
  const payment = paymentOf(session);
  if (payment) await postFeeOfPayment(deps, payment);
}
