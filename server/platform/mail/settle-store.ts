// Reads and changes one outbox row for the person who decides about it.
import { z } from 'zod';
import type { Trx } from '../db.ts';
import { mailStateSchema, type MailState } from './outbox-store.ts';

const openLetterSchema = z
  .object({
    kind: z.string(),
    subject_kind: z.string(),
    subject_id: z.string(),
    to_address: z.string(),
    state: mailStateSchema,
    settled_by: z.union([z.uuid(), z.null()]),
  })
  .transform((row) => ({
    kind: row.kind,
    subjectKind: row.subject_kind,
    subjectId: row.subject_id,
    toAddress: row.to_address,
    state: row.state,
    isSettled: row.settled_by !== null,
  }));

export async function lockLetter(
  trx: Trx,
  id: string,
): Promise<z.output<typeof openLetterSchema> | undefined> {
  const row: unknown = await trx('mail_outbox').where({ id }).forUpdate().first();
  return row === undefined ? undefined : openLetterSchema.parse(row);
}

/** Without `settledBy` the letter begins afresh: its tries and waits are forgotten. */
export async function updateSettled(
  trx: Trx,
  id: string,
  change: { state: MailState; settledBy?: string },
): Promise<void> {
  const afresh = { tries: 0, response: null, handing_over_at: null };
  await trx('mail_outbox')
    .where({ id })
    .update({
      state: change.state,
      settled_by: change.settledBy ?? null,
      next_try_at: null,
      lease_until: null,
      ...(change.settledBy ? {} : afresh),
    });
}
