// A payment becomes a gift, once: giver, shares, books, words, thanks and audit in one transaction.
import type { Pence } from '#shared/money.ts';
import { splitGift } from '#shared/giving/split-rules.ts';
import { giveFormSchema, type GiveFormFilled } from '#shared/giving/give-schemas.ts';
import { recordAudit } from '#server/accounts/index.ts';
import { postGiftReceived } from '#server/books/index.ts';
import { getAppealWordingById, lockCampaign } from '#server/campaign/index.ts';
import { keepDeclaration } from '#server/declarations/index.ts';
import type { Deps } from '#server/deps.ts';
import type { Trx } from '#server/platform/db.ts';
import { keepConsents, keepSupporter } from '#server/supporters/index.ts';
import { sameAnswers, settleAnswers } from './answers.ts';
import { forgetAnswers, lockDraftById } from './draft-store.ts';
import { addGift, addWords, findGiftIdOfIntent, type GiftShare, type NewWords } from './gift-store.ts';
import { lockIntent, markIntent, type GiftIntent } from './intent-store.ts';
import { queueGiftThanks } from './thanks-service.ts';
import { readStanding } from './standing.ts';

export type PaidSession = {
  sessionId: string;
  paymentIntentId: string;
  chargeId: string | null;
  /** Each of these must be the intent's, or a person looks at it. */
  amountsPence: readonly Pence[];
  currencies: readonly string[];
  paidAt: Date;
};

export type Received = { kind: 'received'; giftId: string; isNew: boolean } | { kind: 'mismatched' };

/** The shares of a gift, reckoned under the campaign's lock so that two gifts cannot both fill one part. */
async function shareOut(trx: Trx, intent: GiftIntent): Promise<{ fundId: string; shares: GiftShare[] }> {
  await lockCampaign(trx);
  const standing = await readStanding(trx);
  const wording = await getAppealWordingById(trx, intent.appealWordingId);
  const part = standing.parts.find((one) => one.id === intent.partId);
  const stillNeeds = part
    ? (standing.reach.parts.find((one) => one.slug === part.slug)?.stillNeededPence ?? null)
    : null;
  const split = splitGift(intent.amountPence, stillNeeds);
  const mainFund = standing.campaign.fundId;
  const partFund = wording.partChoice === 'fund' ? (part?.fundId ?? mainFund) : mainFund;
  const shares: GiftShare[] = [];
  if (part && split.meantPence > 0)
    shares.push({ partId: part.id, fundId: partFund, amountPence: split.meantPence });
  if (split.freePence > 0) shares.push({ partId: null, fundId: mainFund, amountPence: split.freePence });
  return { fundId: shares[0]?.fundId ?? mainFund, shares };
}

const wordsOf = (answers: GiveFormFilled): NewWords[] => {
  const words: NewWords[] = [];
  if (answers.dedication !== 'none')
    words.push({
      kind: answers.dedication,
      words: answers.dedicationName,
      contactName: answers.contactName,
      contactEmail: answers.contactEmail,
      mayTellSum: answers.contactSum === 'on',
    });
  if (answers.wall === 'wall') words.push({ kind: 'wall-name', words: answers.wallWords });
  if (answers.message) words.push({ kind: 'message', words: answers.message });
  return words;
};

