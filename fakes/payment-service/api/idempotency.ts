// One key, one piece of work: a repeated request gets the answer that the first one got.
import { createHash } from 'node:crypto';
import { nowSeconds } from '../state/clock.ts';
import type { Service } from '../service.ts';
import { ApiError, invalid } from './api-errors.ts';

export type Answer = { status: number; body: string; isRepeat: boolean };
export type KeyedRequest = { key: string; path: string; rawBody: string };

const KEPT_SECONDS = 24 * 60 * 60;
const LONGEST_KEY = 255;

/** The order of parameters says nothing, so it does not count. */
const fingerprintOf = ({ path, rawBody }: KeyedRequest): string =>
  createHash('sha256')
    .update(`${path}\n${rawBody.split('&').sort().join('&')}`)
    .digest('hex');

const isKept = (service: Service, createdMs: number): boolean =>
  nowSeconds(service) - createdMs / 1000 < KEPT_SECONDS;

function findStored(service: Service, request: KeyedRequest, fingerprint: string): Answer | undefined {
  const stored = service.store.answers.find(request.key);
  if (!stored || !isKept(service, stored.createdMs)) return undefined;
  if (stored.fingerprint !== fingerprint)
    throw new ApiError(400, {
      type: 'idempotency_error',
      message: `Keys for idempotent requests can only be used with the same parameters they were first used with. Try using a key other than '${request.key}' if you meant to execute a different request.`,
    });
  return { status: stored.status, body: stored.body, isRepeat: true };
}

/** Only finished work is kept: a request that was refused for its parameters may be put right under the same key. */
export async function answerOnce(
  service: Service,
  request: KeyedRequest,
  work: () => string,
  pause: () => Promise<void>,
): Promise<Answer> {
  const { key } = request;
  if (key.length > LONGEST_KEY)
    throw invalid(`Idempotency keys may be at most ${LONGEST_KEY} characters long.`);
  if (service.keysInUse.has(key))
    throw new ApiError(409, {
      type: 'idempotency_error',
      code: 'idempotency_key_in_use',
      message: `There is currently another in-progress request using this Idempotent Key (${key}). Please try again later.`,
    });
  const fingerprint = fingerprintOf(request);
  const stored = findStored(service, request, fingerprint);
  if (stored) return stored;
  service.keysInUse.add(key);
  try {
    await pause();
    return service.store.write(() => {
      const body = work();
      service.store.answers.put(key, {
        fingerprint,
        status: 200,
        body,
        createdMs: nowSeconds(service) * 1000,
      });
      return { status: 200, body, isRepeat: false };
    });
  } finally {
    service.keysInUse.delete(key);
  }
}

/** Old answers are let go when the stand-in starts, so that the journal does not grow for ever. */
export function forgetOldAnswers(service: Service): void {
  const { answers } = service.store;
  service.store.write(() => {
    for (const [key, answer] of answers.entries())
      if (!isKept(service, answer.createdMs)) answers.remove(key);
  });
}
