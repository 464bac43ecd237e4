// A private PostgreSQL: makes its cluster once, says how to run it, and tells when it answers.
import { spawn } from 'node:child_process';
import {
  chownSync,
  existsSync,
  mkdtempSync,
  readFileSync,
  readdirSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { connect } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { StartFault } from './faults.mjs';

/** Nothing of the caller's PostgreSQL habits (PGDATA, PGOPTIONS, a locale that is not there) may leak in. */
const cleanEnvironment = () => ({ PATH: process.env.PATH ?? '/usr/bin:/bin', LC_ALL: 'C.UTF-8', TZ: 'UTC' });

function writePasswordFile(password, { uid, gid }) {
  const folder = mkdtempSync(join(tmpdir(), 'treenail-pw-'));
  const file = join(folder, 'password');
  writeFileSync(file, `${password}\n`, { mode: 0o600 });
  if (uid !== undefined) for (const path of [folder, file]) chownSync(path, uid, gid);
  return { file, folder };
}

/** Makes the cluster unless it stands already. The `marker` file outlives a crash, so that half a cluster is made anew. */
export async function makeCluster({ bin, folder, account, password, run, marker }) {
  if (existsSync(join(folder, 'PG_VERSION')) && !existsSync(marker)) return false;
  if (existsSync(marker))
    for (const name of readdirSync(folder)) rmSync(join(folder, name), { recursive: true });
  writeFileSync(marker, '');
  const secret = writePasswordFile(password, account);
  const args = ['-D', folder, '-U', 'postgres', '-A', 'scram-sha-256', `--pwfile=${secret.file}`];
  args.push('-E', 'UTF8', '--locale=C.UTF-8', '--no-instructions');
  try {
    const refusal = 'The database cluster could not be made.';
    const initdb = { name: 'database', command: join(bin, 'initdb'), args, cwd: '/', ...account, refusal };
    await run({ ...initdb, env: cleanEnvironment() });
  } finally {
    rmSync(secret.folder, { recursive: true, force: true });
  }
  rmSync(marker);
  return true;
}

/** PostgreSQL clears a dead server's pid file itself, except when another process of its account has that number. */
export function clearPidFile(folder) {
  const file = join(folder, 'postmaster.pid');
  if (!existsSync(file)) return;
  const pid = Number(readFileSync(file, 'utf8').split('\n')[0]);
  const command = existsSync(`/proc/${pid}/comm`) ? readFileSync(`/proc/${pid}/comm`, 'utf8').trim() : '';
  if (command === 'postgres' || command === 'postmaster') {
    throw new StartFault(
      `A database server (process ${pid}) is already working on ${folder}. Stop it with: kill -INT ${pid}`,
    );
  }
  if (existsSync('/proc/self/comm')) rmSync(file, { force: true });
}

/** The server on loopback only and without a socket file; stopped fast, because its clients are ours. */
export function serverSpec({ bin, folder, account, port, options = {} }) {
  const settings = {
    listen_addresses: '127.0.0.1',
    unix_socket_directories: '',
    timezone: 'UTC',
    ...options,
  };
  return {
    name: 'database',
    command: join(bin, 'postgres'),
    args: ['-D', folder, '-p', String(port)].concat(
      Object.entries(settings).flatMap(([name, value]) => ['-c', `${name}=${value}`]),
    ),
    cwd: '/',
    env: cleanEnvironment(),
    ...account,
    stopSignal: 'SIGINT',
    hardSignal: 'SIGQUIT',
    stopRank: 2,
  };
}

export const answersTcp = (port) =>
  new Promise((resolve) => {
    const socket = connect({ port, host: '127.0.0.1' }, () => {
      socket.destroy();
      resolve(true);
    });
    socket.once('error', () => resolve(false));
  });

const isReady = (bin, port) =>
  new Promise((resolve) => {
    const args = ['-q', '-h', '127.0.0.1', '-p', String(port)];
    const child = spawn(join(bin, 'pg_isready'), args, { stdio: 'ignore', env: cleanEnvironment() });
    child.once('error', () => resolve(false));
    child.once('close', (code) => resolve(code === 0));
  });

export async function untilReady({ bin, port, waitMs = 60_000 }) {
  const end = Date.now() + waitMs;
  while (!((await answersTcp(port)) && (await isReady(bin, port)))) {
    if (Date.now() > end)
      throw new StartFault(`The database did not answer on port ${port} within a minute.`);
    await pause(25);
  }
}
