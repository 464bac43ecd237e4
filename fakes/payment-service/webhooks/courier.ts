// Carries events to the webhook: one after another, again and again until taken, or badly when told to.
import { presentEvent } from '../payments/present.ts';
import type { Service } from '../service.ts';
import type { WebhookMode } from '../state/rows.ts';
import { changeWebhookMode, readSettings } from '../state/settings.ts';
import { postEvent } from './post-event.ts';
import { findNextDue, listWaiting, nextOrder, releaseHeld, saveDelivery } from './queue.ts';

const FIRST_GAP_MS = 500;
const LONGEST_GAP_MS = 60_000;
const gapAfter = (attempts: number): number => Math.min(LONGEST_GAP_MS, FIRST_GAP_MS * 2 ** (attempts - 1));

const isOn = (count: WebhookMode['dropNext']): boolean => count === 'all' || count > 0;
const less = (count: WebhookMode['dropNext']) => (count === 'all' ? count : Math.max(0, count - 1));

/** Takes an event that has just been written down. */
export function takeEvent(service: Service, eventId: string): void {
  if (!service.options.webhook) return;
  const mode = readSettings(service.store).webhooks;
  const isDropped = isOn(mode.dropNext);
  const isDoubled = !isDropped && isOn(mode.doubleNext);
  const isHeld = !isDropped && mode.reorderNext > 0;
  saveDelivery(service, {
    eventId,
    state: isDropped ? 'dropped' : isHeld ? 'held' : 'waiting',
    order: nextOrder(service.queue),
    attempts: 0,
    copies: isDoubled ? 2 : 1,
    dueAtMs: Date.now() + mode.delayMs,
    lastAnswer: null,
  });
  if (isDropped) changeWebhookMode(service, { dropNext: less(mode.dropNext) });
  if (isDoubled) changeWebhookMode(service, { doubleNext: less(mode.doubleNext) });
  if (isHeld) changeWebhookMode(service, { reorderNext: mode.reorderNext - 1 });
  if (isHeld && mode.reorderNext === 1) releaseHeld(service);
  nudgeCourier(service);
}

/** Sends an event once more, even one that was dropped. */
export function resendEvent(service: Service, eventId: string): boolean {
  const last = service.store.deliveries.find(eventId);
  if (!last) return false;
  saveDelivery(service, { ...last, state: 'waiting', copies: 1, dueAtMs: Date.now() });
  nudgeCourier(service);
  return true;
}

async function deliver(service: Service, eventId: string): Promise<boolean> {
  const one = service.queue.waiting.get(eventId);
  const event = service.store.events.find(eventId);
  const { webhook } = service.options;
  const { signal } = service.queue.stopping;
  if (!one || !event || !webhook || signal.aborted) return false;
  const copy = presentEvent(service, event);
  // Both copies leave at the same moment: that is the case a receiver has to stand.
  const posts = await Promise.all(Array.from({ length: one.copies }, () => postEvent(copy, webhook, signal)));
  if (signal.aborted) return false;
  const isAccepted = posts.every((post) => post.isAccepted);
  const attempts = one.attempts + 1;
  saveDelivery(service, {
    ...one,
    copies: 1,
    attempts,
    lastAnswer: posts.at(-1)?.answer ?? null,
    dueAtMs: Date.now() + gapAfter(attempts),
    state: isAccepted ? 'delivered' : 'waiting',
  });
  return isAccepted;
}

/** Sends what is due. */
export function nudgeCourier(service: Service): void {
  const { queue } = service;
  if (queue.isRoundDue || queue.waiting.size === 0) return;
  queue.isRoundDue = true;
  queue.round = queue.round.then(async () => {
    queue.isRoundDue = false;
    for (let next = findNextDue(service); next; next = findNextDue(service))
      await deliver(service, next.eventId);
  });
}

async function sendAll(service: Service): Promise<{ delivered: number; failed: number }> {
  releaseHeld(service);
  const waiting = listWaiting(service);
  let delivered = 0;
  for (const one of waiting) if (await deliver(service, one.eventId)) delivered += 1;
  return { delivered, failed: waiting.length - delivered };
}

/** Tries everything that waits, once, now. */
export function flushCourier(service: Service): Promise<{ delivered: number; failed: number }> {
  const sent = service.queue.round.then(() => sendAll(service));
  service.queue.round = sent;
  return sent;
}

export async function stopCourier({ queue }: Service): Promise<void> {
  queue.stopping.abort();
  await queue.round;
}
