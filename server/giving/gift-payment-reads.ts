// What the payment service told of one gift, failed tries included. Card payloads hold names: only codes are read.
import { z } from 'zod';
import { queryRows, type Db } from '#server/platform/db.ts';
import type { GiftHead } from './gift-chain-reads.ts';
import { withoutIds } from './payment-handles.ts';

const eventSchema = z.object({
  id: z.string(),
  type: z.string(),
  object_id: z.string(),
  happened_at: z.date(),
  received_at: z.date(),
  state: z.enum(['waiting', 'worked', 'ignored', 'refused']),
  tries: z.int(),
  fault: z.string().nullable().transform(withoutIds),
  reason: z.string().nullable(),
});
export type PaymentEvent = z.output<typeof eventSchema>;

/** Tries of one payment come within days of the sheet; the bound keeps the search of payloads small. */
const SEARCH_DAYS = 3;

/** By the object's own id, and by the client reference for objects that the gift does not name. */
export const listPaymentEvents = (db: Db, head: GiftHead): Promise<PaymentEvent[]> =>
  queryRows(
    db,
    eventSchema,
    `select e.id, e.type, e.object_id, e.happened_at, e.received_at, e.state, e.tries, e.fault,
       coalesce(o.it #>> '{last_payment_error,decline_code}', o.it #>> '{last_payment_error,code}',
         o.it #>> '{outcome,reason}', o.it ->> 'failure_code') as reason
     from payment_events e
     cross join lateral (select coalesce(e.payload #> '{data,object}', e.payload) as it) o
     where e.object_id in (?, ?, ?)
        or (e.received_at between ?::timestamptz - interval '1 day' and ?::timestamptz + make_interval(days => ?)
            and (o.it ->> 'client_reference_id' = ? or o.it ->> 'payment_intent' = ?))
     order by e.happened_at, e.received_at, e.id`,
    [
      head.session_id,
      head.payment_intent_id,
      head.charge_id ?? '',
      head.begun_at,
      head.received_at,
      SEARCH_DAYS,
      head.intent_id,
      head.payment_intent_id,
    ],
  );
