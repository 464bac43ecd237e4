// Queues the thank-you in the transaction of the gift, so that neither can be without the other.
import type { Deps } from '#server/deps.ts';
import type { Trx } from '#server/platform/db.ts';
import { queueThanks } from './giving-emails.ts';
import { findIntent } from './intent-store.ts';
import { readReceipt } from './receipt-reads.ts';

export async function queueGiftThanks(deps: Deps, trx: Trx, giftId: string): Promise<void> {
  const gift = await trx('gifts')
    .where({ id: giftId })
    .first<{ intent_id: string; receipt_token: string }>('intent_id', 'receipt_token');
  const intent = await findIntent(trx, gift.intent_id);
  if (!intent) throw new Error('a gift without its intent');
  await queueThanks(trx, {
    giftId,
    receipt: await readReceipt(trx, giftId),
    toAddress: intent.answers.email,
    receiptUrl: `${deps.config.publicAddress}/receipts/${gift.receipt_token}`,
    siteUrl: deps.config.publicAddress,
    at: deps.clock.now(),
  });
}
