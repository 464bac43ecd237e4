// Signing in by address and password, and proving the password once more before secrets change.
import type { Request, RequestHandler, Response } from 'express';
import { Passport } from 'passport';
import { Strategy as LocalStrategy } from 'passport-local';
import { z } from 'zod';
import { signInSchema } from '#shared/accounts/session-schemas.ts';
import { needsSecondFactor } from '#shared/roles.ts';
import type { Deps } from '#server/deps.ts';
import { AppError, Invalid, NotSignedIn } from '#server/platform/errors.ts';
import { parse } from '#server/platform/parse.ts';
import { requestIdOf } from '#server/platform/problems.ts';
import { recordAccountDeed, type AccountDeed, type DeedMeta } from './accounts-audit.ts';
import { checkPassword } from './accounts-service.ts';
import type { AccountRecord } from './accounts-store.ts';
import { isPasswordRight } from './passwords.ts';
import { renewSession, type DeskSession } from './sessions.ts';
import type { Tries } from './tries.ts';
import type { SignInTries } from './sign-in-tries.ts';

// One message for an unknown address, a wrong password and a person switched off.
const REFUSAL = 'That address and password do not belong together. Check both and try again.';

type Checked = Awaited<ReturnType<typeof checkPassword>>;
// The library types what it gives back as anything at all.
const handlerSchema = z.custom<RequestHandler>((value) => typeof value === 'function');
type PasswordQuestion = (req: Request, res: Response) => Promise<Checked>;

function createPasswordQuestion({ db }: Deps): PasswordQuestion {
  const passport = new Passport();
  passport.use(
    new LocalStrategy({ usernameField: 'email', session: false }, (email, password, done) => {
      checkPassword(db, email, password).then((checked) => done(null, checked), done);
    }),
  );
  return (req, res) =>
    new Promise((resolve, reject) => {
      const answer = (error: unknown, checked: Checked | false | undefined): void => {
        if (error) reject(error instanceof Error ? error : new Error('the password could not be checked'));
        else resolve(checked || { account: undefined, knownId: undefined });
      };
      const ask = handlerSchema.parse(passport.authenticate('local', { session: false }, answer));
      void ask(req, res, (error: unknown) => answer(error ?? new Error('no answer'), undefined));
    });
}

export const deedMeta = ({ clock }: Deps, res: Response): DeedMeta => ({
  at: clock.now(),
  requestId: requestIdOf(res),
});

const firstStep = (account: AccountRecord): DeskSession['step'] => {
  if (account.secondFactor) return 'second-factor';
  return needsSecondFactor(account.roles) ? 'second-factor-setup' : 'signed-in';
};

const deedOf = (account: AccountRecord | undefined): AccountDeed => {
  if (!account) return 'sign-in-failed';
  return firstStep(account) === 'signed-in' ? 'signed-in' : 'password-given';
};

/** Without this, nobody could stay signed in and nobody would know why: a Secure cookie is dropped in silence. */
function requireTls({ config }: Deps, req: Request): void {
  if (config.cookie.isSecure && !req.secure)
    throw new AppError(
      500,
      'internal',
      'The desk opens over https alone: the proxy in front must send X-Forwarded-Proto, and TREENAIL_PROXY_HOPS must count it.',
    );
}

/** @throws NotSignedIn with one message for every failure, TooMany while a wait is running. */
export function createSignIn(deps: Deps, tries: SignInTries) {
  const askPassword = createPasswordQuestion(deps);
  return async (req: Request, res: Response): Promise<void> => {
    requireTls(deps, req);
    const { email } = parse(signInSchema, req.body);
    const address = req.ip ?? '';
    await tries.begin(email, address);
    const { account, knownId } = await askPassword(req, res);
    // Written for an unknown address too: otherwise the time taken would tell it from a known one.
    await deps.db.transaction((trx) => recordAccountDeed(trx, deedOf(account), knownId, deedMeta(deps, res)));
    if (!account) throw new NotSignedIn(REFUSAL);
    await tries.succeed(email, address);
    await renewSession(req, account, { step: firstStep(account), startedAt: Date.now() });
  };
}

/** @throws Invalid when it is not the person's present password. */
export async function provePassword(
  deps: Deps,
  input: { account: AccountRecord; password: string | undefined; proofs: Tries },
  meta: DeedMeta,
): Promise<void> {
  const { account, password, proofs } = input;
  if (password === undefined) throw new Invalid({ password: 'Write your password.' });
  await proofs.take(account.id);
  if (await isPasswordRight(account.passwordHash, password)) return proofs.forget(account.id);
  await deps.db.transaction((trx) => recordAccountDeed(trx, 'password-check-failed', account.id, meta));
  throw new Invalid({ password: 'That is not your present password.' });
}
