// Finds what no webhook told: open sessions that were paid or ran out, sessions whose answer was lost, late fees.
import type { Deps } from '#server/deps.ts';
import { reportError } from '#server/platform/problems.ts';
import { fetchPayment, postFeeOfPayment } from './fee-service.ts';
import { listPaymentsWithoutFee } from './gift-store.ts';
import { listIntentsDue, markChecked, markIntent, saveSession, type GiftIntent } from './intent-store.ts';
import { fetchSession, settleSession } from './settle-session.ts';

const BATCH = 100;
/** A session whose answer was lost is looked for this long; by then it has run out in any case. */
const LOST_FOR_GOOD_MS = 25 * 60 * 60_000;
const CREATED_SLACK_SECONDS = 300;

/** Our row stands but the call's answer was lost: look for the session by the reference we gave it. */
async function findLostSession(deps: Deps, intent: GiftIntent): Promise<void> {
  const from = Math.floor(intent.createdAt.getTime() / 1000) - CREATED_SLACK_SECONDS;
  const to = from + LOST_FOR_GOOD_MS / 1000;
  for await (const session of deps.payments.checkout.sessions.list({
    created: { gte: from, lte: to },
    limit: 100,
  })) {
    if (session.client_reference_id !== intent.id) continue;
    await deps.db.transaction((trx) =>
      saveSession(trx, intent.id, {
        id: session.id,
        url: session.url,
        expiresAt: new Date(session.expires_at * 1000),
      }),
    );
    await settleSession(deps, intent, await fetchSession(deps, session.id));
    return;
  }
  const isGone = deps.clock.now().getTime() - intent.createdAt.getTime() > LOST_FOR_GOOD_MS;
  await deps.db.transaction(async (trx) => {
    await markChecked(trx, intent.id, deps.clock.now());
    if (isGone) await markIntent(trx, intent.id, 'failed', 'no session was ever made');
  });
}

async function lookAt(deps: Deps, intent: GiftIntent): Promise<void> {
  try {
    if (intent.sessionId) await settleSession(deps, intent, await fetchSession(deps, intent.sessionId));
    else await findLostSession(deps, intent);
  } catch (error) {
    reportError(deps.log, error, { intentId: intent.id, during: 'poll' });
    await deps.db.transaction((trx) => markChecked(trx, intent.id, deps.clock.now()));
  }
}

async function lookForFee(deps: Deps, paymentIntentId: string): Promise<void> {
  try {
    await postFeeOfPayment(deps, await fetchPayment(deps, paymentIntentId));
  } catch (error) {
    reportError(deps.log, error, { paymentIntentId, during: 'poll' });
  }
}

export async function pollPayments(deps: Deps): Promise<void> {
  for (const intent of await listIntentsDue(deps.db, deps.clock.now(), BATCH)) await lookAt(deps, intent);
  for (const paymentId of await listPaymentsWithoutFee(deps.db, BATCH)) await lookForFee(deps, paymentId);
}
