// The controls: JSON for tests and the generator, and one page for people, on a port of their own.
import express from 'express';
import type { ErrorRequestHandler, Request, RequestHandler, Response } from 'express';
import { z } from 'zod';
import { pageAssets } from '../pages/assets.ts';
import type { Service } from '../service.ts';
import { readClock } from '../state/clock.ts';
import { readSettings } from '../state/settings.ts';
import { COMMANDS, CannotDo } from './commands.ts';
import { controlsPage } from './controls-page.ts';
import { readTruth } from './truth.ts';

/** A page of some other site may not move the controls through a visitor's browser. */
const refuseStrangers: RequestHandler = (req, res, next) => {
  const site = req.get('sec-fetch-site');
  if (req.method === 'GET' || site === undefined || site === 'same-origin' || site === 'none') return next();
  res.status(403).json({ message: 'The controls are moved from their own page.' });
};

const answerFault: ErrorRequestHandler = (error, _req, res, next) => {
  if (res.headersSent) return next(error);
  if (error instanceof CannotDo) return void res.status(409).json({ message: error.message });
  if (error instanceof z.ZodError) return void res.status(400).json({ message: z.prettifyError(error) });
  if (error instanceof SyntaxError)
    return void res.status(400).json({ message: 'The JSON could not be read.' });
  console.error('payment stand-in:', error);
  res.status(500).json({ message: 'The stand-in failed inside.' });
};

function readWebhooks(service: Service) {
  const deliveries = service.store.deliveries.list();
  const waiting = deliveries.filter((one) => one.state === 'waiting' || one.state === 'held').length;
  const typed = deliveries.map((one) => ({
    ...one,
    type: service.store.events.find(one.eventId)?.type ?? null,
  }));
  return { mode: readSettings(service.store).webhooks, waiting, deliveries: typed };
}

export function createControls(service: Service) {
  const app = express();
  app.disable('x-powered-by').disable('etag');
  app.use('/pay', pageAssets());
  app.use(refuseStrangers);
  app.get('/clock', (_req, res) => void res.json(readClock(service)));
  app.get('/truth', (_req, res) => void res.json(readTruth(service)));
  app.get('/webhooks', (_req, res) => void res.json(readWebhooks(service)));
  app.use(controlsPage(service));
  for (const [path, command] of Object.entries(COMMANDS))
    app.post(path, express.json(), async (req: Request, res: Response) => {
      const input: unknown = req.body ?? {};
      res.json(await command(service, input, String(req.params.id ?? '')));
    });
  app.use(answerFault);
  return app;
}
