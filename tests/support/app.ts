// The whole server for a test: a cloned database, the payment stand-in over a socket, a clock that can be moved.
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import os from 'node:os';
import path from 'node:path';
import supertest from 'supertest';
import { startPaymentService } from '#fakes/payment-service/start-payment-service.ts';
import { createApp } from '#server/app.ts';
import type { Deps } from '#server/deps.ts';
import { listenForChanges } from '#server/platform/changes.ts';
import { movableClock } from '#server/platform/clock.ts';
import { readConfig, type Config } from '#server/platform/config.ts';
import { createLog } from '#server/platform/log.ts';
import { createMailer } from '#server/platform/mail/index.ts';
import { openPayments } from '#server/platform/payments.ts';
import { cloneDatabase, type TestDatabase } from './database.ts';

export const WEBHOOK_SECRET = 'whsec_test_of_treenail';
export const PAYMENT_KEY = 'sk_test_of_treenail';
/** A port on which nobody listens: tests that send mail name their own. */
const NO_MAIL_SERVER = 'smtp://127.0.0.1:9';

export type TestApp = {
  url: string;
  deps: Deps;
  database: TestDatabase;
  clock: ReturnType<typeof movableClock>;
  paymentControls: string;
  agent(): ReturnType<typeof supertest.agent>;
  stop(): Promise<void>;
};

type Options = { smtpUrl?: string; env?: Record<string, string>; database?: TestDatabase };

async function listen(server: Server): Promise<number> {
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  if (typeof address !== 'object' || address === null) throw new Error('not listening');
  return address.port;
}

function testConfig(port: number, databaseUrl: string, apiUrl: string, options: Options): Config {
  return readConfig({
    NODE_ENV: 'test',
    DATABASE_URL: databaseUrl,
    TREENAIL_PUBLIC_ADDRESS: `http://127.0.0.1:${port}`,
    TREENAIL_SESSION_SECRET: 'a secret for tests alone, long enough',
    TREENAIL_PAYMENT_KEY: PAYMENT_KEY,
    TREENAIL_PAYMENT_WEBHOOK_SECRET: WEBHOOK_SECRET,
    TREENAIL_PAYMENT_API: apiUrl,
    TREENAIL_PAYMENT_PAGE_ORIGIN: apiUrl,
    TREENAIL_SMTP_URL: options.smtpUrl ?? NO_MAIL_SERVER,
    TREENAIL_LOG_LEVEL: 'silent',
    ...options.env,
  });
}

export async function startTestApp(options: Options = {}): Promise<TestApp> {
  const database = options.database ?? (await cloneDatabase());
  const server = createServer();
  const port = await listen(server);
  const url = `http://127.0.0.1:${port}`;
  const stateFolder = mkdtempSync(path.join(os.tmpdir(), 'treenail-payments-'));
  const payments = await startPaymentService({
    key: PAYMENT_KEY,
    stateFolder,
    webhook: { url: `${url}/webhooks/payments`, secret: WEBHOOK_SECRET },
  });
  const config = testConfig(port, database.appUrl, payments.apiUrl, options);
  const log = createLog(config.logLevel);
  const clock = movableClock();
  const changes = listenForChanges(config.databaseUrl, log);
  const mailer = createMailer(config);
  const deps: Deps = { config, db: database.db, payments: openPayments(config), mailer, clock, log, changes };
  server.on('request', await createApp(deps));
  return {
    url,
    deps,
    database,
    clock,
    paymentControls: payments.controlUrl,
    // As a page of ours asks: what comes with a cookie and no origin is refused.
    agent: () => supertest.agent(url).set('Origin', url),
    async stop() {
      server.closeAllConnections();
      await new Promise((resolve) => server.close(resolve));
      await payments.stop();
      mailer.close();
      await changes.stop();
      await database.drop();
      rmSync(stateFolder, { recursive: true, force: true });
    },
  };
}
