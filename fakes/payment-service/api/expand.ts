// Fills in objects where ids stand, when the caller asks for it with `expand`.
import { presentIntent, presentTransaction } from '../payments/present.ts';
import type { Service } from '../service.ts';
import { invalid } from './api-errors.ts';

type Loose = Record<string, unknown>;
type Fill = (service: Service, id: string) => object | undefined;

const intent: Fill = (service, id) => presentIntent(service, id);
const charge: Fill = (service, id) => service.store.charges.find(id);
const transaction: Fill = (service, id) => presentTransaction(service, id);

/** What may be expanded, by the kind of object; each later kind adds its line here. */
const EXPANDABLE: Record<string, Record<string, Fill>> = {
  'checkout.session': { payment_intent: intent },
  payment_intent: { latest_charge: charge },
  charge: { balance_transaction: transaction, payment_intent: intent },
  balance_transaction: { source: charge },
};

function lineItemsOf(service: Service, object: Loose): object {
  const id = String(object.id);
  const data = service.store.sessions.find(id)?.lineItems ?? [];
  return { object: 'list', data, has_more: false, url: `/v1/checkout/sessions/${id}/line_items` };
}

function childOf(service: Service, object: Loose, name: string, path: string): object | undefined {
  const current = object[name];
  if (typeof current === 'object' && current !== null) return current;
  if (object.object === 'checkout.session' && name === 'line_items') return lineItemsOf(service, object);
  const fill = EXPANDABLE[String(object.object)]?.[name];
  if (!fill) throw invalid(`This property cannot be expanded (${path}).`, { param: 'expand' });
  return typeof current === 'string' ? fill(service, current) : undefined;
}

function expandPath(service: Service, object: Loose, steps: readonly string[], path: string): Loose {
  const [name, ...rest] = steps;
  if (name === undefined) return object;
  const { data } = object;
  if (object.object === 'list' && name === 'data' && Array.isArray(data))
    return { ...object, data: data.map((one: object) => expandPath(service, { ...one }, rest, path)) };
  const child = childOf(service, object, name, path);
  return child ? { ...object, [name]: expandPath(service, { ...child }, rest, path) } : object;
}

export function expand(service: Service, object: object, paths: readonly string[]): object {
  return paths.reduce<Loose>(
    (whole, path) => {
      const steps = path.split('.');
      if (steps.filter((step) => step !== 'data').length > 4)
        throw invalid(`You cannot expand more than 4 levels of a property (${path}).`, { param: 'expand' });
      return expandPath(service, whole, steps, path);
    },
    { ...object },
  );
}
