// From a checked sheet to the card page: own row first, then the call, then what the call answered.
import type Stripe from 'stripe';
import { chosenSum } from '#shared/giving/give-schemas.ts';
import type { Deps } from '#server/deps.ts';
import { getAppealWording } from '#server/campaign/index.ts';
import { Conflict, Refused, Upstream } from '#server/platform/errors.ts';
import { checked } from '#server/platform/payments.ts';
import { sameAnswers, settleAnswers } from './answers.ts';
import { judgeAnswers, readRules } from './draft-service.ts';
import { findDraft, lockDraft, type Draft } from './draft-store.ts';
import {
  addIntent,
  findIntent,
  listOpenIntentsOf,
  markIntent,
  saveSession,
  type GiftIntent,
} from './intent-store.ts';
import { expireSession, fetchSession, settleSession } from './settle-session.ts';

/** After a day the payment service may forget a key, and the same key would make a second session. */
const KEY_HOLDS_MS = 23 * 60 * 60 * 1000;

export const idempotencyKeyOf = (intentId: string): string => `gi:${intentId}:1`;

/** Whose draft, and which version of the appeal stood on the page that was pressed. */
export type Press = { token: string | undefined; appealVersion: number };
type Wanted = Parameters<typeof addIntent>[1];

/** What the sheet asks for now. @throws Conflict `incomplete` or `wording-changed`, Refused `part-full` */
async function readWanted(
  deps: Deps,
  draft: Draft,
  appealVersion: number,
): Promise<Wanted & { campaignName: string }> {
  const rules = await readRules(deps);
  const verdict = judgeAnswers(draft.answers, rules);
  if (verdict.faults) {
    if (Object.keys(verdict.faults).join() === 'towards')
      throw new Refused(verdict.faults.towards ?? '', 'part-full');
    throw new Conflict('Some answers need putting right first.', 'incomplete');
  }
  const answers = settleAnswers(verdict.answers);
  const sum = chosenSum(answers, { leastPence: rules.leastPence });
  if ('fault' in sum) throw new Conflict(sum.fault, 'incomplete');
  const now = deps.clock.now();
  const { campaign, parts } = rules.standing;
  const appeal = await getAppealWording(deps.db, campaign.id, now);
  if (appeal.version !== appealVersion)
    throw new Conflict(
      'The words of the appeal have changed since you saw them. Please look once more.',
      'wording-changed',
    );
  return {
    campaignName: campaign.name,
    draftId: draft.id,
    amountPence: sum.pence,
    partId: parts.find((part) => part.slug === answers.towards)?.id ?? null,
    appealWordingId: appeal.id,
    declarationWordingId: answers.declare === 'on' ? rules.declaration.id : null,
    consentWordingId: rules.consent.id,
    answers,
    createdAt: now,
  };
}

/** An open intent that asks for just this, under just these words, and whose key or page still holds. */
function isForThis(open: GiftIntent, wanted: Wanted): boolean {
  const now = wanted.createdAt;
  const holds =
    open.sessionExpiresAt === null
      ? now.getTime() - open.createdAt.getTime() < KEY_HOLDS_MS
      : open.sessionExpiresAt > now;
  return (
    holds &&
    open.state !== 'confirming' &&
    open.amountPence === wanted.amountPence &&
    open.appealWordingId === wanted.appealWordingId &&
    open.declarationWordingId === wanted.declarationWordingId &&
    open.consentWordingId === wanted.consentWordingId &&
    sameAnswers(open.answers, wanted.answers)
  );
}

/** @throws Conflict `still-confirming` or `already-paid` when the card page was used already. */
async function refuseIfUsed(deps: Deps, intent: GiftIntent, session: Stripe.Checkout.Session): Promise<void> {
  await settleSession(deps, intent, session);
  const state = (await findIntent(deps.db, intent.id))?.state;
  if (state === 'confirming' || state === 'mismatched')
    throw new Conflict(
      'Your bank has not yet confirmed the gift you made a moment ago. Please do not pay a second time; we write to you as soon as we know.',
      'still-confirming',
    );
  if (state === 'paid')
    throw new Conflict(
      'This gift is paid already, and the receipt is on its way. Nothing more was taken.',
      'already-paid',
    );
}

