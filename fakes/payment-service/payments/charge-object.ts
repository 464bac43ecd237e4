// Makes a charge, which is one attempt on a card, as the service would answer it.
import { createHash } from 'node:crypto';
import type Stripe from 'stripe';
import { newId } from '../state/ids.ts';
import type { Refusal, TestCard } from '../test-cards.ts';

export type Attempt = {
  intent: Stripe.PaymentIntent;
  card: TestCard;
  created: number;
  email: string | null;
  isAuthenticated: boolean;
  paymentMethod: string;
};

const NO_ADDRESS = { city: null, country: null, line1: null, line2: null, postal_code: null, state: null };
const EXPIRY_YEARS_AHEAD = 4;

/** The same card always has the same mark, and the number cannot be read from it. */
const fingerprintOf = (card: TestCard): string =>
  createHash('sha256').update(card.number).digest('hex').slice(0, 16);

const AUTHENTICATED: Stripe.Charge.PaymentMethodDetails.Card.ThreeDSecure = {
  authentication_flow: 'challenge',
  electronic_commerce_indicator: '05',
  exemption_indicator: null,
  result: 'authenticated',
  result_reason: null,
  transaction_id: null,
  version: '2.2.0',
};

function cardDetails({
  intent,
  card,
  created,
  isAuthenticated,
}: Attempt): Stripe.Charge.PaymentMethodDetails.Card {
  return {
    amount_authorized: intent.amount,
    authorization_code: null,
    brand: 'visa',
    checks: { address_line1_check: null, address_postal_code_check: null, cvc_check: 'pass' },
    country: 'GB',
    electronic_commerce_indicator: null,
    exp_month: 12,
    exp_year: new Date(created * 1000).getUTCFullYear() + EXPIRY_YEARS_AHEAD,
    extended_authorization: { status: 'disabled' },
    fingerprint: fingerprintOf(card),
    funding: 'debit',
    incremental_authorization: { status: 'unavailable' },
    installments: null,
    last4: card.number.slice(-4),
    mandate: null,
    multicapture: { status: 'unavailable' },
    network: 'visa',
    network_token: { used: false },
    network_transaction_id: null,
    overcapture: { maximum_amount_capturable: intent.amount, status: 'unavailable' },
    regulated_status: 'unregulated',
    three_d_secure: isAuthenticated ? AUTHENTICATED : null,
    transaction_link_id: null,
    wallet: null,
  };
}

const NO_ADVICE = { advice_code: null, network_advice_code: null, network_decline_code: null };

const APPROVED: Stripe.Charge.Outcome = {
  ...NO_ADVICE,
  network_status: 'approved_by_network',
  reason: null,
  risk_level: 'normal',
  seller_message: 'Payment complete.',
  type: 'authorized',
};

const refusedOutcome = (refusal: Refusal): Stripe.Charge.Outcome => ({
  ...NO_ADVICE,
  network_status: 'declined_by_network',
  reason: refusal.declineCode,
  risk_level: 'normal',
  seller_message: 'The bank did not return any further details with this decline.',
  type: 'issuer_declined',
});

export function newCharge(attempt: Attempt): Stripe.Charge {
  const { intent } = attempt;
  const id = newId('ch');
  return {
    id,
    object: 'charge',
    amount: intent.amount,
    amount_captured: 0,
    amount_refunded: 0,
    application: null,
    application_fee: null,
    application_fee_amount: null,
    balance_transaction: null,
    billing_details: { address: NO_ADDRESS, email: attempt.email, name: null, phone: null, tax_id: null },
    calculated_statement_descriptor: 'STAND-IN',
    captured: false,
    created: attempt.created,
    currency: intent.currency,
    customer: null,
    description: intent.description,
    disputed: false,
    failure_balance_transaction: null,
    failure_code: null,
    failure_message: null,
    fraud_details: {},
    livemode: false,
    metadata: intent.metadata,
    on_behalf_of: null,
    outcome: null,
    paid: false,
    payment_intent: intent.id,
    payment_method: attempt.paymentMethod,
    payment_method_details: { card: cardDetails(attempt), type: 'card' },
    receipt_email: intent.receipt_email,
    receipt_number: null,
    receipt_url: null,
    refunded: false,
    refunds: { object: 'list', data: [], has_more: false, url: `/v1/charges/${id}/refunds` },
    review: null,
    shipping: null,
    source: null,
    source_transfer: null,
    statement_descriptor: null,
    statement_descriptor_suffix: intent.statement_descriptor_suffix,
    status: 'pending',
    transfer_data: null,
    transfer_group: null,
  };
}

export const paidCharge = (charge: Stripe.Charge): Stripe.Charge => ({
  ...charge,
  amount_captured: charge.amount,
  captured: true,
  outcome: APPROVED,
  paid: true,
  status: 'succeeded',
});

export const failedCharge = (charge: Stripe.Charge, refusal: Refusal): Stripe.Charge => ({
  ...charge,
  failure_code: refusal.code,
  failure_message: refusal.message,
  outcome: refusedOutcome(refusal),
  paid: false,
  status: 'failed',
});
