// The second factor of a session: given at sign-in, offered, confirmed, and its recovery codes renewed.
import type { Request, Response } from 'express';
import {
  beginSecondFactorSchema,
  oneTimeCodeSchema,
  secondFactorSchema,
  type SecondFactorOffer,
} from '#shared/accounts/session-schemas.ts';
import type { Deps } from '#server/deps.ts';
import type { Trx } from '#server/platform/db.ts';
import { Conflict, Invalid, NotSignedIn } from '#server/platform/errors.ts';
import { parse } from '#server/platform/parse.ts';
import { recordAccountDeed, type DeedMeta } from './accounts-audit.ts';
import { keepSecondFactor, renewRecoveryCodes, takeCode } from './accounts-service.ts';
import { getAccount, type AccountRecord } from './accounts-store.ts';
import { describeSecret, findTimeStep, newSecret } from './one-time-codes.ts';
import { seal, unseal } from './sealing.ts';
import { describeSession, getPresent, renewSession, stepOf } from './sessions.ts';
import { deedMeta, provePassword } from './sign-in.ts';
import type { Tries } from './tries.ts';

// One message for a wrong code, an old one and one that was used before.
const WRONG_CODE = 'That code does not open this. Wait for the next one, then write it.';
const wrongCode = () => new Invalid({ code: WRONG_CODE });

/** Runs `onRight` in the transaction that takes the code. @throws Invalid for a wrong or used one. */
async function proveCode<T>(
  deps: Deps,
  input: { account: AccountRecord; code: string; proofs: Tries; meta: DeedMeta },
  onRight: (trx: Trx) => Promise<T>,
): Promise<T> {
  const { account, code, proofs, meta } = input;
  const { sessionSecret } = deps.config;
  await proofs.take(account.id);
  const outcome = await deps.db.transaction(async (trx) => {
    if (await takeCode(trx, { account, code, sessionSecret }, meta)) return { value: await onRight(trx) };
    await recordAccountDeed(trx, 'second-factor-failed', account.id, meta);
    return undefined;
  });
  if (!outcome) throw wrongCode();
  await proofs.forget(account.id);
  return outcome.value;
}

export async function giveSecondFactor(
  deps: Deps,
  { req, res }: { req: Request; res: Response },
  proofs: Tries,
): Promise<void> {
  const { code } = parse(secondFactorSchema, req.body);
  const { account, desk } = getPresent(req);
  if (desk.step !== 'second-factor') throw new Conflict('No code is asked for now.', 'no-code-asked');
  const meta = deedMeta(deps, res);
  await proveCode(deps, { account, code, proofs, meta }, (trx) =>
    recordAccountDeed(trx, 'signed-in', account.id, meta),
  );
  await renewSession(req, account, { step: 'signed-in', startedAt: desk.startedAt });
}

/** Whoever is already signed in proves password and code again; a password alone never changes a second factor. */
export async function offerSecondFactor(
  deps: Deps,
  { req, res }: { req: Request; res: Response },
  proofs: Tries,
): Promise<SecondFactorOffer> {
  const input = parse(beginSecondFactorSchema, req.body);
  const here = getPresent(req);
  const { account, desk } = here;
  if (desk.step === 'second-factor') throw new NotSignedIn('Give your one-time code first.');
  if (stepOf(here) === 'signed-in') {
    const meta = deedMeta(deps, res);
    const { password, code } = input;
    if (account.secondFactor && code === undefined)
      throw new Invalid({ code: 'Write the six figures that your app shows now.' });
    await provePassword(deps, { account, password, proofs }, meta);
    if (code !== undefined) await proveCode(deps, { account, code, proofs, meta }, () => Promise.resolve());
  }
  const secret = newSecret();
  const pendingSecret = seal(deps.config.sessionSecret, secret);
  await renewSession(req, account, { step: desk.step, startedAt: desk.startedAt, pendingSecret });
  return { ...describeSecret(secret, account.email), session: describeSession(req) };
}

/** @returns the recovery codes, shown this once. */
export async function confirmSecondFactor(
  deps: Deps,
  { req, res }: { req: Request; res: Response },
  proofs: Tries,
): Promise<string[]> {
  const { code } = parse(oneTimeCodeSchema, req.body);
  const { account, desk } = getPresent(req);
  const { pendingSecret } = desk;
  if (desk.step === 'second-factor' || pendingSecret === undefined)
    throw new Conflict('Begin again: there is no picture to confirm.', 'nothing-offered');
  await proofs.take(account.id);
  const step = await findTimeStep(unseal(deps.config.sessionSecret, pendingSecret), code);
  const meta = deedMeta(deps, res);
  if (step === undefined) {
    await deps.db.transaction((trx) => recordAccountDeed(trx, 'second-factor-failed', account.id, meta));
    throw wrongCode();
  }
  const codes = await deps.db.transaction(async (trx) => {
    if (desk.step !== 'signed-in') await recordAccountDeed(trx, 'signed-in', account.id, meta);
    return keepSecondFactor(trx, { accountId: account.id, sealedSecret: pendingSecret, step }, meta);
  });
  await proofs.forget(account.id);
  const renewed = await getAccount(deps.db, account.id);
  await renewSession(req, renewed, { step: 'signed-in', startedAt: desk.startedAt });
  return codes;
}

export async function replaceRecoveryCodesByCode(
  deps: Deps,
  { req, res }: { req: Request; res: Response },
  proofs: Tries,
): Promise<string[]> {
  const { code } = parse(oneTimeCodeSchema, req.body);
  const { account } = getPresent(req);
  const meta = deedMeta(deps, res);
  return proveCode(deps, { account, code, proofs, meta }, (trx) => renewRecoveryCodes(trx, account.id, meta));
}
