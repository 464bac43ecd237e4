// Works what the payment service told us, each event once, by asking how its object stands now.
import type { Deps } from '#server/deps.ts';
import { reportError } from '#server/platform/problems.ts';
import { claimEvents, closeEvent, putOffEvent, type InboxEvent } from './event-store.ts';
import { fetchPayment, postFeeOfPayment } from './fee-service.ts';
import { isFeePosted } from './gift-store.ts';
import { findIntentByReference, findIntentBySession } from './intent-store.ts';
import { fetchSession, settleSession } from './settle-session.ts';

/** Taken at once, and worked side by side; fewer than the pool has connections. */
const BATCH = 4;
const MOST_TRIES = 12;

type Verdict = { state: 'worked' | 'ignored' | 'refused'; fault: string | null };
const WORKED: Verdict = { state: 'worked', fault: null };

/**
 * Snapshots may arrive late or out of order, so each event only says what to look at afresh; and when all that
 * it could tell is done already, nobody need be asked.
 */
async function workSessionEvent(deps: Deps, sessionId: string): Promise<Verdict> {
  const known = await findIntentBySession(deps.db, sessionId);
  if (known?.state === 'paid') return WORKED;
  const session = await fetchSession(deps, sessionId);
  const intent = session.client_reference_id
    ? await findIntentByReference(deps.db, session.client_reference_id)
    : undefined;
  if (!intent)
    return {
      state: 'refused',
      fault: 'This payment names no gift of ours. Look at it with the payment service.',
    };
  await settleSession(deps, intent, session);
  return WORKED;
}

/** The fee's balance transaction comes after the payment; this is how we hear of it. */
async function workChargeEvent(deps: Deps, paymentId: string | null): Promise<Verdict> {
  if (paymentId && !(await isFeePosted(deps.db, paymentId)))
    await postFeeOfPayment(deps, await fetchPayment(deps, paymentId));
  return WORKED;
}

async function workEvent(deps: Deps, event: InboxEvent): Promise<Verdict> {
  if (event.type.startsWith('checkout.session.')) return workSessionEvent(deps, event.objectId);
  if (event.type === 'charge.updated') return workChargeEvent(deps, event.paymentId);
  return { state: 'ignored', fault: null };
}

async function workOne(deps: Deps, event: InboxEvent): Promise<void> {
  try {
    const verdict = await workEvent(deps, event);
    await deps.db.transaction((trx) =>
      closeEvent(trx, event.id, verdict.state, deps.clock.now(), verdict.fault),
    );
  } catch (error) {
    reportError(deps.log, error, { eventId: event.id, type: event.type });
    const words = error instanceof Error ? error.message : 'unknown fault';
    await deps.db.transaction((trx) =>
      event.tries >= MOST_TRIES
        ? closeEvent(trx, event.id, 'refused', deps.clock.now(), words)
        : putOffEvent(trx, event, words),
    );
  }
}

/** Works all that waits; several workers may do so at once. @returns how many were taken. */
export async function workPaymentEvents(deps: Deps): Promise<number> {
  let taken = 0;
  for (;;) {
    const events = await deps.db.transaction((trx) => claimEvents(trx, BATCH));
    if (events.length === 0) return taken;
    taken += events.length;
    await Promise.all(events.map((event) => workOne(deps, event)));
  }
}
