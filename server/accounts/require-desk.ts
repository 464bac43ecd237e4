// Guards everything below /api/desk: who is signed in, what their roles open, and whether a page of ours asked.
import { timingSafeEqual } from 'node:crypto';
import { Router, type Request, type RequestHandler, type Response } from 'express';
import { TOKEN_HEADER } from '#shared/accounts/session-schemas.ts';
import type { Role } from '#shared/roles.ts';
import type { Deps } from '#server/deps.ts';
import { NotAllowed, NotSignedIn } from '#server/platform/errors.ts';
import { isSafeMethod } from '#server/platform/own-origin.ts';
import { requestIdOf } from '#server/platform/problems.ts';
import { recordAccountDeed } from './accounts-audit.ts';
import { deskSessions, findPresent, getPresent, stepOf } from './sessions.ts';

export type DeskPerson = {
  accountId: string;
  name: string;
  roles: readonly Role[];
  isTrustee: boolean;
};

const isSame = (given: string, expected: string): boolean => {
  const [left, right] = [Buffer.from(given), Buffer.from(expected)];
  return left.length === right.length && timingSafeEqual(left, right);
};

/** The session's own token in a header of ours: another site can send our cookie, but cannot read or write this. */
export const requireToken: RequestHandler = (req, _res, next) => {
  const found = findPresent(req);
  if (!found || isSafeMethod(req.method)) return next();
  if (!isSame(req.get(TOKEN_HEADER) ?? '', found.desk.token))
    throw new NotAllowed(
      'This page is older than your sign-in. Load it again, then repeat what you did.',
      'stale-token',
    );
  next();
};

const requireSignedIn: RequestHandler = (req, _res, next) => {
  const step = stepOf(getPresent(req));
  if (step === 'second-factor') throw new NotSignedIn('Give your one-time code first.');
  if (step === 'second-factor-setup')
    throw new NotAllowed('Set up your second factor first: your roles need it.', 'second-factor-setup');
  next();
};

// requireRole is written beside a route without the dependencies; the guard before it has put them here.
const guards = new WeakMap<Request, Deps>();

export function requireDesk(deps: Deps): Router {
  const router = Router();
  router.use(deskSessions(deps), requireSignedIn, requireToken, (req, _res, next) => {
    guards.set(req, deps);
    next();
  });
  return router;
}

async function recordRefusal(req: Request, res: Response): Promise<void> {
  const deps = guards.get(req);
  if (!deps) return;
  const detail = { method: req.method, path: req.baseUrl + req.path };
  const meta = { at: deps.clock.now(), requestId: requestIdOf(res), detail };
  await deps.db.transaction((trx) =>
    recordAccountDeed(trx, 'access-refused', deskPerson(req).accountId, meta),
  );
}

/** The chair may read everything; to change something, one of the roles themselves is needed. */
export const requireRole =
  (...roles: Role[]): RequestHandler =>
  async (req, res, next) => {
    const { roles: held } = deskPerson(req);
    const opens = isSafeMethod(req.method) ? [...roles, 'chair' as const] : roles;
    if (held.some((role) => opens.includes(role))) return next();
    await recordRefusal(req, res);
    throw new NotAllowed();
  };

export function deskPerson(req: Request): DeskPerson {
  const { account } = getPresent(req);
  return { accountId: account.id, name: account.name, roles: account.roles, isTrustee: account.isTrustee };
}
