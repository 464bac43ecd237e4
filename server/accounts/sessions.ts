// The session of somebody at the desk: who, how far proven, and for how long. Public pages have none.
import { randomBytes } from 'node:crypto';
import { Router, type Request, type RequestHandler } from 'express';
import session from 'express-session';
import { SIGNED_OUT, type Session, type SessionStep } from '#shared/accounts/session-schemas.ts';
import { needsSecondFactor } from '#shared/roles.ts';
import type { Deps } from '#server/deps.ts';
import { NotSignedIn } from '#server/platform/errors.ts';
import { findAccount, type AccountRecord } from './accounts-store.ts';
import { ABSOLUTE_MS, createSessionStore, touchSession } from './session-store.ts';

const TOUCH_EVERY_MS = 60_000;
const ID_BYTES = 32;

export type DeskSession = {
  accountId: string;
  step: Exclude<SessionStep, 'signed-out'>;
  token: string;
  // Sessions run on the real clock: the demonstration's own may be moved by months.
  startedAt: number;
  seenAt: number;
  /** Sealed; offered, not yet confirmed. */
  pendingSecret?: string;
};
declare module 'express-session' {
  interface SessionData {
    desk?: DeskSession;
  }
}

export type Present = { account: AccountRecord; desk: DeskSession };
const present = new WeakMap<Request, Present>();

export const findPresent = (req: Request): Present | undefined => present.get(req);

/** @throws NotSignedIn unless a session stands behind the request, at whatever step. */
export function getPresent(req: Request): Present {
  const found = present.get(req);
  if (!found) throw new NotSignedIn();
  return found;
}

/** Roles may have grown since the sign-in: what counts is what the person's row says now. */
export const stepOf = ({ account, desk }: Present): DeskSession['step'] =>
  desk.step === 'signed-in' && needsSecondFactor(account.roles) && !account.secondFactor
    ? 'second-factor-setup'
    : desk.step;

/** What the browser is told; a name only once everything is proven. */
export function describeSession(req: Request): Session {
  const found = present.get(req);
  if (!found) return SIGNED_OUT;
  const { name, email, roles, isTrustee } = found.account;
  const step = stepOf(found);
  return {
    person: step === 'signed-in' ? { name, email, roles: [...roles], isTrustee } : null,
    step,
    token: found.desk.token,
  };
}

export const randomText = (): string => randomBytes(ID_BYTES).toString('base64url');

const settle =
  (resolve: () => void, reject: (error: Error) => void) =>
  (error?: unknown): void =>
    error ? reject(error instanceof Error ? error : new Error('the session store failed')) : resolve();

/** A new id and a new token; the old id opens nothing any more. */
export async function renewSession(
  req: Request,
  account: AccountRecord,
  data: Pick<DeskSession, 'step' | 'startedAt' | 'pendingSecret'>,
): Promise<DeskSession> {
  const desk: DeskSession = { ...data, accountId: account.id, token: randomText(), seenAt: Date.now() };
  await new Promise<void>((resolve, reject) => req.sessionStore.regenerate(req, settle(resolve, reject)));
  req.session.desk = desk;
  // Kept before we answer, so that a success is never told of a session that could not be written.
  await new Promise<void>((resolve, reject) => req.session.save(settle(resolve, reject)));
  present.set(req, { account, desk });
  return desk;
}

export async function endSession(req: Request): Promise<void> {
  present.delete(req);
  await new Promise<void>((resolve, reject) => req.session.destroy(settle(resolve, reject)));
}

// What an open page asks by itself, once a minute, is no sign of life: else a forgotten window would never time out.
const ASKED_BY_ITSELF = new Set(['GET /api/desk/today']);
const isSignOfLife = (req: Request): boolean =>
  !ASKED_BY_ITSELF.has(`${req.method} ${req.originalUrl.split('?')[0]}`);

const isOver = (desk: DeskSession, now: number): boolean => now - desk.startedAt > ABSOLUTE_MS;

/** Looks at the person's own row on every request: whoever is switched off is out at once. */
const keepSession =
  ({ db }: Deps): RequestHandler =>
  async (req, res, next) => {
    res.setHeader('Cache-Control', 'no-store');
    const desk = req.session.desk;
    if (!desk) return next();
    const account = await findAccount(db, desk.accountId);
    const now = Date.now();
    if (!account || account.isSwitchedOff || isOver(desk, now)) await endSession(req);
    else {
      if (isSignOfLife(req) && now - desk.seenAt > TOUCH_EVERY_MS)
        await touchSession(db, req.sessionID, desk.startedAt);
      present.set(req, { account, desk });
    }
    next();
  };

const made = new WeakMap<Deps, Router>();

/** One store for all; stands under /api/session and /api/desk alone, so public pages set no cookie of the desk. */
export function deskSessions(deps: Deps): Router {
  const known = made.get(deps);
  if (known) return known;
  const { config } = deps;
  const router = Router();
  router.use(
    session({
      name: config.cookie.name,
      secret: config.sessionSecret,
      store: createSessionStore(deps.db, deps.log),
      genid: randomText,
      resave: false,
      saveUninitialized: false,
      cookie: { path: '/', httpOnly: true, sameSite: 'lax', secure: config.cookie.isSecure },
    }),
    keepSession(deps),
  );
  made.set(deps, router);
  return router;
}
