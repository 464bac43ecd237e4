// Things that happen by themselves after a while: fees that come, slow payments that are confirmed, sessions that run out.
import type { Service } from '../service.ts';
import { nudgeCourier } from '../webhooks/courier.ts';
import type { Timer } from '../state/rows.ts';
import { expireOverdueSessions } from './expiry.ts';
import { giveFee } from './fees.ts';
import { confirmSlow, failSlow } from './slow-payments.ts';

const LOOK_EVERY_MS = 200;

function waiting(service: Service, kind: Timer['kind']): Timer[] {
  return service.store.timers.list().filter((timer) => timer.kind === kind);
}

function runEach(
  service: Service,
  timers: readonly Timer[],
  work: (service: Service, target: string) => void,
) {
  for (const timer of timers) service.store.write(() => work(service, timer.target));
  return timers.length;
}

export const giveAllFees = (service: Service): number => runEach(service, waiting(service, 'fee'), giveFee);
export const confirmAllSlow = (service: Service): number =>
  runEach(service, waiting(service, 'confirm'), confirmSlow);
export const failAllSlow = (service: Service): number =>
  runEach(service, waiting(service, 'confirm'), failSlow);

export function runDue(service: Service): void {
  const isDue = (timer: Timer) => timer.dueAtMs <= Date.now();
  runEach(service, waiting(service, 'confirm').filter(isDue), confirmSlow);
  runEach(service, waiting(service, 'fee').filter(isDue), giveFee);
  expireOverdueSessions(service);
}

/** Runs until the answer is called. */
export function startTimers(service: Service): () => void {
  const timer = setInterval(() => {
    runDue(service);
    nudgeCourier(service);
  }, LOOK_EVERY_MS);
  return () => clearInterval(timer);
}
