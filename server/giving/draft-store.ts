// The only file that names the table of drafts: what a giver has typed so far, under an unguessable token.
import { createHash, randomBytes } from 'node:crypto';
import { z } from 'zod';
import type { Db, Trx } from '#server/platform/db.ts';

const TOKEN_BYTES = 32;

export type Draft = { id: string; answers: Record<string, string>; isComplete: boolean };

export const makeToken = (): string => randomBytes(TOKEN_BYTES).toString('base64url');
/** Only the hash is kept, so that a copy of the database opens nobody's draft. */
const hashToken = (token: string): string => createHash('sha256').update(token).digest('hex');

const rowSchema = z.object({
  id: z.string(),
  answers: z.record(z.string(), z.string()),
  is_complete: z.boolean(),
});
const toDraft = (row: unknown): Draft => {
  const draft = rowSchema.parse(row);
  return { id: draft.id, answers: draft.answers, isComplete: draft.is_complete };
};

export async function findDraft(db: Db, token: string | undefined): Promise<Draft | undefined> {
  if (!token) return undefined;
  const row: unknown = await db('give_drafts')
    .where({ token_hash: hashToken(token) })
    .first();
  return row === undefined ? undefined : toDraft(row);
}

export async function lockDraft(trx: Trx, token: string | undefined): Promise<Draft | undefined> {
  if (!token) return undefined;
  const row: unknown = await trx('give_drafts')
    .where({ token_hash: hashToken(token) })
    .forUpdate()
    .first();
  return row === undefined ? undefined : toDraft(row);
}

export async function lockDraftById(trx: Trx, id: string): Promise<Draft | undefined> {
  const row: unknown = await trx('give_drafts').where({ id }).forUpdate().first();
  return row === undefined ? undefined : toDraft(row);
}

export async function keepDraft(
  trx: Trx,
  token: string,
  draft: { answers: Record<string, string>; isComplete: boolean; at: Date },
): Promise<void> {
  await trx('give_drafts')
    .insert({
      token_hash: hashToken(token),
      answers: JSON.stringify(draft.answers),
      is_complete: draft.isComplete,
      begun_at: draft.at,
      updated_at: draft.at,
    })
    .onConflict('token_hash')
    .merge(['answers', 'is_complete', 'updated_at']);
}

/** After a gift the sheet is blank again: the next person at the same screen must not read the last one's answers. */
export async function forgetAnswers(trx: Trx, draftId: string, at: Date): Promise<void> {
  await trx('give_drafts')
    .where({ id: draftId })
    .update({ answers: '{}', is_complete: false, updated_at: at });
}

export async function dropOldDrafts(trx: Trx, before: Date): Promise<number> {
  return trx('give_drafts').where('updated_at', '<', before).delete();
}
