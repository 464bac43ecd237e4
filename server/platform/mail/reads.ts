// What the desk sees of letters: those that are owed a decision, those about one thing, one in full.
import { z } from 'zod';
import { TRIES_TO_TELL } from '#shared/mail-states.ts';
import { queryRows, type Db } from '../db.ts';
import { mailStateSchema } from './outbox-store.ts';

const maybeMoment = z.union([z.date(), z.null()]);

const mailLineSchema = z
  .object({
    id: z.uuid(),
    message_id: z.string(),
    kind: z.string(),
    subject_kind: z.string(),
    subject_id: z.string(),
    to_name: z.string(),
    to_address: z.string(),
    subject: z.string(),
    state: mailStateSchema,
    tries: z.int(),
    next_try_at: maybeMoment,
    handing_over_at: maybeMoment,
    sent_at: maybeMoment,
    response: z.union([z.string(), z.null()]),
    settled_by: z.union([z.uuid(), z.null()]),
    created_at: z.date(),
  })
  .transform((row) => ({
    id: row.id,
    messageId: row.message_id,
    kind: row.kind,
    subjectKind: row.subject_kind,
    subjectId: row.subject_id,
    toName: row.to_name,
    toAddress: row.to_address,
    subject: row.subject,
    state: row.state,
    tries: row.tries,
    nextTryAt: row.next_try_at,
    handingOverAt: row.handing_over_at,
    sentAt: row.sent_at,
    /** The mail server's own words, or ours on why it was not sent. It may repeat the address. */
    response: row.response,
    isSettled: row.settled_by !== null,
    createdAt: row.created_at,
  }));
export type MailLine = z.output<typeof mailLineSchema>;

const COLUMNS = `id, message_id, kind, subject_kind, subject_id, to_name, to_address, subject, state, tries,
  next_try_at, handing_over_at, sent_at, response, settled_by, created_at`;

const WAIT_TO_TELL_MS = 60 * 60_000;
const MOST_OWED = 500;

/**
 * Failed, doubtful or long delayed letters that nobody has decided about, oldest first. `now` is the society's
 * clock, by which letters are dated: one that has waited an hour says that no worker is sending.
 */
export const listOwedMail = (db: Db, now: Date): Promise<MailLine[]> =>
  queryRows(
    db,
    mailLineSchema,
    `select ${COLUMNS} from mail_outbox
     where (state in ('hard_failed','uncertain') and settled_by is null)
        or (state = 'soft_failed' and tries >= ? and settled_by is null)
        or (state in ('queued','claimed') and created_at < ?)
     order by created_at, id limit ?`,
    [TRIES_TO_TELL, new Date(now.getTime() - WAIT_TO_TELL_MS), MOST_OWED],
  );

export const listMailAbout = (db: Db, subjectKind: string, subjectId: string): Promise<MailLine[]> =>
  queryRows(
    db,
    mailLineSchema,
    `select ${COLUMNS} from mail_outbox where subject_kind = ? and subject_id = ? order by created_at, id`,
    [subjectKind, subjectId],
  );
