// One log for all of the server: lines of JSON, without personal values or secrets.
import { pino, type Logger } from 'pino';

export type Log = Logger;

export const createLog = (level: string): Log =>
  pino({
    level,
    redact: [
      'req.headers.cookie',
      'req.headers.authorization',
      'req.headers["stripe-signature"]',
      'res.headers["set-cookie"]',
    ],
  });
