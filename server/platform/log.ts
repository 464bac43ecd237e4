// One log for all of the server: lines of JSON, without personal values or secrets.
import { pino, type Logger } from 'pino';
import { z } from 'zod';

export type Log = Logger;

export const createLog = (level: string): Log =>
  pino({
    level,
    redact: [
      'req.headers.cookie',
      'req.headers.authorization',
      'req.headers.referer',
      'req.headers["stripe-signature"]',
      'res.headers["set-cookie"]',
    ],
  });

/** Who knows one of these addresses reads a receipt or how a gift came out, so the log must not tell it. */
const SECRETS = [
  /((?:^|\/)receipts\/)[^/?#]+/gi,
  /((?:^|\/)api\/gifts\/)(?!(?:sheet|draft|check|checkout)(?:[/?#]|$))[^/?#]+/gi,
  /([?&]gift=)[^&#]*/gi,
  /(\/pay\/).+/gi,
];

export const maskSecrets = (url: string): string =>
  SECRETS.reduce((masked, secret) => masked.replace(secret, '$1…'), url);

const loggedRequest = z.looseObject({ id: z.unknown(), method: z.string(), url: z.string().catch('') });
const loggedAnswer = z.looseObject({ headers: z.record(z.string(), z.unknown()).catch({}) });

/** Given what pino's own serializers made; a query or parameters would tell once more what the address hides. */
export const httpSerializers = {
  req(seen: unknown) {
    const { id, method, url, headers, remoteAddress } = loggedRequest.parse(seen);
    return { id, method, url: maskSecrets(url), headers, remoteAddress };
  },
  res(seen: unknown) {
    const { statusCode, headers } = loggedAnswer.parse(seen);
    const { location } = headers;
    return {
      statusCode,
      headers: typeof location === 'string' ? { ...headers, location: maskSecrets(location) } : headers,
    };
  },
};
