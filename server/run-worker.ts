// Runs what the queue nudges, and sweeps for what no nudge told of.
import os from 'node:os';
import { Logger, parseCronItems, run, type Runner } from 'graphile-worker';
import { keepCheckRun, runChecks } from '#server/books/index.ts';
import type { Deps } from '#server/deps.ts';
import { givingTasks } from '#server/giving/index.ts';
import { BEAT_EVERY_MS, beat } from '#server/platform/health.ts';
import { mailTasks } from '#server/platform/mail/index.ts';
import { reportError } from '#server/platform/problems.ts';
import { getSociety } from '#server/society/index.ts';

const CONCURRENCY = 4;
const BEFORE_ALL_ELSE = -10;

function taskList(deps: Deps, name: string) {
  const mail = mailTasks(deps, {
    findFromName: async () => (await getSociety(deps.db)).name,
    now: () => new Date(),
  });
  const giving = givingTasks(deps);
  return {
    ...mail,
    ...giving,
    /** Done as a job like any other, so that a sign of life means that the queue works and not only a timer. */
    beat: () => beat(deps.db, name),
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

const openRunner = (deps: Deps, name: string): Promise<Runner> =>
  run({
    connectionString: deps.config.databaseUrl,
    concurrency: CONCURRENCY,
    noHandleSignals: true,
    parsedCronItems: cronItems,
    taskList: taskList(deps, name),
    logger: new Logger(() => (level, message) => {
      if (String(level) === 'error') deps.log.error({ from: 'queue' }, message);
    }),
  });

export type Worker = {
  stop(): Promise<void>;
  /** Rejects when the queue stops working although nobody stopped it. */
  failed: Promise<never>;
};

/** Resolves once it is listening for work. */
export async function startWorker(deps: Deps): Promise<Worker> {
  const runner = await openRunner(deps, `${os.hostname()}:${process.pid}`);
  let isStopping = false;
  const showLife = () =>
    runner
      .addJob('beat', {}, { jobKey: 'beat', priority: BEFORE_ALL_ELSE, maxAttempts: 1 })
      .catch((error: unknown) => isStopping || reportError(deps.log, error, { during: 'beat' }));
  const beats = setInterval(() => void showLife(), BEAT_EVERY_MS);
  const failed = new Promise<never>((_resolve, reject) => {
    const end = (error?: unknown): void => {
      clearInterval(beats);
      if (!isStopping) reject(new Error('the queue stopped by itself', { cause: error }));
    };
    runner.promise.then(() => end(), end);
  });
  failed.catch(() => undefined);
  await showLife();
  return {
    failed,
    async stop() {
      isStopping = true;
      clearInterval(beats);
      await runner.stop();
    },
  };
}
