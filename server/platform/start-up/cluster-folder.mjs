// Finds PostgreSQL on the machine, and a folder that the account it must run under can reach.
import { spawnSync } from 'node:child_process';
import {
  chownSync,
  existsSync,
  lstatSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  readdirSync,
  realpathSync,
  rmdirSync,
  symlinkSync,
} from 'node:fs';
import { delimiter, dirname, join } from 'node:path';
import { StartFault } from './faults.mjs';

const DEBIAN = '/usr/lib/postgresql';
const TOOLS = ['initdb', 'postgres', 'pg_isready', 'psql'];

const isWhole = (bin) => TOOLS.every((tool) => existsSync(join(bin, tool)));

function onPath() {
  const folders = (process.env.PATH ?? '')
    .split(delimiter)
    .filter((folder) => existsSync(join(folder, 'initdb')));
  return folders.map((folder) => dirname(realpathSync(join(folder, 'initdb'))));
}

/** Folders with a whole PostgreSQL, Debian's newest first. */
function listBinaries() {
  const versions = existsSync(DEBIAN) ? readdirSync(DEBIAN).sort((a, b) => Number(b) - Number(a)) : [];
  return [...versions.map((version) => join(DEBIAN, version, 'bin')), ...onPath()].filter(isWhole);
}

const versionOf = (bin) =>
  /\d+/.exec(spawnSync(join(bin, 'postgres'), ['--version'], { encoding: 'utf8' }).stdout)?.[0];

/** The newest binaries; for data that exists already, those of the version that made it. */
export function findBinaries(folder) {
  const found = listBinaries();
  const made = join(folder, 'PG_VERSION');
  if (found.length === 0 || !existsSync(made)) return found[0];
  const version = readFileSync(made, 'utf8').trim();
  const fitting = found.find((bin) => versionOf(bin) === version);
  if (fitting) return fitting;
  throw new StartFault(
    `The data in ${folder} were made by PostgreSQL ${version}, which is no longer on this machine. ` +
      `Install postgresql-${version} again.`,
  );
}

/** PostgreSQL refuses to run as root, so root hands it to the account that Debian's package makes. */
export function databaseAccount() {
  if (process.getuid?.() !== 0) return {};
  const line = readFileSync('/etc/passwd', 'utf8')
    .split('\n')
    .find((entry) => entry.startsWith('postgres:'));
  if (!line) {
    throw new StartFault(
      'There is no "postgres" account for the database to run under. Start as a normal user.',
    );
  }
  const [, , uid, gid] = line.split(':');
  return { uid: Number(uid), gid: Number(gid) };
}

function canReach(folder, account) {
  if (account.uid === undefined) return true;
  const test = ['-c', 'cd "$1" && test -w .', 'sh', folder];
  return spawnSync('/bin/sh', test, { ...account, cwd: '/', stdio: 'ignore' }).status === 0;
}

const give = (folder, { uid, gid }) => uid !== undefined && chownSync(folder, uid, gid);

/** Makes the data folder. Where a parent is closed to the account, the data stand in /var/tmp behind a link. */
export function prepareFolder(wanted, account) {
  if (!lstatSync(wanted, { throwIfNoEntry: false })) {
    mkdirSync(wanted, { mode: 0o700 });
    give(wanted, account);
    if (!canReach(wanted, account)) {
      rmdirSync(wanted);
      const elsewhere = mkdtempSync('/var/tmp/treenail-pg-');
      give(elsewhere, account);
      symlinkSync(elsewhere, wanted);
    }
  }
  if (!existsSync(wanted)) {
    throw new StartFault(
      `${wanted} points to a folder that is gone. Remove that link to begin with an empty database.`,
    );
  }
  const folder = realpathSync(wanted);
  if (!canReach(folder, account)) {
    throw new StartFault(`The database's account cannot write in ${folder}. Was it made by another user?`);
  }
  return folder;
}
