// The audit lines of what changed of a supporter: the values stand apart, where an erasure can clear them.
import { recordAudit } from '#server/accounts/index.ts';
import type { Trx } from '#server/platform/db.ts';

export type SupporterDeed = 'supporter-recorded' | 'supporter-filled' | 'supporter-name-withheld';
export type PersonalChange = { field: string; before: string | null; after: string | null };

/** By the giver's own hand: a public form is all that writes here. */
export const recordSupporter = (
  trx: Trx,
  deed: SupporterDeed,
  { id, at }: { id: string; at: Date },
  changes: readonly PersonalChange[],
): Promise<void> =>
  recordAudit(trx, {
    at,
    actor: { kind: 'giver', supporterId: id },
    action: deed,
    objectKind: 'supporter',
    objectId: id,
    personal: changes.map((change) => ({ personKind: 'supporter', personId: id, ...change })),
  });
