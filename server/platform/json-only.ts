// Only JSON is read under /api: a form of another site can send every kind of body but this one.
import type { RequestHandler } from 'express';
import { AppError } from './errors.ts';
import { isSafeMethod } from './own-origin.ts';

const JSON_TYPE = /^application\/json\s*(;|$)/i;

export const requireJson: RequestHandler = (req, _res, next) => {
  const hasBody =
    req.headers['transfer-encoding'] !== undefined || Number(req.headers['content-length'] ?? 0) > 0;
  const isAsked = !isSafeMethod(req.method) && (hasBody || req.method !== 'DELETE');
  if (isAsked && !JSON_TYPE.test(req.headers['content-type'] ?? ''))
    throw new AppError(415, 'invalid', 'Send JSON, with the header Content-Type: application/json.', {
      reason: 'json-only',
    });
  next();
};
