// Opens what every process of the product needs, and closes it in the right order.
import type { Deps } from '#server/deps.ts';
import { listenForChanges } from '#server/platform/changes.ts';
import { followedClock, realClock } from '#server/platform/clock.ts';
import { readConfig, type Config } from '#server/platform/config.ts';
import { openDatabase } from '#server/platform/db.ts';
import { createLog } from '#server/platform/log.ts';
import { createMailer } from '#server/platform/mail/index.ts';
import { openPayments } from '#server/platform/payments.ts';

export async function openDeps(config: Config = readConfig()): Promise<Deps & { close(): Promise<void> }> {
  const log = createLog(config.logLevel);
  const db = openDatabase(config.databaseUrl);
  const clock = config.payment.controlsUrl ? await followedClock(config.payment.controlsUrl, log) : realClock;
  const mailer = createMailer(config);
  const changes = listenForChanges(config.databaseUrl, log);
  return {
    config,
    db,
    payments: openPayments(config),
    mailer,
    clock,
    log,
    changes,
    async close() {
      clock.stop();
      mailer.close();
      await changes.stop();
      await db.destroy();
    },
  };
}
