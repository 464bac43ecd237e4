// The server as a table of contents: what is asked where, and what stands before it.
import { randomUUID } from 'node:crypto';
import type { Server } from 'node:http';
import compression from 'compression';
import express, { type Express } from 'express';
import { pinoHttp } from 'pino-http';
import { createAccountRouter, createSessionRouter, requireDesk } from '#server/accounts/index.ts';
import type { Deps } from '#server/deps.ts';
import {
  createGiftsRouter,
  createGivingDeskRouter,
  createReceiptFilesRouter,
  createReceiptsRouter,
  createWebhookRouter,
} from '#server/giving/index.ts';
import { createCampaignRouter } from '#server/home/index.ts';
import { apiDocument } from '#server/api-description.ts';
import { createOpenApiRouter } from '#server/platform/openapi.ts';
import { securityHeaders } from '#server/platform/headers.ts';
import { healthHandler } from '#server/platform/health.ts';
import { requireJson } from '#server/platform/json-only.ts';
import { requireOwnOrigin } from '#server/platform/own-origin.ts';
import { httpSerializers } from '#server/platform/log.ts';
import { mountPages } from '#server/platform/pages/index.ts';
import { nothingHere, problemHandler } from '#server/platform/problems.ts';
import { createSocietyRouter } from '#server/society/index.ts';
import { createTodayRouter } from '#server/today/index.ts';

const BODY_LIMIT = '64kb';

/** `httpServer` lends its port to live reload while developing. */
export async function createApp(deps: Deps, httpServer?: Server): Promise<Express> {
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', deps.config.proxyHops);
  app.use(securityHeaders(deps.config));
  app.use(
    pinoHttp({
      logger: deps.log,
      genReqId: nameRequest,
      autoLogging: { ignore: isQuiet },
      serializers: httpSerializers,
    }),
  );

  app.get('/healthz', healthHandler(deps.db));
  app.use('/webhooks/payments', createWebhookRouter(deps));
  app.use(compression());

  app.use(
    '/api',
    requireOwnOrigin(deps.config.publicAddress),
    requireJson,
    express.json({ limit: BODY_LIMIT }),
  );
  app.use('/api/openapi.json', createOpenApiRouter(apiDocument()));
  app.use('/api/campaign', createCampaignRouter(deps));
  app.use('/api/society', createSocietyRouter(deps));
  app.use('/api/gifts', createGiftsRouter(deps));
  app.use('/api/receipts', createReceiptsRouter(deps));

  app.use('/api/session', createSessionRouter(deps));
  app.use('/api/desk', requireDesk(deps));
  app.use('/api/desk/account', createAccountRouter(deps));
  app.use('/api/desk/today', createTodayRouter(deps));
  app.use('/api/desk', createGivingDeskRouter(deps));
  app.use('/api', nothingHere);

  app.use('/receipts', createReceiptFilesRouter(deps));
  await mountPages(app, deps, { apiHandler: app, httpServer });
  app.use(problemHandler(deps.log));
  return app;
}

/** Every answer carries the name of its request, so that a person can tell us which one went wrong. */
function nameRequest(_req: unknown, res: { setHeader(name: string, value: string): unknown }): string {
  const id = randomUUID();
  res.setHeader('X-Request-Id', id);
  return id;
}

const isQuiet = (req: { url?: string | undefined }): boolean => /^\/(healthz|assets\/)/.test(req.url ?? '');
