// The one type that says what every part of the server is given.
import type { Clock } from '#server/platform/clock.ts';
import type { Config } from '#server/platform/config.ts';
import type { Db } from '#server/platform/db.ts';
import type { Log } from '#server/platform/log.ts';
import type { Mailer } from '#server/platform/mail/mailer.ts';
import type { Payments } from '#server/platform/payments.ts';
import type { Changes } from '#server/platform/changes.ts';

export type Deps = {
  config: Config;
  db: Db;
  payments: Payments;
  mailer: Mailer;
  clock: Clock;
  log: Log;
  changes: Changes;
};
