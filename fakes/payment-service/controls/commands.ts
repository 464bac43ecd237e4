// What the controls can do, each named by the address it answers at.
import { z } from 'zod';
import { expireOverdueSessions } from '../payments/expiry.ts';
import { presentSession } from '../payments/present.ts';
import { answerConfirmation, payWithCard } from '../payments/take-payment.ts';
import { confirmAllSlow, failAllSlow, giveAllFees } from '../payments/timers.ts';
import type { Service } from '../service.ts';
import { flushCourier, nudgeCourier, resendEvent } from '../webhooks/courier.ts';
import { moveClock, readClock } from '../state/clock.ts';
import type { ClockMove } from '../state/clock.ts';
import { requestModeSchema, webhookModeSchema } from '../state/rows.ts';
import { changeRequestMode, changeSettings, changeWebhookMode } from '../state/settings.ts';
import { TEST_CARDS, findCard } from '../test-cards.ts';

/** The command could not be followed; its words say why. */
export class CannotDo extends Error {
  override name = 'CannotDo';
}

const HUNDRED_YEARS_MS = 100 * 365 * 24 * 60 * 60 * 1000;
const clockSchema = z.union([
  z.strictObject({ to: z.iso.datetime({ offset: true }).transform((text) => new Date(text)) }),
  z.strictObject({ advanceMs: z.number().min(-HUNDRED_YEARS_MS).max(HUNDRED_YEARS_MS) }),
  z.strictObject({ reset: z.literal(true) }),
]);

export function setClock(service: Service, move: ClockMove) {
  moveClock(service, move);
  expireOverdueSessions(service);
  return readClock(service);
}

const paySchema = z.strictObject({
  card: z.union([z.string(), z.number().transform(String)]).optional(),
  /** The answer to a card that asks; without it the payment is left waiting for one. */
  confirm: z.boolean().optional(),
});

function paySession(service: Service, sessionId: string, input: unknown) {
  const { card: number, confirm } = paySchema.parse(input);
  expireOverdueSessions(service);
  const row = service.store.sessions.find(sessionId);
  if (row?.session.status !== 'open') throw new CannotDo('There is no open session with this id.');
  const card = number === undefined ? TEST_CARDS[0] : findCard(number);
  if (!card) throw new CannotDo('This is not one of the test cards.');
  return service.store.write(() => {
    const given = payWithCard(service, row, card);
    const answered = confirm === undefined ? given : answerConfirmation(service, given, confirm);
    return presentSession(service, answered.session);
  });
}

function sendAgain(service: Service, eventId: string) {
  if (!resendEvent(service, eventId)) throw new CannotDo('No webhook was ever told of this event.');
  return { resent: eventId };
}

function setWebhookMode(service: Service, change: unknown) {
  const settings = changeWebhookMode(service, webhookModeSchema.partial().strict().parse(change));
  nudgeCourier(service);
  return settings.webhooks;
}

const delaySchema = z.strictObject({ delayMs: z.int().min(0) });

type Command = (service: Service, input: unknown, id: string) => object | Promise<object>;

export const COMMANDS: Record<string, Command> = {
  '/clock': (service, input) => setClock(service, clockSchema.parse(input)),
  '/sessions/:id/pay': (service, input, id) => paySession(service, id, input),
  '/fees/settle': (service) => ({ settled: giveAllFees(service) }),
  '/fees/delay': (service, input) =>
    changeSettings(service, { feeDelayMs: delaySchema.parse(input).delayMs }),
  '/async/confirm': (service) => ({ confirmed: confirmAllSlow(service) }),
  '/async/fail': (service) => ({ failed: failAllSlow(service) }),
  '/async/delay': (service, input) =>
    changeSettings(service, { slowDelayMs: delaySchema.parse(input).delayMs }),
  '/webhooks/mode': (service, input) => setWebhookMode(service, input),
  '/webhooks/flush': (service) => flushCourier(service),
  '/events/:id/resend': (service, _input, id) => sendAgain(service, id),
  '/requests/mode': (service, input) =>
    changeRequestMode(service, requestModeSchema.partial().strict().parse(input)).requests,
};
