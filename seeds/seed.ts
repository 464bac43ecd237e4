// Fills the demonstration: `npm run seed -- --if-empty --last-day 2027-05-05 --seed 7`.
import { parseArgs } from 'node:util';
import { daySchema, dayOf } from '#shared/dates.ts';
import { openDeps } from '#server/open-deps.ts';
import { movableClock } from '#server/platform/clock.ts';
import { readConfig } from '#server/platform/config.ts';
import { seedDemonstration } from './demonstration.ts';

const DEFAULT_SEED = 7;

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

async function run(): Promise<void> {
  const config = readConfig();
  if (config.mode === 'live') throw new Error('A live society is never filled with invented gifts.');
  const opened = await openDeps({ ...config, databaseUrl: withoutWaiting(config.databaseUrl) });
  try {
    const isFilled = (await opened.db('campaigns').first('id')) !== undefined;
    if (isFilled && values['if-empty']) return;
    if (isFilled) throw new Error('The database is not empty. Give another one, or another TREENAIL_DATA.');
    opened.clock.stop();
    await seedDemonstration(
      { ...opened, clock: movableClock() },
      {
        lastDay: daySchema.parse(values['last-day']),
        seed: Number(values.seed),
        tell: (words) => console.log(words),
      },
    );
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
