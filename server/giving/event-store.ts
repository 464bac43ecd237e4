// The only file that names the inbox of what the payment service told us.
import { z } from 'zod';
import { queryRows, type Trx } from '#server/platform/db.ts';

/** `paymentId` is the payment that the event's object names, and never changes once it does. */
export type InboxEvent = {
  id: string;
  type: string;
  objectId: string;
  paymentId: string | null;
  tries: number;
};

export type NewEvent = {
  id: string;
  type: string;
  objectKind: string;
  objectId: string;
  happenedAt: Date;
  receivedAt: Date;
  payload: unknown;
  isRefused: boolean;
  fault: string | null;
};

/** @returns false when the event is here already: it is told at least once, not once. */
export async function keepEvent(trx: Trx, event: NewEvent): Promise<boolean> {
  const kept = await trx('payment_events')
    .insert({
      id: event.id,
      type: event.type,
      object_kind: event.objectKind,
      object_id: event.objectId,
      happened_at: event.happenedAt,
      received_at: event.receivedAt,
      payload: JSON.stringify(event.payload),
      state: event.isRefused ? 'refused' : 'waiting',
      fault: event.fault,
    })
    .onConflict('id')
    .ignore()
    .returning('id');
  return kept.length > 0;
}

const claimedRow = z.object({
  id: z.string(),
  type: z.string(),
  object_id: z.string(),
  payment_id: z.string().nullable(),
  tries: z.number(),
});

/** Takes waiting events for two minutes by the database's own clock; a dead worker's come free again. */
export async function claimEvents(trx: Trx, limit: number): Promise<InboxEvent[]> {
  const rows = await queryRows(
    trx,
    claimedRow,
    `update payment_events set lease_until = now() + interval '2 minutes', tries = tries + 1
     where id in (
       select id from payment_events
       where state = 'waiting' and (lease_until is null or lease_until < now())
       order by received_at limit ? for update skip locked
     ) returning id, type, object_id, tries, payload #>> '{data,object,payment_intent}' as payment_id`,
    [limit],
  );
  return rows.map((row) => ({
    id: row.id,
    type: row.type,
    objectId: row.object_id,
    paymentId: row.payment_id,
    tries: row.tries,
  }));
}

export async function closeEvent(
  trx: Trx,
  id: string,
  state: 'worked' | 'ignored' | 'refused',
  at: Date,
  fault: string | null = null,
): Promise<void> {
  await trx('payment_events').where({ id }).update({ state, worked_at: at, fault, lease_until: null });
}

/** Leaves the event waiting, to be taken again after a pause that grows with the tries. */
export async function putOffEvent(trx: Trx, event: InboxEvent, fault: string): Promise<void> {
  const seconds = Math.min(2 ** event.tries * 5, 3_600);
  await trx('payment_events')
    .where({ id: event.id })
    .update({ fault, lease_until: trx.raw(`now() + make_interval(secs => ?)`, [seconds]) });
}
