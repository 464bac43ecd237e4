// What giving owes a person at the desk: words to read, payments that hang, and whom a letter belongs to.
import { z } from 'zod';
import { WORDS_KINDS } from '#shared/giving/desk-schemas.ts';
import { queryRows, toPence, type Db } from '#server/platform/db.ts';
import { INTENT_HANDLE_SQL, withoutIds } from './payment-handles.ts';
import {
  allUnlessWithheld,
  nameOrWithheld,
  unlessWithheld,
  WITHHELD_SQL,
  type Reader,
} from './withheld-names.ts';

const MOST_OWED = 200;
const INTENT_HANGS_AFTER_MS = 60 * 60_000;
const EVENT_HANGS_AFTER_MS = 10 * 60_000;

const unreadSchema = z
  .object({
    id: z.uuid(),
    kind: z.enum(WORDS_KINDS),
    gift_number: z.int(),
    words: z.string().nullable(),
    giver: z.string().nullable(),
    has_contact: z.boolean(),
    written_at: z.date(),
    is_withheld: z.boolean(),
  })
  .transform((row) => ({
    id: row.id,
    kind: row.kind,
    giftNumber: row.gift_number,
    words: row.words,
    giver: nameOrWithheld(row.giver),
    hasContact: row.has_contact,
    writtenAt: row.written_at,
    isWithheld: row.is_withheld,
  }));
export type UnreadWords = z.output<typeof unreadSchema>;

/** Oldest first: what nobody has read yet. */
export const listUnreadWords = (db: Db, reader: Reader): Promise<UnreadWords[]> =>
  queryRows(
    db,
    unreadSchema,
    `select w.id, w.kind, g.number as gift_number, w.contact_email is not null as has_contact, w.written_at,
       ${WITHHELD_SQL} as is_withheld, ${allUnlessWithheld(reader, { words: 'w.words', giver: 's.name' })}
     from public_words w
     join gifts g on g.id = w.gift_id
     join supporters s on s.id = g.supporter_id
     where w.read_at is null order by w.written_at, w.id limit ?`,
    [MOST_OWED],
  );

const intentSchema = z
  .object({
    handle: z.string(),
    state: z.enum(['started', 'asked', 'confirming', 'mismatched']),
    amount_pence: z.unknown().transform(toPence),
    session_id: z.string().nullable(),
    last_fault: z.string().nullable(),
    created_at: z.date(),
    checked_at: z.date().nullable(),
  })
  .transform((row) => ({
    handle: row.handle,
    state: row.state,
    sumPence: row.amount_pence,
    sessionId: row.session_id,
    fault: withoutIds(row.last_fault),
    since: row.created_at,
    checkedAt: row.checked_at,
  }));
export type HangingIntent = z.output<typeof intentSchema>;

const eventSchema = z
  .object({
    id: z.string(),
    type: z.string(),
    object_id: z.string(),
    state: z.enum(['waiting', 'refused']),
    tries: z.int(),
    fault: z.string().nullable(),
    received_at: z.date(),
  })
  .transform((row) => ({
    id: row.id,
    type: row.type,
    objectId: row.object_id,
    state: row.state,
    tries: row.tries,
    fault: withoutIds(row.fault),
    since: row.received_at,
  }));
export type HangingEvent = z.output<typeof eventSchema>;

/**
 * Payments that neither came nor failed, and what the card service told that is still not worked. A card page
 * that its giver left is nothing to do until it has run out and yet nobody was told so.
 */
export async function listHangingPayments(
  db: Db,
  now: Date,
): Promise<{ intents: HangingIntent[]; events: HangingEvent[] }> {
  const hourAgo = new Date(now.getTime() - INTENT_HANGS_AFTER_MS);
  const [intents, events] = await Promise.all([
    queryRows(
      db,
      intentSchema,
      `select ${INTENT_HANDLE_SQL} as handle, state, amount_pence, session_id, last_fault, created_at, checked_at
       from gift_intents
       where settled_at is null and (
         state = 'mismatched'
         or (state in ('started', 'confirming') and created_at < ?)
         or (state = 'asked' and coalesce(session_expires_at < ?, created_at < ?)))
       order by created_at limit ?`,
      [hourAgo, now, hourAgo, MOST_OWED],
    ),
    queryRows(
      db,
      eventSchema,
      `select id, type, object_id, state, tries, fault, received_at from payment_events
       where settled_at is null and (state = 'refused' or (state = 'waiting' and received_at < ?))
       order by received_at limit ?`,
      [new Date(now.getTime() - EVENT_HANGS_AFTER_MS), MOST_OWED],
    ),
  ]);
  return { intents, events };
}

const subjectSchema = z
  .object({
    subject_id: z.string(),
    number: z.int(),
    amount_pence: z.unknown().transform(toPence),
    giver: z.string().nullable(),
    is_withheld: z.boolean(),
  })
  .transform((row) => ({
    subjectId: row.subject_id,
    giftNumber: row.number,
    sumPence: row.amount_pence,
    giver: nameOrWithheld(row.giver),
    isWithheld: row.is_withheld,
  }));
export type LetterSubject = z.output<typeof subjectSchema>;

/** Which gift each letter is about: its subject is the gift itself or words that came with it. */
export const listLetterSubjects = (
  db: Db,
  subjectIds: readonly string[],
  reader: Reader,
): Promise<LetterSubject[]> =>
  queryRows(
    db,
    subjectSchema,
    `select x.subject_id, g.number, g.amount_pence, ${unlessWithheld(reader, 's.name')} as giver,
       ${WITHHELD_SQL} as is_withheld
     from unnest(?::text[]) as x (subject_id)
     left join public_words w on w.id::text = x.subject_id
     join gifts g on g.id::text = x.subject_id or g.id = w.gift_id
     join supporters s on s.id = g.supporter_id`,
    [[...subjectIds]],
  );
