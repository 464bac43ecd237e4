// A person's own account, at /api/desk/account: mounted behind requireDesk.
import { Router, type Request } from 'express';
import {
  accountSchema,
  changePasswordSchema,
  recoveryCodesSchema,
  sessionSchema,
  type Account,
} from '#shared/accounts/session-schemas.ts';
import { repeatsPerson } from '#shared/accounts/password-rules.ts';
import { needsSecondFactor } from '#shared/roles.ts';
import type { Deps } from '#server/deps.ts';
import type { Db } from '#server/platform/db.ts';
import { Invalid } from '#server/platform/errors.ts';
import { parse } from '#server/platform/parse.ts';
import { changePassword } from './accounts-service.ts';
import { countRecoveryCodes, getAccount } from './accounts-store.ts';
import { replaceRecoveryCodesByCode } from './second-factor.ts';
import { describeSession, getPresent, renewSession } from './sessions.ts';
import { deedMeta, provePassword } from './sign-in.ts';
import { createSignInTries } from './sign-in-tries.ts';

async function describeAccount(db: Db, req: Request): Promise<Account> {
  const { account } = getPresent(req);
  const { name, email, isTrustee, secondFactor } = account;
  return accountSchema.parse({
    name,
    email,
    roles: account.roles,
    isTrustee,
    secondFactor: {
      isOn: secondFactor !== undefined,
      isNeeded: needsSecondFactor(account.roles),
      since: secondFactor?.since.toISOString() ?? null,
      recoveryCodesLeft: await countRecoveryCodes(db, account.id),
    },
  });
}

export function createAccountRouter(deps: Deps): Router {
  const router = Router();
  const { proofs } = createSignInTries(deps.db);

  router.get('/', async (req, res) => {
    res.json(await describeAccount(deps.db, req));
  });
  router.post('/password', async (req, res) => {
    const { password, newPassword } = parse(changePasswordSchema, req.body);
    const { account, desk } = getPresent(req);
    if (repeatsPerson(newPassword, account))
      throw new Invalid({
        newPassword: 'Your own name or address is too easily guessed. Choose something else.',
      });
    const meta = deedMeta(deps, res);
    await provePassword(deps, { account, password, proofs }, meta);
    await deps.db.transaction((trx) => changePassword(trx, { accountId: account.id, newPassword }, meta));
    await renewSession(req, await getAccount(deps.db, account.id), {
      step: desk.step,
      startedAt: desk.startedAt,
    });
    res.json(sessionSchema.parse(describeSession(req)));
  });
  router.post('/recovery-codes', async (req, res) => {
    const recoveryCodes = await replaceRecoveryCodesByCode(deps, { req, res }, proofs);
    res.json(recoveryCodesSchema.parse({ recoveryCodes }));
  });
  return router;
}
