// The API's addresses, and the card page beside them.
import express from 'express';
import type { ErrorRequestHandler } from 'express';
import { cardPages } from '../pages/card-pages.ts';
import type { Service } from '../service.ts';
import { invalid, unknownAddress } from './api-errors.ts';
import { getBalance, getTransaction, listTransactions } from './balance.ts';
import { getCharge, listCharges } from './charges.ts';
import { closeSession, createSession, getSession, listLineItems, listSessions } from './checkout-sessions.ts';
import { endpoint, keepRawBody } from './endpoint.ts';
import type { Handler } from './endpoint.ts';
import { getEvent, listEvents } from './events.ts';
import { getIntent, listIntents } from './payment-intents.ts';

const READS: Record<string, Handler> = {
  '/v1/checkout/sessions': listSessions,
  '/v1/checkout/sessions/:id': getSession,
  '/v1/checkout/sessions/:id/line_items': listLineItems,
  '/v1/payment_intents': listIntents,
  '/v1/payment_intents/:id': getIntent,
  '/v1/charges': listCharges,
  '/v1/charges/:id': getCharge,
  '/v1/balance': getBalance,
  '/v1/balance_transactions': listTransactions,
  '/v1/balance_transactions/:id': getTransaction,
  '/v1/events': listEvents,
  '/v1/events/:id': getEvent,
};
const WRITES: Record<string, Handler> = {
  '/v1/checkout/sessions': createSession,
  '/v1/checkout/sessions/:id/expire': closeSession,
};

/** A body that cannot be read; everything else is answered by the endpoint itself. */
const answerUnreadable: ErrorRequestHandler = (_error, _req, res, next) => {
  if (res.headersSent) return next(_error);
  res.status(400).json({ error: invalid('The request could not be read.').body });
};

export function createApp(service: Service) {
  const app = express();
  app.disable('x-powered-by').disable('etag').set('query parser', 'extended');
  app.use('/v1', express.urlencoded({ extended: true, limit: '1mb', verify: keepRawBody }));
  for (const [path, handler] of Object.entries(READS)) app.get(path, endpoint(service, handler));
  for (const [path, handler] of Object.entries(WRITES)) app.post(path, endpoint(service, handler));
  app.use('/v1', (req, res, next) =>
    endpoint(service, () => {
      throw unknownAddress(req.method, req.originalUrl.split('?')[0] ?? '');
    })(req, res, next),
  );
  app.use('/pay', cardPages(service));
  app.use('/v1', answerUnreadable);
  return app;
}
