// The stand-in's clock: real time and an offset. What it makes is dated by it; signatures never are.
import type { Service } from '../service.ts';
import { changeSettings, readSettings } from './settings.ts';

export const now = (service: Service): Date => new Date(Date.now() + readSettings(service.store).offsetMs);

export const nowSeconds = (service: Service): number => Math.floor(now(service).getTime() / 1000);

export type ClockMove = { to: Date } | { advanceMs: number } | { reset: true };

function offsetAfter(service: Service, move: ClockMove): number {
  if ('reset' in move) return 0;
  if ('to' in move) return move.to.getTime() - Date.now();
  return readSettings(service.store).offsetMs + move.advanceMs;
}

export function moveClock(service: Service, move: ClockMove): void {
  changeSettings(service, { offsetMs: offsetAfter(service, move) });
}

export const readClock = (service: Service) => ({
  now: now(service).toISOString(),
  offsetMs: readSettings(service.store).offsetMs,
});
