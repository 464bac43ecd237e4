// From a checked sheet to the card page: own row first, then the call, then what the call answered.
import type Stripe from 'stripe';
import { z } from 'zod';
import { chosenSum, tidyPostcode, type GiveFormFilled } from '#shared/giving/give-schemas.ts';
import type { Deps } from '#server/deps.ts';
import { getAppealWording } from '#server/campaign/index.ts';
import type { Trx } from '#server/platform/db.ts';
import { Conflict, Refused, Upstream } from '#server/platform/errors.ts';
import { checked } from '#server/platform/payments.ts';
import { getWording } from '#server/society/index.ts';
import { judgeAnswers, readRules } from './draft-service.ts';
import { lockDraft } from './draft-store.ts';
import { addIntent, findOpenIntentOf, markIntent, saveSession, type GiftIntent } from './intent-store.ts';

/** After a day the payment service may forget a key, and the same key would make a second session. */
const KEY_HOLDS_MS = 23 * 60 * 60 * 1000;

export const idempotencyKeyOf = (intentId: string): string => `gi:${intentId}:1`;

const sortedSchema = z.record(z.string(), z.string());
const sameAnswers = (one: GiveFormFilled, other: GiveFormFilled): boolean => {
  const flat = (answers: GiveFormFilled) =>
    JSON.stringify(Object.entries(sortedSchema.parse(answers)).sort());
  return flat(one) === flat(other);
};

/** Settles what the giver means before the gift is asked for: names tidied, unused fields emptied. */
export function settleAnswers(answers: GiveFormFilled): GiveFormFilled {
  const noDedication = { dedicationName: '', contactName: '', contactEmail: '', contactSum: '' as const };
  return {
    ...answers,
    ...(answers.dedication === 'none' && noDedication),
    wallWords: answers.wall === 'wall' ? answers.wallWords : '',
    postcode: tidyPostcode(answers.postcode) ?? answers.postcode,
    greeting: answers.greeting || answers.name,
  };
}

const isStillGood = (open: GiftIntent, now: Date): boolean =>
  open.sessionExpiresAt === null
    ? now.getTime() - open.createdAt.getTime() < KEY_HOLDS_MS
    : open.sessionExpiresAt > now;

type Started = { intent: GiftIntent; campaignName: string };
/** Whose draft, and which version of the appeal stood on the page that was pressed. */
export type Press = { token: string | undefined; appealVersion: number };

/** The intent for the draft as it stands: the open one when nothing changed, so that a second press is harmless. */
async function startIntent(deps: Deps, trx: Trx, { token, appealVersion }: Press): Promise<Started> {
  const draft = await lockDraft(trx, token);
  if (!draft) throw new Conflict('There is nothing to pay yet. Fill in the sheet first.', 'no-draft');
  const rules = await readRules(deps);
  const verdict = judgeAnswers(draft.answers, rules);
  if (verdict.faults) {
    if (Object.keys(verdict.faults).join() === 'towards')
      throw new Refused(verdict.faults.towards ?? '', 'part-full');
    throw new Conflict('Some answers need putting right first.', 'incomplete');
  }
  const answers = settleAnswers(verdict.answers);
  const campaignName = rules.standing.campaign.name;
  const now = deps.clock.now();
  const appeal = await getAppealWording(trx, rules.standing.campaign.id, now);
  if (appeal.version !== appealVersion)
    throw new Conflict(
      'The words of the appeal have changed since you saw them. Please look once more.',
      'wording-changed',
    );
  const open = await findOpenIntentOf(trx, draft.id);
  if (open && isStillGood(open, now) && sameAnswers(open.answers, answers))
    return { intent: open, campaignName };
  const sum = chosenSum(answers, { leastPence: rules.leastPence });
  if ('fault' in sum) throw new Conflict(sum.fault, 'incomplete');
  const intent = await addIntent(trx, {
    draftId: draft.id,
    amountPence: sum.pence,
    partId: rules.standing.parts.find((part) => part.slug === answers.towards)?.id ?? null,
    appealWordingId: appeal.id,
    declarationWordingId: answers.declare === 'on' ? (await getWording(trx, 'declaration', now)).id : null,
    consentWordingId: (await getWording(trx, 'consent', now)).id,
    answers,
    createdAt: now,
  });
  return { intent, campaignName };
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
  const { intent, campaignName } = await deps.db.transaction((trx) => startIntent(deps, trx, press));
  if (intent.sessionUrl) return { url: intent.sessionUrl, intentId: intent.id };
  return { url: await askForSession(deps, intent, campaignName), intentId: intent.id };
}
