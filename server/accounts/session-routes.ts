// Signing in and out and "who am I", at /api/session.
import { Router } from 'express';
import {
  secondFactorKeptSchema,
  secondFactorOfferSchema,
  sessionSchema,
} from '#shared/accounts/session-schemas.ts';
import type { Deps } from '#server/deps.ts';
import { recordAccountDeed } from './accounts-audit.ts';
import { requireToken } from './require-desk.ts';
import { confirmSecondFactor, giveSecondFactor, offerSecondFactor } from './second-factor.ts';
import { describeSession, endSession, findPresent, deskSessions } from './sessions.ts';
import { createSignIn, deedMeta } from './sign-in.ts';
import { createSignInTries } from './sign-in-tries.ts';

export function createSessionRouter(deps: Deps): Router {
  const router = Router();
  const tries = createSignInTries(deps.db);
  const signIn = createSignIn(deps, tries);
  router.use(deskSessions(deps));

  router.get('/', (req, res) => {
    res.json(sessionSchema.parse(describeSession(req)));
  });
  // Before the token is asked for: whoever signs in has none yet, and an old session need not be ended first.
  router.post('/', async (req, res) => {
    await signIn(req, res);
    res.json(sessionSchema.parse(describeSession(req)));
  });

  router.use(requireToken);
  router.delete('/', async (req, res) => {
    const found = findPresent(req);
    if (found) {
      const { account } = found;
      await deps.db.transaction((trx) =>
        recordAccountDeed(trx, 'signed-out', account.id, deedMeta(deps, res)),
      );
      await endSession(req);
    }
    const { name, isSecure } = deps.config.cookie;
    res.clearCookie(name, { path: '/', httpOnly: true, sameSite: 'lax', secure: isSecure });
    res.json(sessionSchema.parse(describeSession(req)));
  });
  router.post('/second-factor', async (req, res) => {
    await giveSecondFactor(deps, { req, res }, tries.proofs);
    res.json(sessionSchema.parse(describeSession(req)));
  });
  router.post('/second-factor/setup', async (req, res) => {
    res.json(secondFactorOfferSchema.parse(await offerSecondFactor(deps, { req, res }, tries.proofs)));
  });
  router.post('/second-factor/setup/confirm', async (req, res) => {
    const recoveryCodes = await confirmSecondFactor(deps, { req, res }, tries.proofs);
    res.json(secondFactorKeptSchema.parse({ recoveryCodes, session: describeSession(req) }));
  });
  return router;
}
