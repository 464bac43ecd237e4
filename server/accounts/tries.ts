// Slows guessing down: after a few free tries each further one makes the next wait longer. Nobody is locked out for good.
import { createHash } from 'node:crypto';
import { isIPv6 } from 'node:net';
import { RateLimiterRes } from 'rate-limiter-flexible';
import type { Db } from '#server/platform/db.ts';
import { TooMany } from '#server/platform/errors.ts';
import { createLimiter } from '#server/platform/limits.ts';

const remembered = { perSeconds: 60 * 60 };

export type Tries = {
  /** Counts one try before it is made. @throws TooMany while a wait is running. */
  take(key: string): Promise<number>;
  /** The try was no guess after all. */
  giveBack(key: string): Promise<void>;
  forget(key: string): Promise<void>;
};

type Rule = { name: string; free: number; longestWaitSeconds: number };

const waitAfter = ({ free, longestWaitSeconds }: Rule, count: number): number =>
  count <= free ? 0 : Math.min(longestWaitSeconds, 2 ** (count - free));

/** Addresses and e-mails are counted by their digest: the table needs no list of who tried. */
const digest = (key: string): string => createHash('sha256').update(key).digest('base64url');

export function createTries(db: Db, rule: Rule): Tries {
  const counts = createLimiter(
    { db },
    { ...remembered, name: `${rule.name}-count`, points: Number.MAX_SAFE_INTEGER },
  );
  const waits = createLimiter({ db }, { ...remembered, name: `${rule.name}-wait`, points: 1 });
  return {
    async take(key) {
      const name = digest(key);
      // Counted first: a hundred tries at once are a hundred tries.
      const { consumedPoints } = await counts.penalty(name);
      const waitSeconds = waitAfter(rule, consumedPoints);
      if (waitSeconds === 0) return consumedPoints;
      try {
        await waits.consume(name, 1, { customDuration: waitSeconds });
        return consumedPoints;
      } catch (refusal) {
        if (!(refusal instanceof RateLimiterRes)) throw refusal;
        // A try that was refused unseen does not make the wait longer.
        await counts.reward(name);
        throw new TooMany(Math.max(1, Math.ceil(refusal.msBeforeNext / 1000)));
      }
    },
    async giveBack(key) {
      await counts.reward(digest(key));
    },
    async forget(key) {
      await Promise.all([counts.delete(digest(key)), waits.delete(digest(key))]);
    },
  };
}

/** One household or one attacker holds a whole /64 of the longer addresses. */
export function networkOf(address: string): string {
  const bare = address.replace(/^::ffff:(?=\d+\.)/i, '');
  if (!isIPv6(bare)) return bare;
  const [head = '', tail = ''] = bare.split('::');
  const left = head === '' ? [] : head.split(':');
  const right = tail === '' ? [] : tail.split(':');
  const gap = bare.includes('::')
    ? Array.from({ length: Math.max(0, 8 - left.length - right.length) }, () => '0')
    : [];
  return [...left, ...gap, ...right].slice(0, 4).join(':');
}
