// /v1/payment_intents: read one, list them. They are made and moved by checkout sessions alone.
import { z } from 'zod';
import { presentIntent } from '../payments/present.ts';
import type { Service } from '../service.ts';
import { missing } from './api-errors.ts';
import type { Call } from './endpoint.ts';
import { created, isWithin, readParams } from './form-encoding.ts';
import { pageFields, toPage } from './lists.ts';

const nothing = z.strictObject({ client_secret: z.string().optional() });
const listSchema = z.strictObject({ ...pageFields, created: created.optional() });

export function getIntent(service: Service, call: Call) {
  readParams(nothing, call.params);
  const intent = presentIntent(service, call.id);
  if (!intent) throw missing('payment_intent', call.id);
  return intent;
}

export function listIntents(service: Service, call: Call) {
  const { created: window, ...page } = readParams(listSchema, call.params);
  const intents = service.store.intents
    .list()
    .filter((intent) => isWithin(intent.created, window))
    .map((intent) => presentIntent(service, intent.id) ?? intent);
  return toPage(intents, page, '/v1/payment_intents');
}
