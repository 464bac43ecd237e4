// The door of the API: key, request id, headers, repeats, expansion and errors, so that each address only says what it does.
import { setTimeout as wait } from 'node:timers/promises';
import type { IncomingMessage } from 'node:http';
import type { Request, RequestHandler, Response } from 'express';
import Stripe from 'stripe';
import { z } from 'zod';
import { newId } from '../state/ids.ts';
import { changeRequestMode, readSettings } from '../state/settings.ts';
import { expireOverdueSessions } from '../payments/expiry.ts';
import type { Service } from '../service.ts';
import { ApiError, brokenInside, invalid } from './api-errors.ts';
import { expand } from './expand.ts';
import { answerOnce } from './idempotency.ts';
import type { Answer } from './idempotency.ts';

export type Call = {
  requestId: string;
  idempotencyKey: string | null;
  /** The id in the address, if it has one. */
  id: string;
  params: Record<string, unknown>;
};
export type Handler = (service: Service, call: Call) => object;

const rawBodies = new WeakMap<IncomingMessage, string>();
/** Keeps the body as it came: repeats of a request are told by it. */
export const keepRawBody = (req: IncomingMessage, _res: unknown, body: Buffer): void =>
  void rawBodies.set(req, body.toString('utf8'));

const paramsSchema = z.record(z.string(), z.unknown()).catch({});
const pathsSchema = z.array(z.string().min(1)).max(20);

function checkKey(service: Service, req: Request): void {
  const given = /^Bearer (\S+)$/.exec(req.get('authorization') ?? '')?.[1];
  if (given === service.options.key) return;
  const message = given
    ? `Invalid API Key provided: ${given.slice(0, 8)}${'*'.repeat(8)}${given.slice(-4)}`
    : "You did not provide an API key. You need to provide your API key in the Authorization header, using Bearer auth (e.g. 'Authorization: Bearer YOUR_SECRET_KEY').";
  throw new ApiError(401, { type: 'invalid_request_error', message });
}

function readPaths(expandParam: unknown): string[] {
  if (expandParam === undefined) return [];
  const paths = pathsSchema.safeParse(expandParam);
  if (!paths.success) throw invalid('Invalid array', { param: 'expand' });
  return paths.data;
}

function misbehave(service: Service): void {
  const { requests } = readSettings(service.store);
  if (requests.failNext === 0) return;
  changeRequestMode(service, { failNext: requests.failNext - 1 });
  throw brokenInside();
}

async function answer(service: Service, handler: Handler, req: Request, call: Call): Promise<Answer> {
  checkKey(service, req);
  misbehave(service);
  expireOverdueSessions(service);
  const { expand: expandParam, ...params } = call.params;
  const paths = readPaths(expandParam);
  const work = () => JSON.stringify(expand(service, handler(service, { ...call, params }), paths));
  const pause = () => wait(readSettings(service.store).requests.latencyMs);
  if (req.method === 'POST' && call.idempotencyKey) {
    const request = { key: call.idempotencyKey, path: req.path, rawBody: rawBodies.get(req) ?? '' };
    return answerOnce(service, request, work, pause);
  }
  await pause();
  return { status: 200, body: service.store.write(work), isRepeat: false };
}

/** True when this answer is to be lost on its way, after the work was done. */
function isCutOff(service: Service, req: Request): boolean {
  const { cutNext } = readSettings(service.store).requests;
  if (req.method !== 'POST' || cutNext === 0) return false;
  changeRequestMode(service, { cutNext: cutNext - 1 });
  return true;
}

function send(res: Response, status: number, body: string): void {
  res.status(status).type('application/json').send(body);
}

function sendError(res: Response, error: unknown): void {
  if (!(error instanceof ApiError)) console.error('payment stand-in:', error);
  const { status, body } = error instanceof ApiError ? error : brokenInside();
  send(res, status, JSON.stringify({ error: body }));
}

function toCall(req: Request): Call {
  const { id } = req.params;
  return {
    requestId: newId('req'),
    idempotencyKey: req.get('idempotency-key') ?? null,
    id: typeof id === 'string' ? id : '',
    params: paramsSchema.parse(req.method === 'GET' ? req.query : req.body),
  };
}

export const endpoint =
  (service: Service, handler: Handler): RequestHandler =>
  async (req, res) => {
    const call = toCall(req);
    res.set({
      'request-id': call.requestId,
      'stripe-version': req.get('stripe-version') ?? Stripe.API_VERSION,
    });
    if (call.idempotencyKey) res.set('idempotency-key', call.idempotencyKey);
    try {
      const { status, body, isRepeat } = await answer(service, handler, req, call);
      if (isRepeat) res.set('idempotent-replayed', 'true');
      if (isCutOff(service, req)) req.socket.destroy();
      else send(res, status, body);
    } catch (error) {
      sendError(res, error);
    }
  };
