// What time it is. The demonstration follows the payment stand-in's clock; a live society follows the real one.
import { z } from 'zod';
import type { Log } from './log.ts';

export type Clock = { now(): Date; stop(): void };

export const realClock: Clock = { now: () => new Date(), stop: () => undefined };

const clockSchema = z.object({ offsetMs: z.number() });
const FOLLOW_EVERY_MS = 1000;

/** A clock that stands `offsetMs` from the real one; tests and the generator move it by hand. */
export function movableClock(offsetMs = 0): Clock & { moveTo(moment: Date): void } {
  let offset = offsetMs;
  return {
    now: () => new Date(Date.now() + offset),
    moveTo: (moment) => (offset = moment.getTime() - Date.now()),
    stop: () => undefined,
  };
}

/** Follows the stand-in's clock; while it cannot be asked, the last known offset holds. */
export async function followedClock(controlsUrl: string, log: Log): Promise<Clock> {
  let offset = 0;
  const ask = async (): Promise<void> => {
    try {
      const answer = await fetch(`${controlsUrl}/clock`, { signal: AbortSignal.timeout(FOLLOW_EVERY_MS) });
      offset = clockSchema.parse(await answer.json()).offsetMs;
    } catch (error) {
      log.debug({ err: error }, 'the demonstration clock did not answer');
    }
  };
  await ask();
  const timer = setInterval(() => void ask(), FOLLOW_EVERY_MS);
  timer.unref();
  return { now: () => new Date(Date.now() + offset), stop: () => clearInterval(timer) };
}
