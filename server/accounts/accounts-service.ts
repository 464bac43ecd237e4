// What can be done with an account: made, proven by password and by code, given new secrets.
import type { Role } from '#shared/roles.ts';
import { isOneTimeCode } from '#shared/accounts/session-schemas.ts';
import type { Db, Trx } from '#server/platform/db.ts';
import { recordAccountDeed, type DeedMeta } from './accounts-audit.ts';
import {
  countDemonstrationAccounts,
  findAccountByEmail,
  insertAccount,
  replaceRecoveryCodes,
  takeRecoveryCode,
  takeTimeStep,
  updatePassword,
  updateSecondFactor,
  type AccountRecord,
} from './accounts-store.ts';
import { findTimeStep, hashRecoveryCode, newRecoveryCodes } from './one-time-codes.ts';
import { hashPassword, isPasswordRight } from './passwords.ts';
import { seal, unseal } from './sealing.ts';
import { endSessionsOf } from './session-store.ts';

export type NewAccount = {
  name: string;
  email: string;
  password: string;
  roles: readonly Role[];
  isTrustee?: boolean;
  isDemonstration?: boolean;
  /** A second factor that is already confirmed, sealed with the application's session secret. */
  secondFactor?: { secret: string; sessionSecret: string };
  createdAt: Date;
};

export async function createAccount(trx: Trx, account: NewAccount): Promise<string> {
  const { secondFactor } = account;
  const id = await insertAccount(trx, {
    name: account.name,
    email: account.email.trim(),
    passwordHash: await hashPassword(account.password),
    roles: account.roles,
    isTrustee: account.isTrustee ?? false,
    isDemonstration: account.isDemonstration ?? false,
    sealedSecret: secondFactor ? seal(secondFactor.sessionSecret, secondFactor.secret) : null,
    createdAt: account.createdAt,
  });
  await recordAccountDeed(trx, 'account-made', id, { at: account.createdAt, requestId: undefined });
  return id;
}

/** @throws when people who exist for show only could sign in to a live society. */
export async function refuseDemonstrationAccounts(db: Db): Promise<void> {
  const count = await countDemonstrationAccounts(db);
  if (count > 0)
    throw new Error(
      `Switch off the demonstration accounts before going live: ${count} can still sign in (accounts.is_demonstration)`,
    );
}

/** The person, when address and password belong together and they may sign in; else what is known for the log. */
export async function checkPassword(
  db: Db,
  email: string,
  password: string,
): Promise<{ account: AccountRecord | undefined; knownId: string | undefined }> {
  const found = await findAccountByEmail(db, email);
  const isRight = await isPasswordRight(found?.passwordHash, password);
  const account = isRight && found && !found.isSwitchedOff ? found : undefined;
  return { account, knownId: found?.id };
}

/** Takes the code when it is right and was never used. */
export async function takeCode(
  trx: Trx,
  input: { account: AccountRecord; code: string; sessionSecret: string },
  meta: DeedMeta,
): Promise<boolean> {
  const { account, code, sessionSecret } = input;
  if (!account.secondFactor) return false;
  if (isOneTimeCode(code)) {
    const step = await findTimeStep(unseal(sessionSecret, account.secondFactor.sealedSecret), code);
    return step !== undefined && (await takeTimeStep(trx, account.id, step));
  }
  // A code is used up on the real clock's day, like the sessions it opens.
  const isTaken = await takeRecoveryCode(trx, account.id, hashRecoveryCode(code), new Date());
  if (isTaken) await recordAccountDeed(trx, 'recovery-code-used', account.id, meta);
  return isTaken;
}

/** Puts the confirmed secret in the place of any earlier one; other open sessions end. */
export async function keepSecondFactor(
  trx: Trx,
  input: { accountId: string; sealedSecret: string; step: number },
  meta: DeedMeta,
): Promise<string[]> {
  await updateSecondFactor(trx, input.accountId, { ...input, at: meta.at });
  await endSessionsOf(trx, input.accountId);
  await recordAccountDeed(trx, 'second-factor-kept', input.accountId, meta);
  return writeRecoveryCodes(trx, input.accountId);
}

async function writeRecoveryCodes(trx: Trx, accountId: string): Promise<string[]> {
  const codes = newRecoveryCodes();
  await replaceRecoveryCodes(trx, accountId, codes.map(hashRecoveryCode));
  return codes;
}

export async function renewRecoveryCodes(trx: Trx, accountId: string, meta: DeedMeta): Promise<string[]> {
  await recordAccountDeed(trx, 'recovery-codes-renewed', accountId, meta);
  return writeRecoveryCodes(trx, accountId);
}

/** Other open sessions end: whoever learned the old password is out. */
export async function changePassword(
  trx: Trx,
  input: { accountId: string; newPassword: string },
  meta: DeedMeta,
): Promise<void> {
  await updatePassword(trx, input.accountId, await hashPassword(input.newPassword));
  await endSessionsOf(trx, input.accountId);
  await recordAccountDeed(trx, 'password-changed', input.accountId, meta);
}
