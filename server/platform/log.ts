// One log for all of the server: lines of JSON, without personal values or secrets.
import { pino } from 'pino';

export type Log = Pick<ReturnType<typeof pino>, 'debug' | 'info' | 'warn' | 'error'>;

export const createLog = (level: string) =>
  pino({
    level,
    redact: [
      'req.headers.cookie',
      'req.headers.authorization',
      'req.headers["stripe-signature"]',
      'res.headers["set-cookie"]',
    ],
  });
