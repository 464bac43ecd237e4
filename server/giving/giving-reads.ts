// What the giver's pages show: the sheet, the check before paying, and how it came out.
import { formatTime, dayOf } from '#shared/dates.ts';
import { giftAidOn } from '#shared/declarations/gift-aid-rules.ts';
import { DECLARATION_NOTICE } from '#shared/declarations/statutory-wording.ts';
import {
  chosenSum,
  giveCheckSchema,
  giveOutcomeSchema,
  giveSheetSchema,
  keptAnswers,
  type GiveCheck,
  type GiveFormFilled,
  type GiveOutcome,
  type GiveSheet,
} from '#shared/giving/give-schemas.ts';
import { add, formatPence, NOTHING, type Pence } from '#shared/money.ts';
import { sumInWords } from '#shared/sum-words.ts';
import { getAppealWording, getCampaign } from '#server/campaign/index.ts';
import type { Deps } from '#server/deps.ts';
import { Conflict, NotFound } from '#server/platform/errors.ts';
import { reportError } from '#server/platform/problems.ts';
import { getGivingSettings } from '#server/society/index.ts';
import { settleAnswers } from './answers.ts';
import { judgeAnswers, readRules, shownWordings } from './draft-service.ts';
import { findDraft } from './draft-store.ts';
import { findGiftIdOfIntent, getGiftKeys } from './gift-store.ts';
import { findIntent, findLikeGiftSince, listOpenIntentsOf, type GiftIntent } from './intent-store.ts';
import { readReceipt, receiptNumber } from './receipt-reads.ts';
import { fetchSession, settleSession } from './settle-session.ts';
import type { Standing } from './standing.ts';

type Prefill = { towards?: string | undefined; amount?: string | undefined; other?: string | undefined };

const openParts = (standing: Standing) =>
  standing.parts.flatMap((part) => {
    const reached = standing.reach.parts.find((one) => one.slug === part.slug);
    const isOpen = part.topMm !== null && reached && !reached.isPaid;
    return isOpen ? [{ slug: part.slug, name: part.name, stillNeededPence: reached.stillNeededPence }] : [];
  });

/** What was typed before, with what the address asks for on top. */
function typedBefore(kept: Record<string, string>, prefill: Prefill): GiveSheet['answers'] {
  // Without script the home page sends its ticked sum along with a written one; what was written is meant.
  const asked = prefill.other ? { ...prefill, amount: 'other' } : prefill;
  return keptAnswers({ ...kept, ...definedOnly(asked) });
}
const definedOnly = (prefill: Prefill): Record<string, string> =>
  Object.fromEntries(
    Object.entries(prefill).filter((pair): pair is [string, string] => typeof pair[1] === 'string'),
  );

const stillNeeded = (standing: Standing): Pence =>
  add(...standing.reach.parts.map((part) => part.stillNeededPence));

export async function readSheet(deps: Deps, token: string | undefined, prefill: Prefill): Promise<GiveSheet> {
  const now = deps.clock.now();
  const rules = await readRules(deps);
  const [draft, wording] = await Promise.all([
    findDraft(deps.db, token),
    getAppealWording(deps.db, rules.standing.campaign.id, now),
  ]);
  const giftAid = rules.isGiftAidOffered
    ? { wording: rules.declaration.words, notice: DECLARATION_NOTICE }
    : null;
  return giveSheetSchema.parse({
    campaignName: rules.standing.campaign.name,
    pronoun: rules.standing.campaign.pronoun,
    leastPence: rules.leastPence,
    stillNeededPence: stillNeeded(rules.standing),
    openParts: openParts(rules.standing),
    whatSumsBuy: rules.standing.campaign.whatSumsBuy,
    partChoice: wording.partChoice,
    giftAid,
    consentWording: rules.consent.words,
    answers: { ...typedBefore(draft?.answers ?? {}, prefill), shownWordings: shownWordings(rules) },
  });
}

async function saidBack(deps: Deps, draftId: string, sum: Pence): Promise<string[]> {
  const now = deps.clock.now();
  const settings = await getGivingSettings(deps.db, now);
  const said: string[] = [];
  const confirming = (await listOpenIntentsOf(deps.db, draftId)).find((one) => one.state === 'confirming');
  if (confirming)
    said.push(
      `Your bank has not yet confirmed the ${formatPence(confirming.amountPence)} you gave at ${formatTime(confirming.createdAt)}. Please do not pay a second time; we write to you as soon as we know.`,
    );
  if (sum >= settings.largeGiftPence)
    said.push(
      `This is a large gift: ${formatPence(sum)}, in words ${sumInWords(sum)}. If that is right, thank you; pay when you are ready.`,
    );
  const since = new Date(now.getTime() - settings.repeatedWithinMinutes * 60_000);
  const before = await findLikeGiftSince(deps.db, draftId, sum, since);
  if (before)
    said.push(
      `You gave ${formatPence(sum)} (${sumInWords(sum)}) from here at ${formatTime(before)}. Paying now makes a second gift.`,
    );
  return said;
}

