// Sets up a campaign: its parts, wording, drawing and stages, before it is published.
import type { AppealWording, Stage } from '#shared/campaign/campaign-schemas.ts';
import type { Day } from '#shared/dates.ts';
import type { Pence } from '#shared/money.ts';
import type { Trx } from '#server/platform/db.ts';

export type NewCampaign = {
  slug: string;
  name: string;
  pronoun: string;
  lead: string;
  place: string;
  whatSumsBuy: string;
  goalPence: Pence;
  fundId: string;
};

export async function addCampaign(trx: Trx, campaign: NewCampaign): Promise<string> {
  const [row] = await trx('campaigns')
    .insert({
      slug: campaign.slug,
      name: campaign.name,
      pronoun: campaign.pronoun,
      lead: campaign.lead,
      place: campaign.place,
      what_sums_buy: campaign.whatSumsBuy,
      goal_pence: campaign.goalPence,
      fund_id: campaign.fundId,
    })
    .returning<{ id: string }[]>('id');
  if (!row) throw new Error('the campaign was not written');
  return row.id;
}

export type NewPart = {
  slug: string;
  name: string;
  costPence: Pence;
  bottomMm: number | null;
  topMm: number | null;
  maker?: string | undefined;
  fundId?: string | undefined;
};

/** In the order given, which is the order of building. */
export async function addParts(trx: Trx, campaignId: string, parts: readonly NewPart[]): Promise<void> {
  await trx('parts').insert(
    parts.map((part, index) => ({
      campaign_id: campaignId,
      slug: part.slug,
      name: part.name,
      building_order: index + 1,
      cost_pence: part.costPence,
      bottom_mm: part.bottomMm,
      top_mm: part.topMm,
      maker: part.maker ?? null,
      fund_id: part.fundId ?? null,
    })),
  );
}

export async function addInKindShare(
  trx: Trx,
  share: { partId: string; firm: string; amountPence: Pence; agreedOn: Day },
): Promise<void> {
  await trx('in_kind_shares').insert({
    part_id: share.partId,
    firm: share.firm,
    amount_pence: share.amountPence,
    agreed_on: share.agreedOn,
  });
}

export async function addAppealWording(
  trx: Trx,
  campaignId: string,
  wording: Omit<AppealWording, 'id'>,
  fromAt: Date,
): Promise<void> {
  await trx('appeal_wordings').insert({
    campaign_id: campaignId,
    version: wording.version,
    purpose: wording.purpose,
    on_shortfall: wording.onShortfall,
    on_surplus: wording.onSurplus,
    part_choice: wording.partChoice,
    from_at: fromAt,
  });
}

export async function addFigure(
  trx: Trx,
  campaignId: string,
  version: number,
  drawing: string,
  at: Date,
): Promise<void> {
  await trx('figures').insert({ campaign_id: campaignId, version, drawing, published_at: at });
}

export async function addStages(
  trx: Trx,
  campaignId: string,
  stages: readonly Pick<Stage, 'slug' | 'name' | 'mark' | 'expectedOn' | 'remark'>[],
): Promise<void> {
  await trx('stages').insert(
    stages.map((stage, index) => ({
      campaign_id: campaignId,
      stage_order: index + 1,
      slug: stage.slug,
      name: stage.name,
      mark: stage.mark,
      expected_on: stage.expectedOn,
      remark: stage.remark,
    })),
  );
}
