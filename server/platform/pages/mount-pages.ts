// Mounts the site's pages: assets, kept pages, pages of one reader, posted forms, and the desk's empty shell.
import type { RequestListener, Server } from 'node:http';
import { Router, type ErrorRequestHandler, type Express, type RequestHandler } from 'express';
import type { Deps } from '#server/deps.ts';
import { reportError, requestIdOf, toProblem } from '#server/platform/problems.ts';
import { createDrawKept, createDrawOwn } from './draw-pages.ts';
import { barePage, DESK_SHELL, fillTemplate } from './fill-template.ts';
import { openInProcess } from './in-process.ts';
import { sendKept } from './kept-answer.ts';
import { readForm } from './page-request.ts';
import { isDeskPath, isNeverKept, isPagePath, keptUnder } from './page-rules.ts';
import { openBuiltSite, openLiveSite, type SiteBuild } from './site-build.ts';

export type PagesOptions = {
  /** Answers the API's paths; asked in process while a page is drawn. */
  apiHandler: RequestListener;
  /** While developing: the server whose port live reload shares. */
  httpServer?: Server | undefined;
};

const onlyPages: RequestHandler = (req, res, next) => {
  const isAsked = req.method === 'GET' || req.method === 'HEAD' || req.method === 'POST';
  if (!isAsked || !isPagePath(req.path)) return next('router');
  if (isNeverKept(req.path)) res.set('Cache-Control', 'no-store');
  next();
};

const showFault =
  ({ log }: Deps): ErrorRequestHandler =>
  (error: unknown, req, res, next) => {
    const requestId = requestIdOf(res);
    reportError(log, error, { method: req.method, path: req.path, requestId });
    if (res.headersSent) return next(error);
    const { status, title, detail } = toProblem(error);
    res.set('Cache-Control', 'no-store').status(status).type('html');
    res.send(barePage(title, detail ?? '', requestId));
  };

const deskShell =
  (site: SiteBuild): RequestHandler =>
  async (req, res, next) => {
    if (req.method === 'POST' || !isDeskPath(req.path)) return next();
    const { template } = await site.open(req.originalUrl);
    res.type('html').send(fillTemplate(template, DESK_SHELL));
  };

/** Mount it last: whatever is no file and no API is a page, be it the page that says so. */
export async function mountPages(
  app: Express,
  deps: Deps,
  { apiHandler, httpServer }: PagesOptions,
): Promise<{ stop(): Promise<void> }> {
  const isLive = deps.config.isDevelopment;
  const site = isLive ? await openLiveSite(httpServer) : await openBuiltSite();
  const ask = openInProcess(apiHandler);
  const drawOwn = createDrawOwn(deps, site, ask);
  const pages = Router();
  pages.use(site.assets, onlyPages, deskShell(site));
  if (!isLive) {
    const kept = createDrawKept(deps, site, ask);
    pages.use(async (req, res, next) => {
      const key = req.method === 'POST' ? null : keptUnder(req.path);
      if (key === null) return next();
      sendKept(req, res, await kept.get(key));
    });
  }
  pages.use(readForm, drawOwn, showFault(deps));
  app.use(pages);
  return { stop: () => site.stop() };
}
