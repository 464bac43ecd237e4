// Runs what the queue nudges, and sweeps for what no nudge told of.
import os from 'node:os';
import { Logger, parseCronItems, run } from 'graphile-worker';
import { keepCheckRun, runChecks } from '#server/books/index.ts';
import type { Deps } from '#server/deps.ts';
import { givingTasks } from '#server/giving/index.ts';
import { BEAT_EVERY_MS, beat } from '#server/platform/health.ts';
import { mailTasks } from '#server/platform/mail/index.ts';
import { reportError } from '#server/platform/problems.ts';
import { getSociety } from '#server/society/index.ts';

const CONCURRENCY = 4;

function taskList(deps: Deps) {
  const mail = mailTasks(deps, {
    findFromName: async () => (await getSociety(deps.db)).name,
    now: () => new Date(),
  });
  const giving = givingTasks(deps);
  return {
    ...mail,
    ...giving,
    /** The queue is only a nudge: whatever stands undone in our own rows is taken up again here. */
    sweep: async (): Promise<void> => {
      await giving['work-payment-events']();
      await mail['send-mail']();
    },
    'run-checks': async (): Promise<void> => {
      const results = await runChecks(deps.db);
      await deps.db.transaction((trx) => keepCheckRun(trx, results, deps.clock.now()));
    },
  };
}

const cronItems = parseCronItems([
  { task: 'sweep', match: '* * * * *', options: { backfillPeriod: 0 } },
  { task: 'poll-payments', match: '* * * * *', options: { backfillPeriod: 0 } },
  { task: 'run-checks', match: '15 3 * * *', options: { backfillPeriod: 24 * 60 * 60 * 1000 } },
  { task: 'tidy', match: '45 3 * * *', options: { backfillPeriod: 0 } },
]);

/** Resolves once it is listening for work. */
export async function startWorker(deps: Deps): Promise<{ stop(): Promise<void> }> {
  const name = `${os.hostname()}:${process.pid}`;
  const showLife = () =>
    beat(deps.db, name).catch((error: unknown) => reportError(deps.log, error, { during: 'beat' }));
  await showLife();
  const beats = setInterval(() => void showLife(), BEAT_EVERY_MS);
  const runner = await run({
    connectionString: deps.config.databaseUrl,
    concurrency: CONCURRENCY,
    noHandleSignals: true,
    parsedCronItems: cronItems,
    taskList: taskList(deps),
    logger: new Logger(() => (level, message) => {
      if (String(level) === 'error') deps.log.error({ from: 'queue' }, message);
    }),
  });
  return {
    async stop() {
      clearInterval(beats);
      await runner.stop();
    },
  };
}
