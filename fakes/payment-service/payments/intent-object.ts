// Makes the payment intent of a session as the service would answer it.
import type Stripe from 'stripe';
import { newId, newSecret } from '../state/ids.ts';
import type { SessionRow } from '../state/rows.ts';
import type { Refusal } from '../test-cards.ts';

export function newIntent({ session, intentData }: SessionRow, created: number): Stripe.PaymentIntent {
  const id = newId('pi');
  return {
    id,
    object: 'payment_intent',
    allowed_payment_method_types: null,
    amount: session.amount_total ?? 0,
    amount_capturable: 0,
    amount_details: { tip: {} },
    amount_received: 0,
    application: null,
    application_fee_amount: null,
    automatic_payment_methods: null,
    canceled_at: null,
    cancellation_reason: null,
    capture_method: 'automatic_async',
    client_secret: newSecret(id),
    confirmation_method: 'automatic',
    created,
    currency: session.currency ?? 'gbp',
    customer: null,
    customer_account: null,
    description: intentData.description,
    excluded_payment_method_types: null,
    last_payment_error: null,
    latest_charge: null,
    livemode: false,
    managed_payments: null,
    metadata: intentData.metadata,
    next_action: null,
    on_behalf_of: null,
    payment_method: null,
    payment_method_configuration_details: null,
    payment_method_options: {
      card: { installments: null, mandate_options: null, network: null, request_three_d_secure: 'automatic' },
    },
    payment_method_types: ['card'],
    payment_record: null,
    processing: null,
    receipt_email: intentData.receiptEmail,
    review: null,
    setup_future_usage: null,
    shipping: null,
    source: null,
    statement_descriptor: null,
    statement_descriptor_suffix: intentData.statementSuffix,
    status: 'requires_payment_method',
    transfer_data: null,
    transfer_group: null,
  };
}

export const refusedIntent = (
  intent: Stripe.PaymentIntent,
  refusal: Refusal,
  chargeId: string | null,
): Stripe.PaymentIntent => ({
  ...intent,
  last_payment_error: {
    ...(chargeId && { charge: chargeId }),
    code: refusal.code,
    decline_code: refusal.declineCode,
    doc_url: `https://stripe.com/docs/error-codes/${refusal.code.replaceAll('_', '-')}`,
    message: refusal.message,
    type: 'card_error',
  },
  latest_charge: chargeId ?? intent.latest_charge,
  next_action: null,
  payment_method: null,
  processing: null,
  status: 'requires_payment_method',
});
