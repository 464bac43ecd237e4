// The events that still have to be told to the webhook, and the order they leave in.
import type { Service } from '../service.ts';
import type { Delivery } from '../state/rows.ts';
import { readSettings } from '../state/settings.ts';
import type { Store } from '../state/store.ts';

export type Queue = {
  /** Kept beside the store so that what was delivered long ago is not looked through each time. */
  waiting: Map<string, Delivery>;
  lastOrder: number;
  /** Rounds run one after another, so that the order of leaving is the order of arriving. */
  round: Promise<unknown>;
  isRoundDue: boolean;
  stopping: AbortController;
};

export const isUndone = (one: Delivery): boolean => one.state === 'waiting' || one.state === 'held';

export function createQueue(store: Store): Queue {
  return {
    waiting: new Map(store.deliveries.entries().filter(([, one]) => isUndone(one))),
    lastOrder: store.deliveries.list().reduce((last, one) => Math.max(last, one.order), 0),
    round: Promise.resolve(),
    isRoundDue: false,
    stopping: new AbortController(),
  };
}

export const nextOrder = (queue: Queue): number => (queue.lastOrder += 1);

export function saveDelivery(service: Service, one: Delivery): void {
  service.store.deliveries.put(one.eventId, one);
  if (isUndone(one)) service.queue.waiting.set(one.eventId, one);
  else service.queue.waiting.delete(one.eventId);
}

const inOrder = (a: Delivery, b: Delivery): number => a.order - b.order;
export const listWaiting = ({ queue }: Service): Delivery[] => [...queue.waiting.values()].toSorted(inOrder);

/** Those that were held go out last first. */
export function releaseHeld(service: Service): void {
  const held = listWaiting(service).filter((one) => one.state === 'held');
  for (const one of held.toReversed())
    saveDelivery(service, { ...one, state: 'waiting', order: nextOrder(service.queue) });
}

export function findNextDue({ store, queue }: Service): Delivery | undefined {
  if (queue.stopping.signal.aborted || readSettings(store).webhooks.paused) return undefined;
  let next: Delivery | undefined;
  for (const one of queue.waiting.values())
    if (one.state === 'waiting' && one.dueAtMs <= Date.now() && (!next || one.order < next.order)) next = one;
  return next;
}
