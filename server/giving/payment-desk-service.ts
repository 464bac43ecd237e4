// The treasurer looked at a payment that does not agree or at a refused event, and says how it was put right.
import { z } from 'zod';
import type { PaymentKind, SettlePayment } from '#shared/giving/desk-schemas.ts';
import { recordAudit } from '#server/accounts/index.ts';
import type { Deps } from '#server/deps.ts';
import type { Trx } from '#server/platform/db.ts';
import { Conflict, NotFound, Refused } from '#server/platform/errors.ts';
import { INTENT_HANDLE_SQL } from './payment-handles.ts';

type Looked = SettlePayment & { kind: PaymentKind; handle: string; requestId: string | undefined };

const KINDS = {
  intent: { table: 'gift_intents', stuck: 'mismatched', objectKind: 'gift-intent' },
  event: { table: 'payment_events', stuck: 'refused', objectKind: 'payment-event' },
} as const;

const lockedSchema = z.object({ id: z.string(), state: z.string(), settled_at: z.date().nullable() });

async function lockPayment(trx: Trx, kind: PaymentKind, handle: string) {
  const found: unknown = await trx(KINDS[kind].table)
    .whereRaw(kind === 'intent' ? `${INTENT_HANDLE_SQL} = ?` : 'id = ?', [handle])
    .forUpdate()
    .first('id', 'state', 'settled_at');
  if (found === undefined) throw new NotFound('There is no such payment.');
  return lockedSchema.parse(found);
}

/** @throws NotFound, Conflict when it was settled meanwhile, Refused when it does not wait for a person */
export async function settlePayment(
  deps: Deps,
  trx: Trx,
  person: { accountId: string },
  { kind, handle, reason, requestId }: Looked,
): Promise<void> {
  const payment = await lockPayment(trx, kind, handle);
  const { table, stuck, objectKind } = KINDS[kind];
  if (payment.settled_at !== null)
    throw new Conflict(
      'Somebody else has settled this meanwhile. Load the page again to see.',
      'payment-settled',
    );
  if (payment.state !== stuck)
    throw new Refused('This payment goes on by itself: there is nothing to settle.', 'nothing-to-settle');
  const at = deps.clock.now();
  await trx(table)
    .where({ id: payment.id })
    .update({ settled_at: at, settled_by: person.accountId, settled_reason: reason });
  await recordAudit(trx, {
    at,
    actor: { kind: 'desk', accountId: person.accountId },
    action: 'payment-looked-at',
    objectKind,
    objectId: payment.id,
    detail: { kind, id: handle },
    ...(requestId !== undefined && { requestId }),
  });
}
