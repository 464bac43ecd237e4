// /v1/charges: read one, list them.
import { z } from 'zod';
import type { Service } from '../service.ts';
import { missing } from './api-errors.ts';
import type { Call } from './endpoint.ts';
import { created, isWithin, readParams, text } from './form-encoding.ts';
import { pageFields, toPage } from './lists.ts';

const nothing = z.strictObject({});
const listSchema = z.strictObject({
  ...pageFields,
  created: created.optional(),
  payment_intent: text().optional(),
});

export function getCharge(service: Service, call: Call) {
  readParams(nothing, call.params);
  const charge = service.store.charges.find(call.id);
  if (!charge) throw missing('charge', call.id);
  return charge;
}

export function listCharges(service: Service, call: Call) {
  const { created: window, payment_intent: intent, ...page } = readParams(listSchema, call.params);
  const charges = service.store.charges
    .list()
    .filter((charge) => isWithin(charge.created, window))
    .filter((charge) => !intent || charge.payment_intent === intent);
  return toPage(charges, page, '/v1/charges');
}
