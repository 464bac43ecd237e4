// Works what the payment service told us, each event once, by asking how its object stands now.
import type { Deps } from '#server/deps.ts';
import { reportError } from '#server/platform/problems.ts';
import { claimEvents, closeEvent, putOffEvent, type InboxEvent } from './event-store.ts';
import { fetchPayment, postFeeOfPayment } from './fee-service.ts';
import { findIntentByReference } from './intent-store.ts';
import { fetchSession, settleSession } from './settle-session.ts';
import { paymentOfCharge } from './payment-lookup.ts';

const BATCH = 20;
const MOST_TRIES = 12;

type Verdict = { state: 'worked' | 'ignored' | 'refused'; fault: string | null };
const WORKED: Verdict = { state: 'worked', fault: null };

/** Snapshots may arrive late or out of order, so each event only says what to look at afresh. */
async function workSessionEvent(deps: Deps, sessionId: string): Promise<Verdict> {
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

async function workChargeEvent(deps: Deps, chargeId: string): Promise<Verdict> {
  const paymentId = await paymentOfCharge(deps, chargeId);
  if (paymentId) await postFeeOfPayment(deps, await fetchPayment(deps, paymentId));
  return WORKED;
}

async function workEvent(deps: Deps, event: InboxEvent): Promise<Verdict> {
  if (event.type.startsWith('checkout.session.')) return workSessionEvent(deps, event.objectId);
  if (event.type === 'charge.updated' || event.type === 'charge.succeeded')
    return workChargeEvent(deps, event.objectId);
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
    for (const event of events) await workOne(deps, event);
  }
}
