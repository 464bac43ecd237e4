// Makes the checkout session and its line items as the service would answer them.
import Stripe from 'stripe';
import { newId } from '../state/ids.ts';
import type { SessionRow } from '../state/rows.ts';
import type { CreateSession, LineItemParams } from './session-params.ts';

type Times = { created: number; expiresAt: number };

function toPrice(item: LineItemParams, created: number): Stripe.Price {
  const { price_data: data } = item;
  return {
    id: newId('price'),
    object: 'price',
    active: false,
    billing_scheme: 'per_unit',
    created,
    currency: data.currency,
    custom_unit_amount: null,
    livemode: false,
    lookup_key: null,
    metadata: {},
    nickname: null,
    product: newId('prod'),
    recurring: null,
    tax_behavior: data.tax_behavior ?? 'unspecified',
    tiers_mode: null,
    transform_quantity: null,
    type: 'one_time',
    unit_amount: data.unit_amount,
    unit_amount_decimal: Stripe.Decimal.from(data.unit_amount),
  };
}

const totalOf = (item: LineItemParams): number => item.price_data.unit_amount * (item.quantity ?? 1);

function toLineItem(item: LineItemParams, created: number): Stripe.LineItem {
  return {
    id: newId('li'),
    object: 'item',
    adjustable_quantity: null,
    amount_discount: 0,
    amount_subtotal: totalOf(item),
    amount_tax: 0,
    amount_total: totalOf(item),
    currency: item.price_data.currency,
    description: item.price_data.product_data.name,
    metadata: item.metadata ?? {},
    price: toPrice(item, created),
    quantity: item.quantity ?? 1,
  };
}

export const totalOfItems = (items: readonly LineItemParams[]): number =>
  items.reduce((sum, item) => sum + totalOf(item), 0);

const detailsOf = (email: string | null): Stripe.Checkout.Session.CustomerDetails => ({
  address: null,
  business_name: null,
  email,
  individual_name: null,
  name: null,
  phone: null,
  tax_exempt: 'none',
  tax_ids: null,
});

/** What this kind of session never has. */
const NONE = {
  after_expiration: null,
  allow_promotion_codes: null,
  client_secret: null,
  collected_information: null,
  consent: null,
  consent_collection: null,
  currency_conversion: null,
  customer: null,
  customer_account: null,
  discounts: null,
  invoice: null,
  invoice_creation: null,
  managed_payments: null,
  payment_intent: null,
  payment_link: null,
  payment_method_configuration_details: null,
  permissions: null,
  recovered_from: null,
  saved_payment_method_options: null,
  setup_intent: null,
  shipping_address_collection: null,
  shipping_cost: null,
  subscription: null,
  url: null,
  wallet_options: null,
} as const satisfies Partial<Stripe.Checkout.Session>;

function cardOptionsOf(params: CreateSession): Stripe.Checkout.Session.PaymentMethodOptions {
  const asked = params.payment_method_options?.card?.request_three_d_secure ?? 'automatic';
  return { card: { request_three_d_secure: asked } };
}

function asAsked(params: CreateSession) {
  return {
    adaptive_pricing: { enabled: params.adaptive_pricing?.enabled ?? false },
    allowed_payment_method_types: params.allowed_payment_method_types ?? null,
    billing_address_collection: params.billing_address_collection ?? null,
    cancel_url: params.cancel_url ?? null,
    client_reference_id: params.client_reference_id ?? null,
    custom_text: {
      after_submit: params.custom_text?.after_submit ?? null,
      shipping_address: null,
      submit: params.custom_text?.submit ?? null,
      terms_of_service_acceptance: null,
    },
    customer_creation: params.customer_creation ?? 'if_required',
    customer_email: params.customer_email ?? null,
    integration_identifier: params.integration_identifier ?? null,
    locale: params.locale ?? null,
    metadata: params.metadata ?? {},
    origin_context: params.origin_context ?? null,
    payment_method_options: cardOptionsOf(params),
    submit_type: params.submit_type ?? null,
    success_url: params.success_url,
    ui_mode: params.ui_mode ?? 'hosted_page',
  };
}

function toSession(params: CreateSession, times: Times): Stripe.Checkout.Session {
  const total = totalOfItems(params.line_items);
  return {
    ...NONE,
    ...asAsked(params),
    id: newId('cs_test'),
    object: 'checkout.session',
    amount_subtotal: total,
    amount_total: total,
    automatic_tax: { enabled: false, liability: null, provider: null, status: null },
    created: times.created,
    currency: params.line_items[0]?.price_data.currency ?? null,
    custom_fields: [],
    customer_details: params.customer_email ? detailsOf(params.customer_email) : null,
    expires_at: times.expiresAt,
    livemode: false,
    mode: 'payment',
    payment_method_collection: 'if_required',
    payment_method_types: ['card'],
    payment_status: 'unpaid',
    phone_number_collection: { enabled: false },
    shipping_options: [],
    status: 'open',
    total_details: { amount_discount: 0, amount_shipping: 0, amount_tax: 0 },
  };
}

export function newSession(params: CreateSession, times: Times): SessionRow {
  const data = params.payment_intent_data;
  return {
    session: toSession(params, times),
    lineItems: params.line_items.map((item) => toLineItem(item, times.created)),
    productDescription: params.line_items[0]?.price_data.product_data.description ?? null,
    intentData: {
      description: data?.description ?? null,
      metadata: data?.metadata ?? {},
      receiptEmail: data?.receipt_email ?? null,
      statementSuffix: data?.statement_descriptor_suffix ?? null,
    },
    askedCard: null,
  };
}

/** The session once its card has been given: nothing more is asked on its page. */
export const completed = (
  session: Stripe.Checkout.Session,
  paymentStatus: 'paid' | 'unpaid',
): Stripe.Checkout.Session => ({
  ...session,
  customer_details: session.customer_details ?? detailsOf(null),
  payment_status: paymentStatus,
  status: 'complete',
});
