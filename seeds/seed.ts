// Fills the demonstration: `npm run seed -- --if-empty --last-day 2027-05-05 --seed 7`.
import { parseArgs } from 'node:util';
import { daySchema, dayOf } from '#shared/dates.ts';
import { openDeps } from '#server/open-deps.ts';
import { movableClock } from '#server/platform/clock.ts';
import { readConfig } from '#server/platform/config.ts';
import type { Db } from '#server/platform/db.ts';
import { setSetting } from '#server/society/index.ts';
import { putClockRight, seedDemonstration } from './demonstration.ts';
import { openControls } from './give.ts';

const DEFAULT_SEED = 7;
/** Written before the first row and after the last; a start that finds only the first begins again. */
const BEGUN = 'demonstration-begun';
const SEEDED = 'demonstration-seeded';

const { values } = parseArgs({
  options: {
    'if-empty': { type: 'boolean', default: false },
    'last-day': { type: 'string', default: dayOf(new Date()) },
    seed: { type: 'string', default: String(DEFAULT_SEED) },
  },
});

/** Invented gifts need not each wait for the disk: a generator that is cut off is begun again from nothing. */
function withoutWaiting(databaseUrl: string): string {
  const url = new URL(databaseUrl);
  url.searchParams.set('options', '-c synchronous_commit=off');
  return url.href;
}

const lastDay = daySchema.parse(values['last-day']);

const mark = (db: Db, key: string): Promise<void> =>
  db.transaction((trx) => setSetting(trx, key, lastDay, true));

/** @returns whether there is nothing to do. @throws where it cannot be filled. */
async function isFilled(db: Db): Promise<boolean> {
  const has = async (key: string): Promise<boolean> =>
    (await db('settings').where({ key }).first('key')) !== undefined;
  if ((await has(BEGUN)) && !(await has(SEEDED)))
    throw new Error(
      'The demonstration was only half filled. Give an empty database, or start again with npm start: it makes its own anew.',
    );
  const isEmpty = (await db('campaigns').first('id')) === undefined;
  if (isEmpty || values['if-empty']) return !isEmpty;
  throw new Error('The database is not empty. Give another one, or another TREENAIL_DATA.');
}

/** Told to stop, we leave the stand-in's clock in the present; the half that is written is begun again. */
function watchSignals(controlsUrl: string | undefined): void {
  const leave = async (): Promise<void> => {
    if (controlsUrl) await putClockRight(openControls(controlsUrl), lastDay).catch(() => undefined);
    process.exit(1);
  };
  for (const signal of ['SIGINT', 'SIGTERM'] as const) process.once(signal, () => void leave());
}

async function run(): Promise<void> {
  const config = readConfig();
  if (config.mode === 'live') throw new Error('A live society is never filled with invented gifts.');
  const opened = await openDeps({ ...config, databaseUrl: withoutWaiting(config.databaseUrl) });
  try {
    if (await isFilled(opened.db)) return;
    watchSignals(config.payment.controlsUrl);
    opened.clock.stop();
    await mark(opened.db, BEGUN);
    await seedDemonstration(
      { ...opened, clock: movableClock() },
      {
        lastDay,
        seed: Number(values.seed),
        tell: (words) => console.log(words),
      },
    );
    await mark(opened.db, SEEDED);
  } finally {
    await opened.close();
  }
}

try {
  await run();
} catch (error) {
  console.error(error);
  process.exitCode = 1;
}
process.exit();
