// What is done to a campaign: publish it, mark a part, move a stage.
import { z } from 'zod';
import { goalFault } from '#shared/campaign/reach-rules.ts';
import type { Day } from '#shared/dates.ts';
import { formatPence, pence } from '#shared/money.ts';
import { recordAudit, type Actor } from '#server/accounts/index.ts';
import { toPence, type Trx } from '#server/platform/db.ts';
import { Conflict, NotFound, Refused } from '#server/platform/errors.ts';
import { listParts, type WorkState } from './campaign-store.ts';

type Deed = { actor: Actor; at: Date };

/** @throws Refused `goal-is-not-sum` when the goal is not the sum of the costs, to the penny. */
export async function publishCampaign(trx: Trx, campaignId: string, deed: Deed): Promise<void> {
  const row = await trx('campaigns')
    .where({ id: campaignId })
    .forUpdate()
    .first<{ goal_pence: string } | undefined>();
  if (!row) throw new NotFound('There is no such campaign.');
  const apart = goalFault(toPence(row.goal_pence), await listParts(trx, campaignId));
  if (apart !== 0) {
    const side = apart > 0 ? 'more' : 'less';
    throw new Refused(
      `The costs of the parts come to ${formatPence(pence(Math.abs(apart)))} ${side} than the goal. Put one of them right before publishing.`,
      'goal-is-not-sum',
    );
  }
  await refusePartsWithoutFund(trx, campaignId);
  await trx('campaigns').where({ id: campaignId }).update({ published_at: deed.at });
  await recordAudit(trx, {
    ...deed,
    action: 'campaign-published',
    objectKind: 'campaign',
    objectId: campaignId,
  });
}

/** Where choosing a part makes a fund of its own, each part that can be chosen must have one. */
async function refusePartsWithoutFund(trx: Trx, campaignId: string): Promise<void> {
  const needsFunds: unknown = await trx('appeal_wordings')
    .where({ campaign_id: campaignId, part_choice: 'fund' })
    .first('id');
  if (needsFunds === undefined) return;
  const bare = (await listParts(trx, campaignId)).filter(
    (part) => part.topMm !== null && part.fundId === null,
  );
  if (bare.length > 0)
    throw new Refused(
      `The wording makes each part a fund of its own, but these have none: ${bare.map((part) => part.name).join(', ')}.`,
      'part-without-fund',
    );
}

const partStateSchema = z.object({ id: z.string(), work_state: z.enum(['waiting', 'making', 'placed']) });

/** “Being made” and “in place” are a person's word; “paid” follows from the money. */
export async function markPart(
  trx: Trx,
  part: { campaignId: string; slug: string; workState: WorkState },
  deed: Deed,
): Promise<void> {
  const found: unknown = await trx('parts')
    .where({ campaign_id: part.campaignId, slug: part.slug })
    .forUpdate()
    .first();
  if (found === undefined) throw new NotFound(`There is no part “${part.slug}”.`);
  const before = partStateSchema.parse(found);
  if (before.work_state === part.workState)
    throw new Conflict('The part is marked so already.', 'marked-already');
  await trx('parts').where({ id: before.id }).update({ work_state: part.workState });
  await recordAudit(trx, {
    ...deed,
    action: 'part-marked',
    objectKind: 'part',
    objectId: before.id,
    detail: { before: before.work_state, after: part.workState },
  });
}

const stageSchema = z.object({ id: z.string(), expected_on: z.string() });

async function lockStage(trx: Trx, campaignId: string, slug: string): Promise<z.infer<typeof stageSchema>> {
  const found: unknown = await trx('stages').where({ campaign_id: campaignId, slug }).forUpdate().first();
  if (found === undefined) throw new NotFound(`There is no stage “${slug}”.`);
  return stageSchema.parse(found);
}

/** A changed day keeps the old one and the reason for everybody to see. */
export async function moveStage(
  trx: Trx,
  move: { campaignId: string; slug: string; toDay: Day; reason: string },
  deed: Deed,
): Promise<void> {
  const stage = await lockStage(trx, move.campaignId, move.slug);
  await trx('stage_changes').insert({
    stage_id: stage.id,
    from_day: stage.expected_on,
    to_day: move.toDay,
    reason: move.reason,
    changed_at: deed.at,
  });
  await trx('stages').where({ id: stage.id }).update({ expected_on: move.toDay });
  await recordAudit(trx, {
    ...deed,
    action: 'stage-moved',
    objectKind: 'stage',
    objectId: stage.id,
    detail: { from: stage.expected_on, to: move.toDay },
  });
}

export async function finishStage(
  trx: Trx,
  done: { campaignId: string; slug: string; day: Day },
  deed: Deed,
): Promise<void> {
  const stage = await lockStage(trx, done.campaignId, done.slug);
  await trx('stages').where({ id: stage.id }).update({ done_on: done.day });
  await recordAudit(trx, {
    ...deed,
    action: 'stage-done',
    objectKind: 'stage',
    objectId: stage.id,
    detail: { day: done.day },
  });
}
