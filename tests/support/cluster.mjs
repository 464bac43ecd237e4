// A database cluster for one test run: made in a temporary folder, with the two roles and a migrated template.
import { randomBytes } from 'node:crypto';
import {
  chmodSync,
  existsSync,
  mkdtempSync,
  readFileSync,
  readdirSync,
  realpathSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { spawn } from 'node:child_process';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { databaseAccount, prepareFolder } from '../../server/platform/start-up/cluster-folder.mjs';
import { APP, OWNER, databaseUrl, prepareSql, runSql } from '../../server/platform/start-up/database.mjs';
import { StartFault } from '../../server/platform/start-up/faults.mjs';
import { choosePort } from '../../server/platform/start-up/ports.mjs';
import { makeCluster, serverSpec, untilReady } from '../../server/platform/start-up/postgres.mjs';
import { needBinaries } from '../../server/platform/start-up/private-database.mjs';
import { identify, isSameProcess, stopNoted } from '../../server/platform/start-up/processes.mjs';
import { mustRun } from './commands.mjs';

const PREFIX = 'treenail-tests-';
const TEMPLATE = 'tpl';

/** Tests throw their data away, so nothing has to reach the disk. */
const HASTY = { fsync: 'off', synchronous_commit: 'off', full_page_writes: 'off' };

const secret = () => randomBytes(18).toString('base64url');

function removeFolder(folder) {
  const data = join(folder, 'pg');
  if (existsSync(data)) rmSync(realpathSync(data), { recursive: true, force: true });
  rmSync(folder, { recursive: true, force: true });
}

/** A run that was killed outright leaves its server behind; the next run clears it away. */
async function clearLeftOvers() {
  for (const name of readdirSync(tmpdir()).filter((entry) => entry.startsWith(PREFIX))) {
    const folder = join(tmpdir(), name);
    const notes = join(folder, 'run.json');
    if (!existsSync(notes)) continue;
    const { run, server } = JSON.parse(readFileSync(notes, 'utf8'));
    if (isSameProcess(run)) continue;
    if (server) await stopNoted(server, 'SIGINT');
    removeFolder(folder);
  }
}

function startServer(spec, folder) {
  const { command, args, cwd, env, uid, gid } = spec;
  const account = uid === undefined ? {} : { uid, gid };
  const child = spawn(command, args, {
    cwd,
    env,
    ...account,
    detached: true,
    stdio: ['ignore', 'ignore', 'pipe'],
  });
  let log = '';
  child.stderr.on('data', (bytes) => (log = (log + String(bytes)).slice(-4000)));
  const ended = new Promise((resolve) => child.once('exit', resolve));
  const died = ended.then(() => {
    throw new StartFault('The database of the tests stopped by itself.', log);
  });
  died.catch(() => {});
  writeFileSync(
    join(folder, 'run.json'),
    JSON.stringify({ run: identify(process.pid), server: identify(child.pid) }),
  );
  const stop = async () => {
    if (child.exitCode === null && child.signalCode === null) child.kill('SIGINT');
    const hard = setTimeout(() => child.kill('SIGQUIT'), 10_000);
    await ended;
    clearTimeout(hard);
    removeFolder(folder);
  };
  return { died, stop };
}

async function makeTemplate({ project, connection, owner, app, env }) {
  const passwords = { ownerPassword: owner.password, appPassword: app.password, ownerMayCreate: true };
  await runSql(connection, prepareSql({ name: TEMPLATE, ...passwords }));
  await mustRun({
    command: process.execPath,
    args: ['--import', 'tsx', 'server/migrate.ts'],
    cwd: project,
    env: { ...env, DATABASE_OWNER_URL: databaseUrl(owner), DATABASE_URL: databaseUrl(app) },
    refusal: 'The database of the tests could not be migrated.',
  });
  // A single connection to the template would hold up every clone for five seconds.
  await runSql(
    connection,
    `alter database ${TEMPLATE} allow_connections false;
     select pg_terminate_backend(pid) from pg_stat_activity where datname = '${TEMPLATE}';`,
  );
}

/** @param {{ isDurable?: boolean }} how benches measure a database that really writes */
export async function startTestCluster({ project, say, env, onFolder, isDurable = false }) {
  await clearLeftOvers();
  const run = (spec) => mustRun(spec, spec.command === 'apt-get' ? 'progress' : 'kept');
  const bin = await needBinaries({ folder: '', run, say, env, otherwise: '' });
  const top = mkdtempSync(join(tmpdir(), PREFIX));
  onFolder(() => removeFolder(top));
  writeFileSync(join(top, 'run.json'), JSON.stringify({ run: identify(process.pid) }));
  chmodSync(top, 0o711);
  const account = databaseAccount();
  const folder = prepareFolder(join(top, 'pg'), account);
  const password = secret();
  await makeCluster({ bin, folder, account, password, run, marker: join(top, 'pg-being-made') });
  const port = await choosePort(20_000 + Math.floor(Math.random() * 8000));
  const options = { max_connections: '200', ...(isDurable ? {} : HASTY) };
  const server = startServer(serverSpec({ bin, folder, account, port, options }), top);
  onFolder(server.stop);
  await Promise.race([untilReady({ bin, port }), server.died]);
  const owner = { role: OWNER, password: secret(), port, name: TEMPLATE };
  const app = { role: APP, password: secret(), port, name: TEMPLATE };
  await makeTemplate({ project, connection: { bin, port, password }, owner, app, env });
  return {
    TEST_DATABASE_ADMIN_URL: databaseUrl({ role: 'postgres', password, port, name: 'postgres' }),
    TEST_DATABASE_OWNER_URL: databaseUrl(owner),
    TEST_DATABASE_APP_URL: databaseUrl(app),
  };
}
