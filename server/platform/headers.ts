// Security headers of every answer: nothing from elsewhere runs, frames, or is told where a visitor came from.
import type { RequestHandler } from 'express';
import helmet from 'helmet';
import type { Config } from './config.ts';

const YEAR_SECONDS = 31_536_000;
/** What belongs to one person or to the desk stays out of every search engine, even where a link was passed on. */
const NOT_FOR_SEARCH = /^\/(receipts|desk|api|give\/done)(\/|$)/i;

export function securityHeaders(config: Config): RequestHandler[] {
  return [
    helmet({
      contentSecurityPolicy: config.isDevelopment
        ? false
        : {
            useDefaults: false,
            directives: {
              defaultSrc: ["'self'"],
              scriptSrc: ["'self'"],
              styleSrc: ["'self'"],
              imgSrc: ["'self'", 'data:'],
              fontSrc: ["'self'"],
              connectSrc: ["'self'"],
              objectSrc: ["'none'"],
              baseUri: ["'none'"],
              frameAncestors: ["'none'"],
              // A browser applies this to the redirect after a form as well, and ours leads to the card page.
              formAction: ["'self'", config.payment.pageOrigin],
              ...(config.cookie.isSecure && { upgradeInsecureRequests: [] }),
            },
          },
      // For this host alone: other names under the society's domain may be other people's, and without TLS.
      strictTransportSecurity: config.cookie.isSecure
        ? { maxAge: YEAR_SECONDS, includeSubDomains: false }
        : false,
      referrerPolicy: { policy: 'no-referrer' },
    }),
    (req, res, next) => {
      if (NOT_FOR_SEARCH.test(req.path)) res.setHeader('X-Robots-Tag', 'noindex');
      res.setHeader('Permissions-Policy', 'camera=(), geolocation=(), microphone=(), payment=(self)');
      next();
    },
  ];
}
