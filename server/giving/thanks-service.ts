// Queues the thank-you in the transaction of the gift, so that neither can be without the other.
import type { Deps } from '#server/deps.ts';
import type { Trx } from '#server/platform/db.ts';
import { queueThanks } from './giving-emails.ts';
import { getGiftKeys } from './gift-store.ts';
import { findIntent } from './intent-store.ts';
import { readReceipt } from './receipt-reads.ts';

export async function queueGiftThanks(deps: Deps, trx: Trx, giftId: string): Promise<void> {
  const { intentId, receiptToken } = await getGiftKeys(trx, giftId);
  const intent = await findIntent(trx, intentId);
  if (!intent) throw new Error('a gift without its intent');
  await queueThanks(trx, {
    giftId,
    receipt: await readReceipt(trx, giftId),
    toAddress: intent.answers.email,
    receiptUrl: `${deps.config.publicAddress}/receipts/${receiptToken}`,
    siteUrl: deps.config.publicAddress,
    at: deps.clock.now(),
  });
}
