// Which page somebody must pass before the desk opens.
import type { SessionStep } from '#shared/accounts/session-schemas.ts';
import { accountPaths, withNext } from './account-paths.ts';

const DOORS: Record<Exclude<SessionStep, 'signed-in'>, string> = {
  'signed-out': accountPaths.signIn,
  'second-factor': accountPaths.secondFactor,
  'second-factor-setup': accountPaths.secondFactorSetup,
};

/** Null when nothing stands between the person and the desk. */
export const doorOf = (step: SessionStep, next: string): string | null =>
  step === 'signed-in' ? null : withNext(DOORS[step], next);
