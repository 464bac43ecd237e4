// What every mail test stands on: a database, the mail stand-in, a real mailer, and a clock that is moved by hand.
import { randomUUID } from 'node:crypto';
import { createServer } from 'node:net';
import { startSmtp, type SmtpStandIn } from '#fakes/smtp/start-smtp.ts';
import { movableClock } from '#server/platform/clock.ts';
import { readConfig } from '#server/platform/config.ts';
import type { Db } from '#server/platform/db.ts';
import { createLog } from '#server/platform/log.ts';
import {
  createMailer,
  queueMail,
  type MailDeps,
  type Mailer,
  type MailToQueue,
} from '#server/platform/mail/index.ts';
import { cloneDatabase, type TestDatabase } from '#tests/support/database.ts';

export type MailSetting = {
  db: Db;
  smtp: SmtpStandIn;
  deps: MailDeps;
  /** The real time as the sender sees it. */
  now: () => Date;
  forward(minutes: number): void;
  owner: Db;
  mailerTo(smtpUrl: string): Mailer;
  addAccount(): Promise<string>;
  end(): Promise<void>;
};

export const FROM_NAME = 'Brackenhythe Heritage Society';
const START = new Date('2026-12-01T10:00:00Z');

const testConfig = (smtpUrl: string) =>
  readConfig({
    DATABASE_URL: 'postgres://unused',
    TREENAIL_PUBLIC_ADDRESS: 'http://localhost:4173',
    TREENAIL_SESSION_SECRET: 'a secret of the tests that is long enough',
    TREENAIL_PAYMENT_KEY: 'sk_test_x',
    TREENAIL_PAYMENT_WEBHOOK_SECRET: 'whsec_x',
    TREENAIL_SMTP_URL: smtpUrl,
  });

async function addAccount(db: Db): Promise<string> {
  const [row] = await db('accounts')
    .insert({
      name: 'Nell Harbottle',
      email: `${randomUUID()}@brackenhythe.example`,
      password_hash: 'none',
      roles: ['secretary'],
      created_at: START,
    })
    .returning<{ id: string }[]>('id');
  return row?.id ?? '';
}

/** Speaks like a mail server until the letter's text is due, then hangs up. */
export async function startRudeServer(): Promise<{ url: string; stop(): Promise<void> }> {
  const server = createServer((socket) => {
    socket.on('error', () => undefined);
    socket.write('220 rude.example\r\n');
    socket.on('data', (bytes) => {
      if (/^DATA/im.test(String(bytes))) socket.destroy();
      else socket.write('250 fine\r\n');
    });
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  const port = typeof address === 'object' && address ? address.port : 0;
  return {
    url: `smtp://127.0.0.1:${port}`,
    stop: () => new Promise((resolve) => server.close(() => resolve())),
  };
}

export async function setUpMail(): Promise<MailSetting> {
  const database: TestDatabase = await cloneDatabase();
  const smtp = await startSmtp({ port: 0, pagePort: 0 });
  const clock = movableClock();
  clock.moveTo(new Date('2027-05-03T09:30:00Z'));
  let moment = START;
  const mailers: Mailer[] = [];
  const mailerTo = (smtpUrl: string): Mailer => {
    const mailer = createMailer(testConfig(smtpUrl));
    mailers.push(mailer);
    return mailer;
  };
  return {
    db: database.db,
    owner: database.owner,
    smtp,
    mailerTo,
    deps: { db: database.db, mailer: mailerTo(smtp.smtpUrl), clock, log: createLog('silent') },
    // A little later at each look, as real time is.
    now: () => (moment = new Date(moment.getTime() + 1)),
    forward: (minutes) => (moment = new Date(moment.getTime() + minutes * 60_000)),
    addAccount: () => addAccount(database.db),
    async end() {
      for (const mailer of mailers) mailer.close();
      await smtp.stop();
      await database.drop();
    },
  };
}

export const aLetter = (changes: Partial<MailToQueue> = {}): MailToQueue => ({
  kind: 'gift-thanks',
  subjectKind: 'gift',
  subjectId: randomUUID(),
  toName: 'Thea Quillan',
  toAddress: 'thea.quillan@post.example',
  siteUrl: 'https://lampwoman.example',
  subject: 'Thank you for your gift',
  html: '<p>Thank you.</p>',
  plain: 'Thank you.\n',
  at: new Date('2027-05-03T09:00:00Z'),
  ...changes,
});

export async function queueOne(db: Db, changes: Partial<MailToQueue> = {}): Promise<string> {
  const id = await db.transaction((trx) => queueMail(trx, aLetter(changes)));
  if (!id) throw new Error('the letter was queued before');
  return id;
}

export type MailRow = {
  state: string;
  tries: number;
  message_id: string;
  to_name: string;
  subject: string;
  response: string | null;
  next_try_at: Date | null;
  lease_until: Date | null;
  handing_over_at: Date | null;
  sent_at: Date | null;
  settled_by: string | null;
};

export async function rowOf(db: Db, id: string): Promise<MailRow> {
  const row = await db('mail_outbox').where({ id }).first<MailRow | undefined>();
  if (!row) throw new Error('no such letter');
  return row;
}