/** Before another card page is made, the earlier ones of this sheet are closed, so that it cannot be paid twice. */
async function closeEarlier(deps: Deps, open: readonly GiftIntent[]): Promise<void> {
  for (const earlier of open)
    if (earlier.sessionId) await refuseIfUsed(deps, earlier, await expireSession(deps, earlier.sessionId));
}

/** The intent for the sheet as it stands: the open one when nothing changed, so that a second press is harmless. */
async function startIntent(
  deps: Deps,
  { token, appealVersion }: Press,
): Promise<{ intent: GiftIntent; campaignName: string }> {
  const found = await findDraft(deps.db, token);
  if (!found) throw new Conflict('There is nothing to pay yet. Fill in the sheet first.', 'no-draft');
  const seen = await readWanted(deps, found, appealVersion);
  const open = await listOpenIntentsOf(deps.db, found.id);
  const same = open.find((one) => isForThis(one, seen));
  if (same?.sessionId) await refuseIfUsed(deps, same, await fetchSession(deps, same.sessionId));
  else if (!same) await closeEarlier(deps, open);
  return deps.db.transaction(async (trx) => {
    const draft = await lockDraft(trx, token);
    if (!draft) throw new Conflict('There is nothing to pay yet. Fill in the sheet first.', 'no-draft');
    const isSame = JSON.stringify(draft.answers) === JSON.stringify(found.answers);
    const { campaignName, ...wanted } = isSame ? seen : await readWanted(deps, draft, appealVersion);
    const again = (await listOpenIntentsOf(trx, draft.id)).find((one) => isForThis(one, wanted));
    return { intent: again ?? (await addIntent(trx, wanted)), campaignName };
  });
}

/** What the payment service is asked; the intent's id stands in every place that comes back to us. */
export function sessionParams(
  deps: Pick<Deps, 'config'>,
  intent: GiftIntent,
  campaignName: string,
): Stripe.Checkout.SessionCreateParams {
  const site = deps.config.publicAddress;
  return {
    mode: 'payment',
    client_reference_id: intent.id,
    metadata: { intent: intent.id },
    payment_intent_data: { metadata: { intent: intent.id }, description: `Gift to ${campaignName}` },
    customer_email: intent.answers.email,
    locale: 'en-GB',
    submit_type: 'donate',
    // Other ways to pay would need accounts of their own in the books; another currency would need a rate.
    allowed_payment_method_types: ['card'],
    adaptive_pricing: { enabled: false },
    success_url: `${site}/give/done?gift=${intent.id}`,
    cancel_url: `${site}/give/check?returned=1`,
    line_items: [
      {
        quantity: 1,
        price_data: {
          currency: 'gbp',
          unit_amount: intent.amountPence,
          product_data: { name: `Gift to ${campaignName}` },
        },
      },
    ],
  };
}

export async function askForSession(deps: Deps, intent: GiftIntent, campaignName: string): Promise<string> {
  let session: Stripe.Checkout.Session;
  try {
    const answer = await deps.payments.checkout.sessions.create(sessionParams(deps, intent, campaignName), {
      idempotencyKey: idempotencyKeyOf(intent.id),
    });
    session = checked(answer, 'checkout.session');
  } catch (error) {
    deps.log.error({ err: error, intentId: intent.id }, 'the card service made no session');
    if (error instanceof deps.payments.errors.StripeInvalidRequestError)
      await deps.db.transaction((trx) => markIntent(trx, intent.id, 'failed', error.message));
    throw new Upstream();
  }
  if (
    session.client_reference_id !== intent.id ||
    session.amount_total !== intent.amountPence ||
    !session.url
  )
    throw new Upstream(
      'The card service answered for another gift. Nothing was taken. Try again in a minute.',
    );
  await deps.db.transaction((trx) =>
    saveSession(trx, intent.id, {
      id: session.id,
      url: session.url,
      expiresAt: new Date(session.expires_at * 1000),
    }),
  );
  return session.url;
}

/**
 * @returns the address of the card page.
 * @throws Conflict `no-draft`, `incomplete` or `wording-changed`, Refused `part-full`, Upstream when the card service is away.
 */
export async function beginCheckout(deps: Deps, press: Press): Promise<{ url: string; intentId: string }> {
  const { intent, campaignName } = await startIntent(deps, press);
  if (intent.sessionUrl) return { url: intent.sessionUrl, intentId: intent.id };
  return { url: await askForSession(deps, intent, campaignName), intentId: intent.id };
}