async function keepGiver(trx: Trx, intent: GiftIntent, at: Date) {
  const { answers } = intent;
  const supporter = await keepSupporter(trx, {
    name: answers.name,
    greeting: answers.greeting,
    email: answers.email,
    phone: answers.phone || null,
    addressLine1: answers.address1 || null,
    addressLine2: answers.address2 || null,
    town: answers.town || null,
    postcode: answers.postcode || null,
    country: answers.country,
    isNameWithheld: answers.wall === 'treasurer-only',
    at,
  });
  await keepConsents(trx, {
    supporterId: supporter.id,
    wordingId: intent.consentWordingId,
    given: {
      email: answers.byEmail === 'on',
      post: answers.byPost === 'on',
      phone: answers.byPhone === 'on',
    },
    sourceKind: 'gift-intent',
    sourceId: intent.id,
    at: intent.createdAt,
  });
  const declarationId =
    intent.declarationWordingId === null
      ? null
      : await keepDeclaration(trx, {
          supporterId: supporter.id,
          wordingId: intent.declarationWordingId,
          fullName: answers.name,
          addressLine1: answers.address1,
          addressLine2: answers.address2 || null,
          town: answers.town,
          postcode: answers.country === 'GB' ? answers.postcode : 'X',
          country: answers.country,
          givenAt: intent.createdAt,
          sourceKind: 'gift-intent',
          sourceId: intent.id,
        });
  return { supporterId: supporter.id, isNew: supporter.isNew, declarationId };
}

/** A slow payment may be confirmed while its giver fills in another sheet: that one is left alone. */
async function forgetIfPaid(trx: Trx, draftId: string, paidFor: GiveFormFilled, at: Date): Promise<void> {
  const draft = await lockDraftById(trx, draftId);
  const typed = giveFormSchema.safeParse(draft?.answers);
  if (typed.success && sameAnswers(settleAnswers(typed.data), paidFor)) await forgetAnswers(trx, draftId, at);
}

async function writeGift(deps: Deps, trx: Trx, intent: GiftIntent, paid: PaidSession): Promise<string> {
  const at = deps.clock.now();
  const { fundId, shares } = await shareOut(trx, intent);
  const giver = await keepGiver(trx, intent, at);
  const giftId = await addGift(trx, {
    intentId: intent.id,
    supporterId: giver.supporterId,
    appealWordingId: intent.appealWordingId,
    fundId,
    amountPence: intent.amountPence,
    partId: intent.partId,
    declarationId: giver.declarationId,
    nameShown: intent.answers.wall,
    sessionId: paid.sessionId,
    paymentIntentId: paid.paymentIntentId,
    chargeId: paid.chargeId,
    receivedAt: paid.paidAt,
    shares,
  });
  await addWords(trx, giftId, wordsOf(intent.answers), at);
  await postGiftReceived(trx, { giftId, at: paid.paidAt, recordedAt: at }, shares);
  await markIntent(trx, intent.id, 'paid');
  if (intent.draftId) await forgetIfPaid(trx, intent.draftId, intent.answers, at);
  await recordAudit(trx, {
    at,
    actor: { kind: 'giver', supporterId: giver.supporterId },
    action: 'gift-received',
    objectKind: 'gift',
    objectId: giftId,
    detail: {
      amountPence: intent.amountPence,
      isNewSupporter: giver.isNew,
      isDeclared: giver.declarationId !== null,
    },
  });
  await queueGiftThanks(deps, trx, giftId);
  return giftId;
}

/**
 * Makes the gift of a paid session. Whoever comes first, page, webhook or poller, does it; the others find it
 * done. A sum or currency that is not the intent's makes no gift: it is marked for a person to look at.
 */
export async function receiveGift(
  deps: Deps,
  trx: Trx,
  intentId: string,
  paid: PaidSession,
): Promise<Received> {
  const intent = await lockIntent(trx, intentId);
  if (!intent) return { kind: 'mismatched' };
  const before = await findGiftIdOfIntent(trx, intentId);
  if (before) return { kind: 'received', giftId: before, isNew: false };
  const fits =
    paid.currencies.every((one) => one === 'gbp') &&
    paid.amountsPence.every((one) => one === intent.amountPence);
  if (!fits) {
    const told = `${paid.amountsPence.join('/')} ${paid.currencies.join('/')}`;
    await markIntent(trx, intentId, 'mismatched', `paid ${told}, asked ${intent.amountPence} gbp`);
    return { kind: 'mismatched' };
  }
  return { kind: 'received', giftId: await writeGift(deps, trx, intent, paid), isNew: true };
}
