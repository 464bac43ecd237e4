// Posts the card fee of a gift once its balance transaction has come; it comes later than the payment.
import type Stripe from 'stripe';
import { pence } from '#shared/money.ts';
import { recordAudit } from '#server/accounts/index.ts';
import { getFund, postCardFee } from '#server/books/index.ts';
import type { Deps } from '#server/deps.ts';
import { checked } from '#server/platform/payments.ts';
import { getGivingSettings } from '#server/society/index.ts';
import { listShares, lockGiftByPayment, saveFee } from './gift-store.ts';

/** @returns true when the fee is posted, now or before. */
export async function postFeeOfPayment(deps: Deps, payment: Stripe.PaymentIntent): Promise<boolean> {
  const charge = payment.latest_charge;
  if (charge === null || typeof charge !== 'object') return false;
  const balance = charge.balance_transaction;
  if (balance === null || typeof balance !== 'object' || balance.currency !== 'gbp') return false;
  const settings = await getGivingSettings(deps.db, deps.clock.now());
  const at = deps.clock.now();
  return deps.db.transaction(async (trx) => {
    const gift = await lockGiftByPayment(trx, payment.id);
    if (!gift) return false;
    if (gift.isFeePosted) return true;
    const feePence = pence(balance.fee);
    const bornByFundId = settings.cardFeeFundSlug ? (await getFund(trx, settings.cardFeeFundSlug)).id : null;
    await postCardFee(
      trx,
      { giftId: gift.id, at: new Date(balance.created * 1000), recordedAt: at },
      { feePence, shares: await listShares(trx, gift.id), bornByFundId },
    );
    await saveFee(trx, gift.id, { feePence, balanceTransactionId: balance.id, chargeId: charge.id, at });
    await recordAudit(trx, {
      at,
      actor: { kind: 'system' },
      action: 'card-fee-posted',
      objectKind: 'gift',
      objectId: gift.id,
      detail: { feePence },
    });
    return true;
  });
}

export async function fetchPayment(deps: Deps, paymentIntentId: string): Promise<Stripe.PaymentIntent> {
  const payment = await deps.payments.paymentIntents.retrieve(paymentIntentId, {
    expand: ['latest_charge.balance_transaction'],
  });
  return checked(payment, 'payment_intent', paymentIntentId);
}
