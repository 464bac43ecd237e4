// The readable page of the controls, and the forms on it.
import express from 'express';
import { createElement } from 'react';
import { z } from 'zod';
import { sendPage } from '../pages/send-page.ts';
import { confirmAllSlow, failAllSlow, giveAllFees } from '../payments/timers.ts';
import type { Service } from '../service.ts';
import { flushCourier, nudgeCourier } from '../webhooks/courier.ts';
import { now, readClock } from '../state/clock.ts';
import { STILL, changeWebhookMode, readSettings } from '../state/settings.ts';
import { ControlsPage } from './ControlsPage.tsx';
import type { EventLine } from './ControlsPage.tsx';
import { setClock } from './commands.ts';
import { readTruth } from './truth.ts';

const SHOWN = 60;
const DAY_MS = 24 * 60 * 60 * 1000;

function eventLines(service: Service): EventLine[] {
  return service.store.events
    .list()
    .slice(-SHOWN)
    .toReversed()
    .map((event) => ({ event, delivery: service.store.deliveries.find(event.id) ?? null }));
}

function pageOf(service: Service) {
  const { payments, totals } = readTruth(service);
  return createElement(ControlsPage, {
    now: now(service),
    isMoved: readClock(service).offsetMs !== 0,
    payments: payments.slice(-SHOWN).toReversed(),
    totals,
    events: eventLines(service),
    webhookUrl: service.options.webhook?.url ?? null,
    mode: readSettings(service.store).webhooks,
  });
}

const count = z.coerce.number().int().min(0).max(10_000).catch(0);
const modeForm = z.object({
  drop: count,
  dropAll: z.literal('on').optional(),
  double: count,
  reorder: count,
  delaySeconds: count,
  paused: z.literal('on').optional(),
});
const daysForm = z.object({ days: z.coerce.number().min(-3650).max(3650).catch(0) });
// The form has no time zone; the controls speak of the hour at Greenwich so that no summer hour is doubled.
const instantForm = z.object({
  to: z.iso.datetime({ local: true }).transform((text) => new Date(`${text}Z`)),
});

const FORMS: Record<string, (service: Service, form: unknown) => unknown> = {
  '/page/clock/days': (service, form) => setClock(service, { advanceMs: daysForm.parse(form).days * DAY_MS }),
  '/page/clock/to': (service, form) => setClock(service, { to: instantForm.parse(form).to }),
  '/page/clock/reset': (service) => setClock(service, { reset: true }),
  '/page/fees': giveAllFees,
  '/page/confirm': confirmAllSlow,
  '/page/fail': failAllSlow,
  '/page/flush': (service) => flushCourier(service),
  '/page/calm': (service) => changeWebhookMode(service, STILL),
  '/page/mode': (service, form) => {
    const mode = modeForm.parse(form);
    return changeWebhookMode(service, {
      dropNext: mode.dropAll ? 'all' : mode.drop,
      doubleNext: mode.double,
      reorderNext: mode.reorder,
      delayMs: mode.delaySeconds * 1000,
      paused: mode.paused === 'on',
    });
  },
};

export function controlsPage(service: Service) {
  const router = express.Router();
  router.get('/', (_req, res) => sendPage(res, 200, pageOf(service)));
  for (const [path, command] of Object.entries(FORMS))
    router.post(path, express.urlencoded({ extended: false }), async (req, res) => {
      const form: unknown = req.body ?? {};
      await command(service, form);
      nudgeCourier(service);
      res.redirect(303, '/');
    });
  return router;
}
