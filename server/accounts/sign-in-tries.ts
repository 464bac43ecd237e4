// Which tries are counted at sign-in, and why no stranger can keep the treasurer out.
import { setTimeout as pause } from 'node:timers/promises';
import type { Db } from '#server/platform/db.ts';
import { createTries, networkOf, type Tries } from './tries.ts';

const SLOW_AFTER = 10;
const SLOWER_BY_MS = 250;
const SLOWEST_MS = 4000;

export type SignInTries = {
  begin(email: string, address: string): Promise<void>;
  succeed(email: string, address: string): Promise<void>;
  /** Codes and present passwords, by the person's id. */
  proofs: Tries;
};

export function createSignInTries(db: Db): SignInTries {
  // From one network: many accounts tried with one password.
  const networks = createTries(db, { name: 'sign-in-network', free: 20, longestWaitSeconds: 300 });
  // One account from one network: the usual guessing.
  const pairs = createTries(db, { name: 'sign-in-pair', free: 5, longestWaitSeconds: 900 });
  // One account from everywhere. This one only slows the answer and never refuses: a refusal here would
  // let strangers keep the right person out.
  const accounts = createTries(db, { name: 'sign-in-account', free: Infinity, longestWaitSeconds: 0 });
  const proofs = createTries(db, { name: 'proof', free: 5, longestWaitSeconds: 300 });
  const pair = (email: string, address: string): string => `${email.toLowerCase()} ${networkOf(address)}`;

  return {
    async begin(email, address) {
      await networks.take(networkOf(address));
      await pairs.take(pair(email, address));
      const count = await accounts.take(email.toLowerCase());
      if (count > SLOW_AFTER) await pause(Math.min(SLOWEST_MS, (count - SLOW_AFTER) * SLOWER_BY_MS));
    },
    async succeed(email, address) {
      await Promise.all([
        networks.giveBack(networkOf(address)),
        pairs.forget(pair(email, address)),
        accounts.forget(email.toLowerCase()),
      ]);
    },
    proofs,
  };
}
