// How fast we are beside the least that could do the same, measured in the same run: `name ours reference ratio`.
import { randomUUID } from 'node:crypto';
import { createServer, get, type Server } from 'node:http';
import { performance } from 'node:perf_hooks';
import { buffer } from 'node:stream/consumers';
import autocannon from 'autocannon';
import { pence } from '#shared/money.ts';
import { receiveGift } from '#server/giving/receive-gift.ts';
import type { Db } from '#server/platform/db.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';
import { askToGive, giveGift, setUpTown, withDeclaration } from '#tests/support/factories.ts';

const LOAD = { connections: 20, duration: 4, workers: 1, headers: { 'accept-encoding': 'br' } };
const WARM_UP_SECONDS = 1;
const GIFTS_BEFORE = 20;
const WARM_UP_GIFTS = 5;
const MEASURED_GIFTS = 40;

function tell(name: string, ours: number, reference: number, unit: string): void {
  const show = (value: number) => `${value < 100 ? value.toFixed(2) : Math.round(value)}${unit}`;
  console.log(`${name} ${show(ours)} ${show(reference)} ${(ours / reference).toFixed(2)}`);
}

async function perSecond(url: string): Promise<number> {
  await autocannon({ ...LOAD, url, duration: WARM_UP_SECONDS });
  const { requests, errors, non2xx } = await autocannon({ ...LOAD, url });
  if (errors + non2xx > 0) throw new Error(`${url}: ${errors} errors, ${non2xx} answers that are not 200`);
  return requests.average;
}

/** The same bytes under the same headers with nothing in between. */
async function startBare(url: string): Promise<{ server: Server; url: string }> {
  const answer = await fetch(url, { headers: LOAD.headers });
  if (answer.headers.get('content-encoding') !== 'br') throw new Error(`${url} was not compressed`);
  const headers = Object.fromEntries(
    [...answer.headers].filter(([name]) => !/^(date|connection|keep-alive|content-length)$/.test(name)),
  );
  const body = await bytesOf(url);
  const server = createServer((_req, res) => {
    res.writeHead(200, { ...headers, 'content-length': body.length }).end(body);
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  if (typeof address !== 'object' || address === null) throw new Error('not listening');
  return { server, url: `http://127.0.0.1:${address.port}/` };
}

/** As they come over the line: fetch would unpack them. */
const bytesOf = (url: string): Promise<Buffer> =>
  new Promise((resolve, reject) => {
    const asking = get(url, { headers: LOAD.headers }, (answer) => {
      buffer(answer).then(resolve, reject);
    });
    asking.on('error', reject);
  });

async function benchPage(app: TestApp, name: string, path: string): Promise<void> {
  const bare = await startBare(`${app.url}${path}`);
  const reference = await perSecond(bare.url);
  const ours = await perSecond(`${app.url}${path}`);
  bare.server.closeAllConnections();
  await new Promise((resolve) => bare.server.close(resolve));
  tell(name, ours, reference, '/s');
}

const median = (values: number[]): number => values.sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? 0;

async function timed(work: () => Promise<unknown>): Promise<number> {
  const began = performance.now();
  await work();
  return performance.now() - began;
}

const threeInserts = (db: Db) => () =>
  db.transaction(async (trx) => {
    for (const table of ['bench_a', 'bench_b', 'bench_c'])
      await trx(table).insert({ id: randomUUID(), words: 'the same for all', sum: 2_000 });
  });

async function benchGift(app: TestApp): Promise<void> {
  const { db, owner } = app.database;
  for (const table of ['bench_a', 'bench_b', 'bench_c'])
    await owner.raw(`create table ${table} (id uuid primary key, words text not null, sum bigint not null);
      grant insert on ${table} to public;`);
  const ours: number[] = [];
  const reference: number[] = [];
  for (let number = 0; number < WARM_UP_GIFTS + MEASURED_GIFTS; number += 1) {
    const { intentId, sessionId } = await askToGive(app, {
      ...withDeclaration,
      email: `giver.${number}@post.example`,
    });
    const paid = {
      sessionId,
      paymentIntentId: `pi_bench_${number}`,
      chargeId: `ch_bench_${number}`,
      amountsPence: [pence(2_000)],
      currencies: ['gbp'],
      paidAt: new Date(),
    };
    // In turn, so that a slow moment of the disk falls on both.
    const bare = await timed(threeInserts(db));
    const gift = await timed(() => db.transaction((trx) => receiveGift(app.deps, trx, intentId, paid)));
    if (number < WARM_UP_GIFTS) continue;
    reference.push(bare);
    ours.push(gift);
  }
  tell('receive-one-gift', median(ours), median(reference), 'ms');
}

const app = await startTestApp();
try {
  await setUpTown(app);
  for (let number = 0; number < GIFTS_BEFORE; number += 1)
    await giveGift(app, { email: `earlier.${number}@post.example` });
  console.log('name ours reference ratio');
  await benchPage(app, 'kept-home-page', '/');
  await benchPage(app, 'api-campaign', '/api/campaign');
  await benchGift(app);
} finally {
  await app.stop();
}
process.exit();
