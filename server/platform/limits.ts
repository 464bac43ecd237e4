// Slows down whoever tries too often, counted in the database so that every process counts as one.
import type { RequestHandler } from 'express';
import { RateLimiterMemory, RateLimiterPostgres, RateLimiterRes } from 'rate-limiter-flexible';
import type { Deps } from '#server/deps.ts';
import type { Trx } from './db.ts';
import { TooMany } from './errors.ts';

type Limit = { name: string; points: number; perSeconds: number };

export function createLimiter(deps: Pick<Deps, 'db'>, limit: Limit): RateLimiterPostgres {
  return new RateLimiterPostgres({
    storeClient: deps.db,
    storeType: 'knex',
    tableName: 'rate_limit',
    tableCreated: true,
    keyPrefix: limit.name,
    points: limit.points,
    duration: limit.perSeconds,
    clearExpiredByTimeout: false,
    // With the database away the page has other troubles; the count goes on in memory.
    insuranceLimiter: new RateLimiterMemory({ points: limit.points, duration: limit.perSeconds }),
  });
}

/** Counts that ran out an hour ago are of no more use; the library keeps them by the real clock. */
export async function dropOldTries(trx: Trx): Promise<void> {
  await trx.raw(`delete from rate_limit where expire < (extract(epoch from now()) - 3600) * 1000`);
}

/** Limits by the address that the trusted proxy names; a market square behind one address still fits. */
export function limitTries(deps: Pick<Deps, 'db'>, limit: Limit): RequestHandler {
  const limiter = createLimiter(deps, limit);
  return async (req, _res, next) => {
    try {
      await limiter.consume(req.ip ?? 'unknown');
    } catch (refusal) {
      if (refusal instanceof RateLimiterRes) throw new TooMany(Math.ceil(refusal.msBeforeNext / 1000));
      throw refusal;
    }
    next();
  };
}
