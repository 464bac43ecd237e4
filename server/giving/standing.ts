// Where the figure stands: the campaign's parts and the money of all gifts, put together by the reach.
import { z } from 'zod';
import { computeReach, type Reach, type ReachPart } from '#shared/campaign/reach-rules.ts';
import { add, NOTHING, type Pence } from '#shared/money.ts';
import { getCampaign, listParts, type CampaignRecord, type PartRecord } from '#server/campaign/index.ts';
import { queryRows, toCount, toPence, type Db } from '#server/platform/db.ts';

const shareSum = z.object({ part_id: z.string().nullable(), sum: z.unknown().transform(toPence) });
const giverCount = z.object({ givers: z.unknown().transform(toCount) });

export type Standing = {
  campaign: CampaignRecord;
  parts: PartRecord[];
  givenPence: Pence;
  givers: number;
  reach: Reach;
};

export const toReachParts = (parts: readonly PartRecord[], meant: ReadonlyMap<string, Pence>): ReachPart[] =>
  parts.map((part) => ({
    slug: part.slug,
    costPence: part.costPence,
    inKindPence: add(...part.inKind.map((one) => one.amountPence)),
    meantPence: meant.get(part.id) ?? NOTHING,
    bottomMm: part.bottomMm,
    topMm: part.topMm,
  }));

/** Given is gifts received, before card fees. Inside a transaction it sees what that transaction wrote. */
export async function readStanding(db: Db): Promise<Standing> {
  const campaign = await getCampaign(db);
  const parts = await listParts(db, campaign.id);
  const sums = await queryRows(
    db,
    shareSum,
    'select part_id, sum(amount_pence) from gift_shares group by part_id',
  );
  const [count] = await queryRows(db, giverCount, 'select count(distinct supporter_id) as givers from gifts');
  const meant = new Map(
    sums.flatMap((one) => (one.part_id === null ? [] : [[one.part_id, one.sum] as const])),
  );
  const freePence = sums.find((one) => one.part_id === null)?.sum ?? NOTHING;
  return {
    campaign,
    parts,
    givenPence: add(...sums.map((one) => one.sum)),
    givers: count?.givers ?? 0,
    reach: computeReach(toReachParts(parts, meant), freePence),
  };
}
