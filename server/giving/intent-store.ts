// The only file that names the table of gift intents: our own row stands before any call is made for it.
import { z } from 'zod';
import { giveFormSchema, type GiveFormFilled } from '#shared/giving/give-schemas.ts';
import type { Pence } from '#shared/money.ts';
import { toPence, type Db, type Trx } from '#server/platform/db.ts';

export const INTENT_STATES = [
  'started',
  'asked',
  'confirming',
  'paid',
  'expired',
  'failed',
  'mismatched',
] as const;
export type IntentState = (typeof INTENT_STATES)[number];

/** The answers as they were when the gift was asked for. */
export const intentAnswersSchema = z.object(giveFormSchema.shape);

const rowSchema = z.object({
  id: z.string(),
  draft_id: z.string().nullable(),
  amount_pence: z.unknown().transform(toPence),
  part_id: z.string().nullable(),
  appeal_wording_id: z.string(),
  declaration_wording_id: z.string().nullable(),
  consent_wording_id: z.string(),
  answers: intentAnswersSchema,
  state: z.enum(INTENT_STATES),
  session_id: z.string().nullable(),
  session_url: z.string().nullable(),
  session_expires_at: z.date().nullable(),
  checked_at: z.date().nullable(),
  created_at: z.date(),
});

export type GiftIntent = {
  id: string;
  draftId: string | null;
  amountPence: Pence;
  partId: string | null;
  appealWordingId: string;
  declarationWordingId: string | null;
  consentWordingId: string;
  answers: GiveFormFilled;
  state: IntentState;
  sessionId: string | null;
  sessionUrl: string | null;
  sessionExpiresAt: Date | null;
  checkedAt: Date | null;
  createdAt: Date;
};

const toIntent = (found: unknown): GiftIntent => {
  const row = rowSchema.parse(found);
  return {
    id: row.id,
    draftId: row.draft_id,
    amountPence: row.amount_pence,
    partId: row.part_id,
    appealWordingId: row.appeal_wording_id,
    declarationWordingId: row.declaration_wording_id,
    consentWordingId: row.consent_wording_id,
    answers: row.answers,
    state: row.state,
    sessionId: row.session_id,
    sessionUrl: row.session_url,
    sessionExpiresAt: row.session_expires_at,
    checkedAt: row.checked_at,
    createdAt: row.created_at,
  };
};

type NewIntent = Pick<
  GiftIntent,
  | 'amountPence'
  | 'partId'
  | 'appealWordingId'
  | 'declarationWordingId'
  | 'consentWordingId'
  | 'answers'
  | 'createdAt'
> & { draftId: string | null };

export async function addIntent(trx: Trx, intent: NewIntent): Promise<GiftIntent> {
  const rows: unknown[] = await trx('gift_intents')
    .insert({
      draft_id: intent.draftId,
      amount_pence: intent.amountPence,
      part_id: intent.partId,
      appeal_wording_id: intent.appealWordingId,
      declaration_wording_id: intent.declarationWordingId,
      consent_wording_id: intent.consentWordingId,
      answers: JSON.stringify(intent.answers),
      created_at: intent.createdAt,
    })
    .returning('*');
  return toIntent(rows[0]);
}

export async function saveSession(
  trx: Trx,
  intentId: string,
  session: { id: string; url: string | null; expiresAt: Date },
): Promise<void> {
  await trx('gift_intents').where({ id: intentId }).whereIn('state', ['started', 'asked']).update({
    session_id: session.id,
    session_url: session.url,
    session_expires_at: session.expiresAt,
    state: 'asked',
  });
}

export async function markIntent(
  trx: Trx,
  intentId: string,
  state: IntentState,
  fault: string | null = null,
): Promise<void> {
  // Once paid it stays paid, whatever is told late.
  await trx('gift_intents')
    .where({ id: intentId })
    .whereNot({ state: 'paid' })
    .update({ state, last_fault: fault });
}

export async function markChecked(trx: Trx, intentId: string, at: Date): Promise<void> {
  await trx('gift_intents').where({ id: intentId }).update({ checked_at: at });
}

export async function findIntent(db: Db, id: string): Promise<GiftIntent | undefined> {
  const row: unknown = await db('gift_intents').where({ id }).first();
  return row === undefined ? undefined : toIntent(row);
}

export async function findIntentBySession(db: Db, sessionId: string): Promise<GiftIntent | undefined> {
  const row: unknown = await db('gift_intents').where({ session_id: sessionId }).first();
  return row === undefined ? undefined : toIntent(row);
}

export async function lockIntent(trx: Trx, id: string): Promise<GiftIntent | undefined> {
  const row: unknown = await trx('gift_intents').where({ id }).forUpdate().first();
  return row === undefined ? undefined : toIntent(row);
}

/** Attempts of a draft that may still be paid, or are being confirmed; the newest first. */
export async function listOpenIntentsOf(db: Db, draftId: string): Promise<GiftIntent[]> {
  const rows: unknown[] = await db('gift_intents')
    .where({ draft_id: draftId })
    .whereIn('state', ['started', 'asked', 'confirming'])
    .orderBy('created_at', 'desc');
  return rows.map(toIntent);
}

/** When a gift of this sum last came from the same sheet, if it came since. */
export async function findLikeGiftSince(
  db: Db,
  draftId: string,
  amountPence: Pence,
  since: Date,
): Promise<Date | undefined> {
  const row = await db('gifts as g')
    .join('gift_intents as i', 'i.id', 'g.intent_id')
    .where({ 'i.draft_id': draftId, 'g.amount_pence': amountPence })
    .where('g.received_at', '>=', since)
    .orderBy('g.received_at', 'desc')
    .first<{ received_at: Date } | undefined>('g.received_at');
  return row?.received_at;
}

/**
 * Open intents that are due a look: a minute after they began, then less and less often, half an hour apart at
 * most. Those not looked at for longest come first, so that none waits behind one that cannot be answered.
 */
export async function listIntentsDue(db: Db, now: Date, limit: number): Promise<GiftIntent[]> {
  const rows: unknown[] = await db('gift_intents')
    .whereIn('state', ['started', 'asked', 'confirming'])
    .where('created_at', '<=', db.raw(`?::timestamptz - interval '1 minute'`, [now]))
    .whereRaw(
      `(checked_at is null or checked_at <= ?::timestamptz
         - least(greatest((?::timestamptz - created_at) / 4, interval '1 minute'), interval '30 minutes'))`,
      [now, now],
    )
    .orderByRaw('checked_at nulls first, created_at')
    .limit(limit);
  return rows.map(toIntent);
}

/** By the id we gave the payment service; anything else that comes back is no intent of ours. */
export async function findIntentByReference(db: Db, reference: string): Promise<GiftIntent | undefined> {
  const id = z.uuid().safeParse(reference);
  return id.success ? findIntent(db, id.data) : undefined;
}
