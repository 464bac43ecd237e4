// Refuses what another site makes a visitor's browser send here. Hooks of other services are mounted outside it.
import type { Request, RequestHandler } from 'express';
import { NotAllowed } from './errors.ts';

const SAFE_METHODS = new Set(['GET', 'HEAD', 'OPTIONS', 'TRACE']);
export const isSafeMethod = (method: string): boolean => SAFE_METHODS.has(method);

// 'none' is a person's own doing: an address typed in, a bookmark, a form sent once more after going back.
const OWN_SITES = new Set(['same-origin', 'none']);

function isOwn(req: Request, origin: string): boolean {
  const site = req.get('Sec-Fetch-Site');
  const from = req.get('Origin');
  // No page can forge Sec-Fetch-Site, so it decides alone: a form of ours sent without a script says
  // `Origin: null` under our no-referrer policy, and a visitor may have come by another name of this host.
  if (site !== undefined) return OWN_SITES.has(site);
  if (from !== undefined) return from === origin;
  // Neither: every browser in use sends one of the two with a request that changes something, and only a
  // browser can be misled into lending its cookies. So what comes with a cookie is refused, and a script
  // that brings none is let through: it can do no more than a visitor.
  return req.get('Cookie') === undefined;
}

export const requireOwnOrigin = (publicAddress: string): RequestHandler => {
  const { origin } = new URL(publicAddress);
  return (req, _res, next) => {
    if (isSafeMethod(req.method) || isOwn(req, origin)) return next();
    throw new NotAllowed(
      'That was sent from another site, so nothing was done. Do it again from this one.',
      'other-site',
    );
  };
};
