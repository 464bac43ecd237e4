// Small questions to the payment service about one of its objects.
import type { Deps } from '#server/deps.ts';
import { checked } from '#server/platform/payments.ts';

/** The payment a charge belongs to; null for a charge that stands alone. */
export async function paymentOfCharge(deps: Deps, chargeId: string): Promise<string | null> {
  const charge = checked(await deps.payments.charges.retrieve(chargeId), 'charge', chargeId);
  return typeof charge.payment_intent === 'string'
    ? charge.payment_intent
    : (charge.payment_intent?.id ?? null);
}
