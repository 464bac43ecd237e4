// The one way into the books for a card gift and its fee: each once, each balanced in its own funds.
import { dayOf } from '#shared/dates.ts';
import { add, negate, NOTHING, share, type Pence } from '#shared/money.ts';
import type { Trx } from '#server/platform/db.ts';
import { insertEntry, type Line } from './books-store.ts';

export type FundShare = { fundId: string; amountPence: Pence };

const moved = (debit: string, credit: string, shares: readonly FundShare[]): Line[] =>
  shares
    .filter((one) => one.amountPence !== NOTHING)
    .flatMap((one) => [
      { accountCode: debit, fundId: one.fundId, amountPence: one.amountPence },
      { accountCode: credit, fundId: one.fundId, amountPence: negate(one.amountPence) },
    ]);

/** Shares of one fund are one pair of lines. */
function byFund(shares: readonly FundShare[]): FundShare[] {
  const sums = new Map<string, Pence>();
  for (const one of shares) sums.set(one.fundId, add(sums.get(one.fundId) ?? NOTHING, one.amountPence));
  return [...sums].map(([fundId, amountPence]) => ({ fundId, amountPence }));
}

/** `at` is when the money moved, which names the day; `recordedAt` is when we wrote it down. */
type Posting = { giftId: string; at: Date; recordedAt: Date };

/**
 * Money received by card: debit what the card service holds for us, credit gifts.
 * @returns false when it was posted before.
 */
export const postGiftReceived = (
  trx: Trx,
  { giftId, at, recordedAt }: Posting,
  shares: readonly FundShare[],
): Promise<boolean> =>
  insertEntry(
    trx,
    { source: 'gift', sourceId: giftId, kind: 'received' },
    dayOf(at),
    recordedAt,
    moved('card:pending', 'income:gifts:card', byFund(shares)),
  );

/**
 * The card fee, borne by the gift's own funds in proportion, or by one fund that a setting names.
 * A fee of nothing posts no entry.
 * @returns false when it was posted before or there is nothing to post.
 */
export async function postCardFee(
  trx: Trx,
  { giftId, at, recordedAt }: Posting,
  fee: { feePence: Pence; shares: readonly FundShare[]; bornByFundId: string | null },
): Promise<boolean> {
  if (fee.feePence === NOTHING) return false;
  const funds = byFund(fee.shares);
  const feeParts = share(
    fee.feePence,
    funds.map((one) => one.amountPence),
  );
  const own = funds.map((one, index) => ({ fundId: one.fundId, amountPence: feeParts[index] ?? NOTHING }));
  const key = { source: 'gift', sourceId: giftId, kind: 'card-fee' };
  if (fee.bornByFundId === null)
    return insertEntry(trx, key, dayOf(at), recordedAt, moved('expense:card-fees', 'card:pending', own));
  // The fee leaves the bearing fund's share of the money at the card service, whichever gift it was for.
  return insertEntry(
    trx,
    key,
    dayOf(at),
    recordedAt,
    moved('expense:card-fees', 'card:pending', [{ fundId: fee.bornByFundId, amountPence: fee.feePence }]),
  );
}
