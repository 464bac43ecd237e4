// Answers every fault as RFC 9457 problem details; what is unknown is logged and hidden.
import type { ErrorRequestHandler, RequestHandler, Response } from 'express';
import { z } from 'zod';
import type { Problem } from '#shared/errors.ts';
import { isDatabaseAway } from './db.ts';
import { AppError, NotFound } from './errors.ts';
import { maskSecrets, type Log } from './log.ts';

const TITLES: Record<Problem['code'], string> = {
  invalid: 'Some answers need putting right',
  'not-signed-in': 'Not signed in',
  'not-allowed': 'Not allowed',
  'not-found': 'Not found',
  conflict: 'Changed meanwhile',
  refused: 'Refused',
  'too-many': 'Too many tries',
  upstream: 'The card service did not answer',
  unavailable: 'Back in a moment',
  internal: 'Something went wrong here',
};

const bodyFaultSchema = z.object({ type: z.string(), status: z.int().min(400).max(499) });

/** Where a request came in with an unreadable or too large body. */
function bodyFault(error: unknown): AppError | undefined {
  const parsed = bodyFaultSchema.safeParse(error);
  if (!parsed.success) return undefined;
  return new AppError(parsed.data.status, 'invalid', 'We could not read what was sent.', {
    reason: parsed.data.type,
  });
}

function toAppError(error: unknown): AppError {
  if (error instanceof AppError) return error;
  if (isDatabaseAway(error))
    return new AppError(
      503,
      'unavailable',
      'The books are away for a moment. Nothing was lost. Try again shortly.',
      {
        retryAfterSeconds: 5,
      },
    );
  return (
    bodyFault(error) ??
    new AppError(500, 'internal', 'Something went wrong on our side. Nothing was half done.')
  );
}

export function toProblem(error: unknown, requestId?: string): Problem {
  const known = toAppError(error);
  return {
    type: 'about:blank',
    title: TITLES[known.code],
    status: known.status,
    detail: known.message,
    code: known.code,
    ...(known.extra.reason !== undefined && { reason: known.extra.reason }),
    ...(known.extra.fields !== undefined && { fields: known.extra.fields }),
    ...(requestId !== undefined && { requestId }),
  };
}

/** The one place where faults of routes, webhooks and jobs are reported. */
export function reportError(log: Log, error: unknown, where: Record<string, unknown>): void {
  const known = toAppError(error);
  const told = typeof where.path === 'string' ? { ...where, path: maskSecrets(where.path) } : where;
  if (known.status >= 500) log.error({ err: error, ...told }, known.message);
  else log.debug({ code: known.code, ...told }, known.message);
}

export const requestIdOf = (res: Response): string | undefined => {
  const id = res.getHeader('x-request-id');
  return typeof id === 'string' ? id : undefined;
};

export const nothingHere: RequestHandler = () => {
  throw new NotFound();
};

export const problemHandler =
  (log: Log): ErrorRequestHandler =>
  (error: unknown, req, res, next) => {
    reportError(log, error, { method: req.method, path: req.path, requestId: requestIdOf(res) });
    if (res.headersSent) return next(error);
    const problem = toProblem(error, requestIdOf(res));
    const known = toAppError(error);
    if (known.extra.retryAfterSeconds) res.setHeader('Retry-After', String(known.extra.retryAfterSeconds));
    res.setHeader('Cache-Control', 'no-store');
    res.status(problem.status).type('application/problem+json').send(JSON.stringify(problem));
  };
