// The stages of a start after the data folder is locked, in the order in which they need one another.
import { mkdirSync, rmSync } from 'node:fs';
import { join, relative } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { buildIfStale } from './build.mjs';
import { standInEnvironments, toolEnvironment } from './environment.mjs';
import { StartFault } from './faults.mjs';
import { installPackages } from './install.mjs';
import { rememberPorts } from './ports.mjs';
import { answersTcp } from './postgres.mjs';
import { refuseLostPassword, startPrivateDatabase } from './private-database.mjs';
import { keepSecrets } from './secrets.mjs';

const STAND_IN_PORTS = ['paymentService', 'paymentControls', 'mailPage', 'oneTimeCodes', 'smtp'];
const STAND_IN_STATES = ['payment-service', 'mail'];
const HEALTH_WAIT_MS = 90_000;
const STAND_IN_WAIT_MS = 30_000;

/** A TypeScript program of ours; in development it starts anew when its sources change. */
function program(settings, name, file, env, { isWatched, options = [], ...more } = {}) {
  // Node drops the word after each --watch-path for the inner process, so the folder must be a word of its own.
  const watched = isWatched && settings.isDev ? ['--watch-path', 'server', '--watch-path', 'shared'] : [];
  const args = [...watched, '--import', 'tsx', file, ...options];
  return { name, command: process.execPath, args, cwd: settings.project, env, ...more };
}

async function until(isTrue, waitMs, words) {
  const end = Date.now() + waitMs;
  while (!(await isTrue())) {
    if (Date.now() > end) throw new StartFault(words);
    await pause(100);
  }
}

async function isHealthy(port) {
  try {
    const answer = await fetch(`http://127.0.0.1:${port}/healthz`, { signal: AbortSignal.timeout(3000) });
    await answer.arrayBuffer();
    return answer.status === 200;
  } catch {
    return false;
  }
}

export const checkLive = ({ settings, crew, env, port }) =>
  crew.runToEnd(
    program(settings, 'check-config', 'server/check-config.ts', liveEnvironment(settings, env, port), {
      isCaptured: true,
      refusal: 'Treenail cannot go live with these settings:',
    }),
  );

/** The settings as given; only a private database has no address before it runs. */
const liveEnvironment = (settings, env, port) => ({
  DATABASE_URL: 'postgres://127.0.0.1/private',
  ...env,
  NODE_ENV: 'production',
  TREENAIL_MODE: settings.mode,
  TREENAIL_DATA: settings.data,
  PORT: String(port),
});

export const putPackagesInPlace = ({ settings, crew, env, say }) =>
  installPackages(settings.project, { run: crew.runToEnd, say, env: toolEnvironment(env) });

/** Ports and secrets of this data folder, kept from one start to the next. */
export async function readKept({ settings, port }) {
  const { data, isDemonstration, database } = settings;
  const names = [...(isDemonstration ? STAND_IN_PORTS : []), ...(database ? [] : ['database'])];
  const secretsFile = join(data, 'secrets.json');
  if (!database) refuseLostPassword(data, secretsFile);
  return {
    ports: await rememberPorts(join(data, 'ports.json'), names, port),
    secrets: keepSecrets(secretsFile, { isDemonstration, withDatabase: !database }),
  };
}

export async function bringUpDatabase({ settings, crew, kept, env, say }) {
  if (settings.database) return { ...settings.database, words: 'as given in DATABASE_URL' };
  const { data } = settings;
  const port = kept.ports.database;
  const tools = toolEnvironment(env);
  const made = await startPrivateDatabase({ data, port, secrets: kept.secrets, crew, say, env: tools });
  return { ...made, words: `${made.isNew ? 'made, ' : ''}running on port ${port}` };
}

async function runMigrations({ settings, crew, childEnv, database }) {
  const env = { ...childEnv, DATABASE_OWNER_URL: database.ownerUrl };
  const refusal = 'The database could not be brought up to date.';
  await crew.runToEnd(program(settings, 'migrate', 'server/migrate.ts', env, { refusal }));
}

/** Half a demonstration is begun again here, before the stand-ins run; a database of the society's own is left alone. */
export async function migrate(all) {
  const { settings, database } = all;
  await runMigrations(all);
  if (!settings.isDemonstration || !(await database.isHalfFilled?.())) return 'up to date';
  // The stand-ins' state first: once the database is gone, nothing tells any more that they hold half a town.
  for (const state of STAND_IN_STATES) rmSync(join(settings.data, state), { recursive: true, force: true });
  await database.beginAgain();
  await runMigrations(all);
  return 'made anew, because the demonstration had been only half filled';
}

export const build = ({ settings, crew, env, say }) =>
  settings.isDev
    ? 'on the fly'
    : buildIfStale(settings.project, { run: crew.runToEnd, say, env: toolEnvironment(env) });

export async function startStandIns({ settings, crew, kept, env, port }) {
  for (const state of STAND_IN_STATES) {
    mkdirSync(join(settings.data, state), { recursive: true, mode: 0o700 });
  }
  const environments = standInEnvironments({ env, settings, port, ...kept });
  for (const [name, childEnv] of Object.entries(environments)) {
    crew.keep(program(settings, name, `fakes/${name}/main.ts`, childEnv, { stopRank: 1 }));
  }
  const waits = STAND_IN_PORTS.map((name) =>
    until(() => answersTcp(kept.ports[name]), STAND_IN_WAIT_MS, `The stand-in for ${name} does not answer.`),
  );
  await crew.whileAllLive(Promise.all(waits));
  return 'payments, mail and one-time codes';
}

export async function seed({ settings, crew, childEnv, say }) {
  say('looking');
  const refusal = 'The demonstration could not be written.';
  const more = { options: ['--if-empty'], isCaptured: true, refusal };
  const output = await crew.runToEnd(program(settings, 'seed', 'seeds/seed.ts', childEnv, more));
  return output.split('\n').at(-1) || 'in place';
}

export async function startSite({ settings, crew, childEnv, port }) {
  const web = settings.isDev ? { ...childEnv, TREENAIL_DEV: '1' } : childEnv;
  const more = { isWatched: true, isMirrored: settings.isDev };
  crew.keep(program(settings, 'web', 'server/main.ts', web, more));
  crew.keep(program(settings, 'worker', 'server/worker.ts', childEnv, more));
  const words = `The site does not answer well at http://127.0.0.1:${port}/healthz. See the logs web and worker.`;
  await crew.whileAllLive(until(() => isHealthy(port), HEALTH_WAIT_MS, words));
  return `well, at port ${port}`;
}

export const readSignIns = ({ settings, crew, childEnv }) =>
  crew.runToEnd(program(settings, 'sign-ins', 'seeds/sign-ins.ts', childEnv, { isCaptured: true }));

export function summaryParts({ settings, kept, port, signIns }) {
  const local = (name) => `http://127.0.0.1:${kept.ports[name]}`;
  const { isDemonstration } = settings;
  return {
    isDemonstration,
    signIns,
    address: settings.publicAddress ?? `http://localhost:${port}`,
    pages: isDemonstration
      ? [
          ['Mail received', local('mailPage')],
          ['Payments and their clock', local('paymentControls')],
          ['One-time codes', local('oneTimeCodes')],
        ]
      : [],
    logs: relative(process.cwd(), join(settings.data, 'logs')) || settings.data,
  };
}
