// Draws pages: one for all until the campaign changes, or one for the reader who asks.
import type { Request as HttpRequest, RequestHandler, Response as HttpResponse } from 'express';
import type { Deps } from '#server/deps.ts';
import { reportError, requestIdOf } from '#server/platform/problems.ts';
import { fillTemplate } from './fill-template.ts';
import type { InProcess } from './in-process.ts';
import { keepAnswer, type KeptAnswer } from './kept-answer.ts';
import { createDrawnOnce, type DrawnOnce } from './page-cache.ts';
import { toKeptRequest, toPageRequest } from './page-request.ts';
import { isNeverKept } from './page-rules.ts';
import { createPageApi } from './server-api.ts';
import type { SiteBuild } from './site-build.ts';

/** Faults that a page shows are ours to know of as well. */
function reportFaults({ log }: Deps, faults: readonly unknown[], where: Record<string, unknown>): void {
  for (const fault of faults) if (fault instanceof Error) reportError(log, fault, where);
}

export function createDrawKept(deps: Deps, site: SiteBuild, ask: InProcess): DrawnOnce<KeptAnswer> {
  const draw = async (path: string): Promise<KeptAnswer> => {
    const { template, render } = await site.open(path);
    const { exchange } = createPageApi(ask, null);
    const page = await render(toKeptRequest(deps.config.publicAddress, path), exchange);
    if (page instanceof Response) throw new Error(`${path} turns to another page and cannot be kept`);
    reportFaults(deps, page.faults, { path });
    return keepAnswer(fillTemplate(template, page), 'html', page.status);
  };
  return createDrawnOnce(deps.changes, draw, { mayKeep: (answer) => answer.status === 200 });
}

function sendElsewhere(req: HttpRequest, res: HttpResponse, answer: Response): void {
  const location = answer.headers.get('location');
  if (location === null) {
    res.status(answer.status).end();
    return;
  }
  // 303, so that the browser asks for the next page and does not post again.
  const status = req.method === 'POST' ? 303 : answer.status;
  res.status(status).set('Location', location).end();
}

export function createDrawOwn(deps: Deps, site: SiteBuild, ask: InProcess): RequestHandler {
  return async (req, res) => {
    const leaving = new AbortController();
    res.on('close', () => leaving.abort());
    const requestId = requestIdOf(res);
    const request = toPageRequest(req, deps.config.publicAddress, { signal: leaving.signal, requestId });
    const { template, render } = await site.open(req.originalUrl);
    const api = createPageApi(ask, req);
    const page = await render(request, api.exchange).catch((error: unknown) => {
      if (leaving.signal.aborted) return null;
      throw error;
    });
    // The reader went away: there is nobody to answer.
    if (page === null) return;
    for (const cookie of api.setCookies()) res.append('Set-Cookie', cookie);
    if (!isNeverKept(req.path)) res.set('Cache-Control', 'no-cache');
    if (page instanceof Response) return sendElsewhere(req, res, page);
    reportFaults(deps, page.faults, { path: req.path, requestId });
    res.status(page.status).type('html').send(fillTemplate(template, page));
  };
}
