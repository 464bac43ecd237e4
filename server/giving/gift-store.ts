// The only file that names the tables of gifts, their shares and the words that came with them.
import { randomBytes } from 'node:crypto';
import { z } from 'zod';
import type { NAME_CHOICES } from '#shared/giving/give-schemas.ts';
import { dayOf } from '#shared/dates.ts';
import type { Pence } from '#shared/money.ts';
import { toPence, type Db, type Trx } from '#server/platform/db.ts';

const RECEIPT_TOKEN_BYTES = 24;

export type GiftShare = { partId: string | null; fundId: string; amountPence: Pence };

export type NewGift = {
  intentId: string;
  supporterId: string;
  appealWordingId: string;
  fundId: string;
  amountPence: Pence;
  partId: string | null;
  declarationId: string | null;
  nameShown: (typeof NAME_CHOICES)[number];
  sessionId: string;
  paymentIntentId: string;
  chargeId: string | null;
  receivedAt: Date;
  shares: readonly GiftShare[];
};

export async function addGift(trx: Trx, gift: NewGift): Promise<string> {
  const [row] = await trx('gifts')
    .insert({
      receipt_token: randomBytes(RECEIPT_TOKEN_BYTES).toString('base64url'),
      intent_id: gift.intentId,
      supporter_id: gift.supporterId,
      appeal_wording_id: gift.appealWordingId,
      fund_id: gift.fundId,
      method: 'card',
      amount_pence: gift.amountPence,
      part_id: gift.partId,
      declaration_id: gift.declarationId,
      name_shown: gift.nameShown,
      session_id: gift.sessionId,
      payment_intent_id: gift.paymentIntentId,
      charge_id: gift.chargeId,
      received_at: gift.receivedAt,
      received_on: dayOf(gift.receivedAt),
    })
    .returning<{ id: string }[]>('id');
  if (!row) throw new Error('the gift was not written');
  await trx('gift_shares').insert(
    gift.shares.map((one) => ({
      gift_id: row.id,
      part_id: one.partId,
      fund_id: one.fundId,
      amount_pence: one.amountPence,
    })),
  );
  return row.id;
}

export type NewWords = {
  kind: 'wall-name' | 'memory' | 'honour' | 'message';
  words: string;
  contactName?: string;
  contactEmail?: string;
  mayTellSum?: boolean;
};

export async function addWords(
  trx: Trx,
  giftId: string,
  words: readonly NewWords[],
  at: Date,
): Promise<void> {
  if (words.length === 0) return;
  await trx('public_words').insert(
    words.map((one) => ({
      gift_id: giftId,
      kind: one.kind,
      words: one.words,
      contact_name: one.contactName || null,
      contact_email: one.contactEmail || null,
      may_tell_sum: one.mayTellSum ?? false,
      written_at: at,
    })),
  );
}

export async function findGiftIdOfIntent(db: Db, intentId: string): Promise<string | undefined> {
  const row = await db('gifts').where({ intent_id: intentId }).first<{ id: string } | undefined>('id');
  return row?.id;
}

export async function findGiftIdByReceipt(db: Db, receiptToken: string): Promise<string | undefined> {
  const row = await db('gifts')
    .where({ receipt_token: receiptToken })
    .first<{ id: string } | undefined>('id');
  return row?.id;
}

const keysRow = z.object({ intent_id: z.string(), receipt_token: z.string(), number: z.number() });
export type GiftKeys = { intentId: string; receiptToken: string; number: number };

/** What leads from a gift to its intent, its receipt and its place in the ledger. */
export async function getGiftKeys(db: Db, giftId: string): Promise<GiftKeys> {
  const row = keysRow.parse(
    await db('gifts').where({ id: giftId }).first('intent_id', 'receipt_token', 'number'),
  );
  return { intentId: row.intent_id, receiptToken: row.receipt_token, number: row.number };
}

const feeRow = z.object({
  id: z.string(),
  payment_intent_id: z.string(),
  fee_posted_at: z.date().nullable(),
});

export async function lockGiftByPayment(
  trx: Trx,
  paymentIntentId: string,
): Promise<{ id: string; isFeePosted: boolean } | undefined> {
  const row: unknown = await trx('gifts').where({ payment_intent_id: paymentIntentId }).forUpdate().first();
  if (row === undefined) return undefined;
  const gift = feeRow.parse(row);
  return { id: gift.id, isFeePosted: gift.fee_posted_at !== null };
}

export async function isFeePosted(db: Db, paymentIntentId: string): Promise<boolean> {
  const row: unknown = await db('gifts')
    .where({ payment_intent_id: paymentIntentId })
    .first('id', 'payment_intent_id', 'fee_posted_at');
  return row !== undefined && feeRow.parse(row).fee_posted_at !== null;
}

const shareRow = z.object({
  part_id: z.string().nullable(),
  fund_id: z.string(),
  amount_pence: z.unknown().transform(toPence),
});

export async function listShares(db: Db, giftId: string): Promise<GiftShare[]> {
  const rows: unknown[] = await db('gift_shares').where({ gift_id: giftId }).orderBy('id');
  return rows.map((found) => {
    const row = shareRow.parse(found);
    return { partId: row.part_id, fundId: row.fund_id, amountPence: row.amount_pence };
  });
}

export async function saveFee(
  trx: Trx,
  giftId: string,
  fee: { feePence: Pence; balanceTransactionId: string; chargeId: string; at: Date },
): Promise<void> {
  await trx('gifts').where({ id: giftId }).update({
    fee_pence: fee.feePence,
    balance_transaction_id: fee.balanceTransactionId,
    charge_id: fee.chargeId,
    fee_posted_at: fee.at,
  });
}

const paymentRow = z.object({ payment_intent_id: z.string() });

/** Payments whose fee is not yet posted, the oldest first. */
export async function listPaymentsWithoutFee(db: Db, limit: number): Promise<string[]> {
  const rows: unknown[] = await db('gifts')
    .whereNull('fee_posted_at')
    .orderBy('received_at')
    .limit(limit)
    .select('payment_intent_id');
  return rows.map((row) => paymentRow.parse(row).payment_intent_id);
}
