// The campaign as the world sees it: the figure, its money and its stages, put together from the rooms below.
import { describeFigure } from '#shared/campaign/description-rules.ts';
import {
  campaignSchema,
  type Campaign,
  type Part,
  type PartState,
} from '#shared/campaign/campaign-schemas.ts';
import { add, NOTHING } from '#shared/money.ts';
import { getAppealWording, getDrawing, listStages } from '#server/campaign/index.ts';
import type { Deps } from '#server/deps.ts';
import { readStanding, type Standing } from '#server/giving/index.ts';
import { isGiftAidOffered } from '#server/society/index.ts';

function stateOf(workState: 'waiting' | 'making' | 'placed', isPaid: boolean): PartState {
  if (workState !== 'waiting') return workState;
  return isPaid ? 'paid' : 'planned';
}

export const toParts = (standing: Standing): Part[] =>
  standing.parts.map((part, index) => {
    const reached = standing.reach.parts[index];
    return {
      slug: part.slug,
      name: part.name,
      costPence: part.costPence,
      givenPence: reached?.givenPence ?? NOTHING,
      needPence: reached?.needPence ?? NOTHING,
      stillNeededPence: reached?.stillNeededPence ?? NOTHING,
      inKind: part.inKind,
      state: stateOf(part.workState, reached?.isPaid ?? false),
      maker: part.maker,
      bottomMm: part.bottomMm,
      topMm: part.topMm,
    };
  });

/** Each rung is named by the part that raises the top to it, with the sum that builds to there. */
function toRungs(standing: Standing): Campaign['reach']['rungs'] {
  let sumPence = NOTHING;
  return standing.reach.rungs.map((rung) => {
    sumPence = add(sumPence, rung.costPence);
    const raising = standing.parts.find(
      (part) => rung.slugs.includes(part.slug) && part.topMm === rung.topMm,
    );
    return { topMm: rung.topMm, slug: raising?.slug ?? '', name: raising?.name ?? '', sumPence };
  });
}

export async function readCampaign(deps: Pick<Deps, 'db' | 'clock'>): Promise<Campaign> {
  const now = deps.clock.now();
  const standing = await readStanding(deps.db);
  const { campaign, reach } = standing;
  const [stages, wording, drawing, giftAidOffered] = await Promise.all([
    listStages(deps.db, campaign.id),
    getAppealWording(deps.db, campaign.id, now),
    getDrawing(deps.db, campaign.id),
    isGiftAidOffered(deps.db, now),
  ]);
  const parts = toParts(standing);
  return campaignSchema.parse({
    name: campaign.name,
    pronoun: campaign.pronoun,
    lead: campaign.lead,
    place: campaign.place,
    goalPence: campaign.goalPence,
    givenPence: standing.givenPence,
    givers: standing.givers,
    heightMm: Math.max(0, ...parts.map((part) => part.topMm ?? 0)),
    reach: {
      heightMm: reach.heightMm,
      part: reach.part,
      fraction: reach.fraction,
      waitingPence: reach.waitingPence,
      rungs: toRungs(standing),
    },
    description: describeFigure(parts),
    parts,
    stages,
    wording,
    drawing,
    giftAidOffered,
  });
}