function towardsOf(standing: Standing, answers: GiveFormFilled): GiveCheck['towards'] {
  const part = openParts(standing).find((one) => one.slug === answers.towards);
  return (
    part ?? {
      slug: null,
      name: 'The whole figure, from the ground up',
      stillNeededPence: stillNeeded(standing),
    }
  );
}

/** @throws Conflict `no-draft` or `incomplete` */
export async function readCheck(deps: Deps, token: string | undefined): Promise<GiveCheck> {
  const draft = await findDraft(deps.db, token);
  if (!draft || Object.keys(draft.answers).length === 0)
    throw new Conflict('There is nothing to check yet.', 'no-draft');
  const rules = await readRules(deps);
  const verdict = judgeAnswers(draft.answers, rules);
  if (verdict.faults) throw new Conflict('Some answers need putting right first.', 'incomplete');
  const sum = chosenSum(verdict.answers, { leastPence: rules.leastPence });
  if ('fault' in sum) throw new Conflict(sum.fault, 'incomplete');
  const now = deps.clock.now();
  const wording = await getAppealWording(deps.db, rules.standing.campaign.id, now);
  const isDeclared = verdict.answers.declare === 'on';
  return giveCheckSchema.parse({
    campaignName: rules.standing.campaign.name,
    pronoun: rules.standing.campaign.pronoun,
    sumPence: sum.pence,
    giftAidPence: isDeclared ? giftAidOn(sum.pence, dayOf(now)) : NOTHING,
    isDeclared,
    giftAidOffered: rules.isGiftAidOffered,
    towards: towardsOf(rules.standing, verdict.answers),
    answers: settleAnswers(verdict.answers),
    saidBack: await saidBack(deps, draft.id, sum.pence),
    appealVersion: wording.version,
    onShortfall: wording.onShortfall,
    onSurplus: wording.onSurplus,
  });
}

/**
 * Asks the payment service itself while we do not yet know, so that the page never waits for a webhook.
 * `isSure` is false when it could not be asked: then nothing is said of what was or was not taken.
 */
async function bringUpToDate(
  deps: Deps,
  intent: GiftIntent,
): Promise<{ intent: GiftIntent; isSure: boolean }> {
  if (!intent.sessionId || !['asked', 'confirming'].includes(intent.state)) return { intent, isSure: true };
  try {
    await settleSession(deps, intent, await fetchSession(deps, intent.sessionId));
  } catch (error) {
    reportError(deps.log, error, { intentId: intent.id, during: 'return page' });
    return { intent, isSure: false };
  }
  return { intent: (await findIntent(deps.db, intent.id)) ?? intent, isSure: true };
}

const OUTCOME_OF: Record<GiftIntent['state'], GiveOutcome['outcome']> = {
  started: 'not-paid',
  asked: 'not-paid',
  confirming: 'confirming',
  // Paid, but not as asked: a person looks at it before we say more.
  mismatched: 'confirming',
  paid: 'paid',
  expired: 'not-paid',
  failed: 'not-paid',
};

/**
 * How it came out. The address of the page may be passed on, so the giver's own address and the receipt are
 * told to the browser that gave and to nobody else.
 */
export async function readOutcome(deps: Deps, intentId: string, token?: string): Promise<GiveOutcome> {
  const found = await findIntent(deps.db, intentId);
  if (!found) throw new NotFound('We know of no gift at this address.');
  const { intent, isSure } = await bringUpToDate(deps, found);
  const campaign = await getCampaign(deps.db);
  const draft = await findDraft(deps.db, token);
  const isGiver = draft !== undefined && draft.id === intent.draftId;
  const giftId = await findGiftIdOfIntent(deps.db, intent.id);
  const receipt = giftId ? await readReceipt(deps.db, giftId) : null;
  const gift = giftId ? await getGiftKeys(deps.db, giftId) : undefined;
  return giveOutcomeSchema.parse({
    outcome: receipt ? 'paid' : isSure ? OUTCOME_OF[intent.state] : 'confirming',
    campaignName: campaign.name,
    pronoun: campaign.pronoun,
    sumPence: intent.amountPence,
    giftAidPence: receipt?.declaration?.giftAidPence ?? NOTHING,
    shares: receipt?.shares ?? [],
    splitNote: receipt?.splitNote ?? null,
    email: receipt && isGiver ? intent.answers.email : null,
    receiptNumber: gift && isGiver ? receiptNumber(gift.number) : null,
    receiptPath: gift && isGiver ? `/receipts/${gift.receiptToken}` : null,
    inMemory: isGiver && intent.answers.dedication === 'memory',
  });
}
