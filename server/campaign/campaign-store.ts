// The only file that names the tables of the campaign: parts, in-kind shares, stages, wording and drawing.
import { z } from 'zod';
import type { Stage } from '#shared/campaign/campaign-schemas.ts';
import { appealWordingSchema, STAGE_MARKS, type AppealWording } from '#shared/campaign/campaign-schemas.ts';
import type { Pence } from '#shared/money.ts';
import { toPence, type Db, type Trx } from '#server/platform/db.ts';
import { NotFound } from '#server/platform/errors.ts';

const penceColumn = z.unknown().transform(toPence);

const campaignRow = z.object({
  id: z.string(),
  slug: z.string(),
  name: z.string(),
  pronoun: z.string(),
  lead: z.string(),
  place: z.string(),
  what_sums_buy: z.string(),
  goal_pence: penceColumn,
  fund_id: z.string(),
  published_at: z.date().nullable(),
});
export type CampaignRecord = {
  id: string;
  name: string;
  pronoun: string;
  lead: string;
  place: string;
  whatSumsBuy: string;
  goalPence: Pence;
  fundId: string;
  publishedAt: Date | null;
};

export async function getCampaign(db: Db): Promise<CampaignRecord> {
  const found: unknown = await db('campaigns')
    .whereNotNull('published_at')
    .orderBy('published_at', 'desc')
    .first();
  if (found === undefined) throw new NotFound('No campaign has been published yet.');
  const row = campaignRow.parse(found);
  return {
    id: row.id,
    name: row.name,
    pronoun: row.pronoun,
    lead: row.lead,
    place: row.place,
    whatSumsBuy: row.what_sums_buy,
    goalPence: row.goal_pence,
    fundId: row.fund_id,
    publishedAt: row.published_at,
  };
}

/** Whoever shares money out among the parts waits here for whoever is doing so. */
export async function lockCampaign(trx: Trx): Promise<void> {
  await trx('campaigns').whereNotNull('published_at').forUpdate().select('id');
}

export type WorkState = 'waiting' | 'making' | 'placed';
const partRow = z.object({
  id: z.string(),
  slug: z.string(),
  name: z.string(),
  cost_pence: penceColumn,
  bottom_mm: z.number().nullable(),
  top_mm: z.number().nullable(),
  work_state: z.enum(['waiting', 'making', 'placed']),
  maker: z.string().nullable(),
  fund_id: z.string().nullable(),
});
export type PartRecord = {
  id: string;
  slug: string;
  name: string;
  costPence: Pence;
  bottomMm: number | null;
  topMm: number | null;
  workState: WorkState;
  maker: string | null;
  fundId: string | null;
  inKind: { firm: string; amountPence: Pence }[];
};
const inKindRow = z.object({ part_id: z.string(), firm: z.string(), amount_pence: penceColumn });

/** In building order, costs without height in their place. */
export async function listParts(db: Db, campaignId: string): Promise<PartRecord[]> {
  const rows: unknown[] = await db('parts').where({ campaign_id: campaignId }).orderBy('building_order');
  const parts = rows.map((row) => partRow.parse(row));
  const shares: unknown[] = await db('in_kind_shares')
    .whereIn(
      'part_id',
      parts.map((part) => part.id),
    )
    .orderBy('agreed_on');
  const inKind = shares.map((row) => inKindRow.parse(row));
  return parts.map((row) => ({
    id: row.id,
    slug: row.slug,
    name: row.name,
    costPence: row.cost_pence,
    bottomMm: row.bottom_mm,
    topMm: row.top_mm,
    workState: row.work_state,
    maker: row.maker,
    fundId: row.fund_id,
    inKind: inKind
      .filter((one) => one.part_id === row.id)
      .map((one) => ({ firm: one.firm, amountPence: one.amount_pence })),
  }));
}

const stageRow = z.object({
  id: z.string(),
  slug: z.string(),
  name: z.string(),
  mark: z.enum(STAGE_MARKS),
  expected_on: z.string(),
  done_on: z.string().nullable(),
  remark: z.string().nullable(),
});
const changeRow = z.object({
  stage_id: z.string(),
  from_day: z.string(),
  to_day: z.string(),
  reason: z.string(),
});

export async function listStages(db: Db, campaignId: string): Promise<Stage[]> {
  const rows: unknown[] = await db('stages').where({ campaign_id: campaignId }).orderBy('stage_order');
  const stages = rows.map((row) => stageRow.parse(row));
  const found: unknown[] = await db('stage_changes')
    .whereIn(
      'stage_id',
      stages.map((one) => one.id),
    )
    .orderBy('changed_at');
  const changes = found.map((row) => changeRow.parse(row));
  return stages.map((row) => ({
    slug: row.slug,
    name: row.name,
    mark: row.mark,
    expectedOn: row.expected_on,
    doneOn: row.done_on,
    remark: row.remark,
    changes: changes
      .filter((one) => one.stage_id === row.id)
      .map((one) => ({ fromDay: one.from_day, toDay: one.to_day, reason: one.reason })),
  }));
}

const wordingRow = z.object({
  id: z.string(),
  version: z.number(),
  purpose: z.string(),
  on_shortfall: z.string(),
  on_surplus: z.string(),
  part_choice: z.enum(['wish', 'fund']),
});

const toWording = (found: unknown): AppealWording => {
  const row = wordingRow.parse(found);
  return appealWordingSchema.parse({
    id: row.id,
    version: row.version,
    purpose: row.purpose,
    onShortfall: row.on_shortfall,
    onSurplus: row.on_surplus,
    partChoice: row.part_choice,
  });
};

/** The wording that a giver sees at a moment. */
export async function getAppealWording(db: Db, campaignId: string, at: Date): Promise<AppealWording> {
  const found: unknown = await db('appeal_wordings')
    .where({ campaign_id: campaignId })
    .where('from_at', '<=', at)
    .orderBy('version', 'desc')
    .first();
  if (found === undefined) throw new NotFound('The appeal has no wording in force.');
  return toWording(found);
}

export async function getAppealWordingById(db: Db, id: string): Promise<AppealWording> {
  const found: unknown = await db('appeal_wordings').where({ id }).first();
  if (found === undefined) throw new NotFound('This appeal wording is not kept here.');
  return toWording(found);
}

export async function getDrawing(db: Db, campaignId: string): Promise<string> {
  const row = await db('figures')
    .where({ campaign_id: campaignId })
    .whereNotNull('published_at')
    .orderBy('version', 'desc')
    .first<{ drawing: string } | undefined>('drawing');
  return row?.drawing ?? '';
}
