// What a new checkout session may be asked for. What the stand-in cannot do is refused by name, never passed over.
import { z } from 'zod';
import { integer, metadata, text, truth, webAddress } from '../api/form-encoding.ts';

const currency = text(3).transform((code) => code.toLowerCase());
const off = z.enum(['false']);

const productData = z.strictObject({
  name: text(),
  description: text().optional(),
  images: z.array(webAddress).max(8).optional(),
  metadata: metadata.optional(),
});
const lineItem = z.strictObject({
  price_data: z.strictObject({
    currency,
    unit_amount: integer,
    product_data: productData,
    tax_behavior: z.enum(['exclusive', 'inclusive', 'unspecified']).optional(),
  }),
  quantity: integer.optional(),
  metadata: metadata.optional(),
});
export type LineItemParams = z.infer<typeof lineItem>;

const words = z.strictObject({ message: text(1200) }).optional();

export const createSessionSchema = z.strictObject({
  mode: z.enum(['payment'], 'the stand-in takes single payments only; must be payment'),
  line_items: z.array(lineItem).min(1).max(100),
  success_url: webAddress,
  cancel_url: webAddress.optional(),
  client_reference_id: text(200).optional(),
  customer_email: z.email().max(800).optional(),
  customer_creation: z.enum(['if_required']).optional(),
  expires_at: integer.optional(),
  metadata: metadata.optional(),
  payment_intent_data: z
    .strictObject({
      description: text(1000).optional(),
      metadata: metadata.optional(),
      receipt_email: text(800).optional(),
      statement_descriptor_suffix: text(22).optional(),
      capture_method: z.enum(['automatic', 'automatic_async']).optional(),
    })
    .optional(),
  submit_type: z.enum(['auto', 'book', 'donate', 'pay']).optional(),
  locale: text(10).optional(),
  currency: currency.optional(),
  ui_mode: z.enum(['hosted_page']).optional(),
  allowed_payment_method_types: z
    .array(z.enum(['card']))
    .max(1)
    .optional(),
  payment_method_options: z
    .strictObject({
      card: z
        .strictObject({ request_three_d_secure: z.enum(['any', 'automatic', 'challenge']).optional() })
        .optional(),
    })
    .optional(),
  billing_address_collection: z.enum(['auto']).optional(),
  custom_text: z.strictObject({ submit: words, after_submit: words }).optional(),
  origin_context: z.enum(['web', 'mobile_app']).optional(),
  integration_identifier: text(200).optional(),
  // Things that a caller may switch off by name; switched on, each would need a part that is not here.
  adaptive_pricing: z.strictObject({ enabled: truth.optional() }).optional(),
  allow_promotion_codes: off.optional(),
  automatic_tax: z.strictObject({ enabled: off }).optional(),
  invoice_creation: z.strictObject({ enabled: off }).optional(),
  phone_number_collection: z.strictObject({ enabled: off }).optional(),
});
export type CreateSession = z.infer<typeof createSessionSchema>;
