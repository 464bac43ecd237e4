// The only file that names the outbox table: one row a letter, and every step that a letter can take.
import { z } from 'zod';
import { MAIL_STATES } from '#shared/mail-states.ts';
import { queryRows, toCount, type Db, type Trx } from '../db.ts';

export { MAIL_STATES };
export const mailStateSchema = z.enum(MAIL_STATES);
export type MailState = z.infer<typeof mailStateSchema>;

export type NewLetter = {
  id: string;
  messageId: string;
  kind: string;
  subjectKind: string;
  subjectId: string;
  toName: string;
  toAddress: string;
  subject: string;
  html: string;
  plain: string;
  state: Extract<MailState, 'queued' | 'hard_failed'>;
  response: string | null;
  at: Date;
};

/** False when this letter about this subject is in the outbox already. */
export async function insertLetter(trx: Trx, letter: NewLetter): Promise<boolean> {
  const rows = await trx('mail_outbox')
    .insert({
      id: letter.id,
      message_id: letter.messageId,
      kind: letter.kind,
      subject_kind: letter.subjectKind,
      subject_id: letter.subjectId,
      to_name: letter.toName,
      to_address: letter.toAddress,
      subject: letter.subject,
      html: letter.html,
      plain: letter.plain,
      state: letter.state,
      response: letter.response,
      created_at: letter.at,
    })
    .onConflict(['kind', 'subject_kind', 'subject_id'])
    .ignore()
    .returning<{ id: string }[]>('id');
  return rows.length > 0;
}

const claimedSchema = z
  .object({
    id: z.uuid(),
    message_id: z.string(),
    kind: z.string(),
    to_name: z.string(),
    to_address: z.string(),
    subject: z.string(),
    html: z.string(),
    plain: z.string(),
  })
  .transform((row) => ({
    id: row.id,
    kind: row.kind,
    messageId: row.message_id,
    toName: row.to_name,
    toAddress: row.to_address,
    subject: row.subject,
    html: row.html,
    plain: row.plain,
  }));
export type ClaimedLetter = z.output<typeof claimedSchema>;

const DUE = `(state = 'queued' or (state = 'soft_failed' and next_try_at <= ?))`;

/** Letters whose sender died: claimed ones wait again; one in the server's hands is for a person to judge. */
export async function releaseAbandoned(trx: Trx, now: Date): Promise<void> {
  await trx('mail_outbox')
    .where('state', 'claimed')
    .where('lease_until', '<', now)
    .update({ state: 'queued', lease_until: null });
  await trx('mail_outbox')
    .where('state', 'handing_over')
    .where('lease_until', '<', now)
    .update({ state: 'uncertain', lease_until: null, response: 'The sending broke off before the answer.' });
}

/** Takes the oldest due letters for one sender; another sender at the same moment takes others. */
export function claimDue(
  trx: Trx,
  { now, leaseUntil, limit }: { now: Date; leaseUntil: Date; limit: number },
): Promise<ClaimedLetter[]> {
  return queryRows(
    trx,
    claimedSchema,
    `with due as (
       select id from mail_outbox where ${DUE} order by created_at, id limit ? for update skip locked
     ), taken as (
       update mail_outbox set state = 'claimed', lease_until = ?, next_try_at = null
       where id in (select id from due) returning *
     )
     select * from taken order by created_at, id`,
    [now, limit, leaseUntil],
  );
}

/** One sender's hold on one letter: the lease that it was claimed under. */
export type Hold = { id: string; leaseUntil: Date };

const held = (trx: Trx, { id, leaseUntil }: Hold) =>
  trx('mail_outbox').where({ id, state: 'claimed', lease_until: leaseUntil });

/** The tries so far, this one included; undefined when the hold is no longer ours. */
export async function beginHandOver(
  trx: Trx,
  hold: Hold,
  { now, leaseUntil }: { now: Date; leaseUntil: Date },
): Promise<number | undefined> {
  const [row] = await held(trx, hold)
    .update({
      state: 'handing_over',
      handing_over_at: now,
      lease_until: leaseUntil,
      tries: trx.raw('tries + 1'),
    })
    .returning<{ tries: number }[]>('tries');
  return row?.tries;
}

export async function releaseClaim(trx: Trx, hold: Hold): Promise<void> {
  await held(trx, hold).update({ state: 'queued', lease_until: null });
}

export async function suppressClaim(trx: Trx, hold: Hold, response: string): Promise<void> {
  await held(trx, hold).update({ state: 'suppressed', lease_until: null, response });
}

export type Outcome = {
  state: Extract<MailState, 'sent' | 'soft_failed' | 'hard_failed' | 'uncertain'>;
  response: string;
  sentAt?: Date;
  nextTryAt?: Date;
};

/**
 * Writes down what became of a letter. An answer that came after others had begun to doubt is still the
 * truth, so it also settles `uncertain`, but only for the very hand-over that it answers.
 */
export async function recordOutcome(
  trx: Trx,
  { id, handingOverAt }: { id: string; handingOverAt: Date },
  outcome: Outcome,
): Promise<void> {
  await trx('mail_outbox')
    .where({ id, handing_over_at: handingOverAt })
    .whereIn('state', ['handing_over', 'uncertain'])
    .update({
      state: outcome.state,
      response: outcome.response,
      sent_at: outcome.sentAt ?? null,
      next_try_at: outcome.nextTryAt ?? null,
      lease_until: null,
    });
}

/** Letters that a sender should look at now, those of dead senders included. */
export async function countDueMail(db: Db, now: Date): Promise<number> {
  const [row] = await queryRows(
    db,
    z.object({ due: z.string() }),
    `select count(*) as due from mail_outbox
     where ${DUE} or (state in ('claimed','handing_over') and lease_until < ?)`,
    [now, now],
  );
  return toCount(row?.due);
}
