// A worker's sign of life comes out of the queue, and a queue that stops by itself is not hidden.
import { setTimeout as wait } from 'node:timers/promises';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { isWorkerAlive } from '#server/platform/health.ts';
import { startWorker, type Worker } from '#server/run-worker.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';

let app: TestApp;
let worker: Worker | undefined;
beforeEach(async () => {
  app = await startTestApp();
});
afterEach(async () => {
  await worker?.stop().catch(() => undefined);
  worker = undefined;
  await app.stop();
});

async function until(isTrue: () => Promise<boolean>): Promise<boolean> {
  for (let tries = 0; tries < 100; tries += 1) {
    if (await isTrue()) return true;
    await wait(50);
  }
  return false;
}

test('a beat is a job that was done', async () => {
  expect(await isWorkerAlive(app.deps.db)).toBe(false);
  worker = await startWorker(app.deps);
  expect(await until(() => isWorkerAlive(app.deps.db))).toBe(true);
});

test('a queue that gives out no work gives no beat', async () => {
  await app.database.owner.raw(
    `create function graphile_worker.hold() returns trigger language plpgsql as $$ begin new.run_at := now() + interval '1 hour'; return new; end $$;
     create trigger hold before insert on graphile_worker._private_jobs for each row execute function graphile_worker.hold();`,
  );
  worker = await startWorker(app.deps);
  await wait(1_000);
  expect(await isWorkerAlive(app.deps.db)).toBe(false);
});

test('stopping it is no failure', async () => {
  worker = await startWorker(app.deps);
  await worker.stop();
  const first = await Promise.race([worker.failed.catch(() => 'failed'), wait(200).then(() => 'still')]);
  expect(first).toBe('still');
});
