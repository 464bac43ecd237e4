// The audit lines of signing in and out: ids only, never an address, a password or a code.
import type { Trx } from '#server/platform/db.ts';
import { recordAudit } from './audit.ts';

export type AccountDeed =
  | 'account-made'
  | 'password-given'
  | 'signed-in'
  | 'sign-in-failed'
  | 'signed-out'
  | 'second-factor-failed'
  | 'second-factor-kept'
  | 'recovery-code-used'
  | 'recovery-codes-renewed'
  | 'password-changed'
  | 'password-check-failed'
  | 'access-refused';

export type DeedMeta = { at: Date; requestId: string | undefined; detail?: Record<string, string> };

// Nobody's deed yet: whoever typed has not wholly shown who they are.
const UNPROVEN: readonly AccountDeed[] = [
  'account-made',
  'password-given',
  'sign-in-failed',
  'second-factor-failed',
  'password-check-failed',
];

/** `accountId` is undefined when an address is nobody's; the line is written all the same. */
export const recordAccountDeed = (
  trx: Trx,
  deed: AccountDeed,
  accountId: string | undefined,
  { at, requestId, detail }: DeedMeta,
): Promise<void> =>
  recordAudit(trx, {
    at,
    actor:
      accountId !== undefined && !UNPROVEN.includes(deed) ? { kind: 'desk', accountId } : { kind: 'system' },
    action: deed,
    objectKind: 'account',
    objectId: accountId ?? 'unknown',
    ...(detail && { detail }),
    ...(requestId !== undefined && { requestId }),
  });
