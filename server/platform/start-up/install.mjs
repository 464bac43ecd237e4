// Puts in place what the project needs from outside: its locked packages, and Debian's where the machine lacks them.
import { createHash } from 'node:crypto';
import { existsSync, lstatSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { StartFault } from './faults.mjs';
import { withLock } from './locks.mjs';

const stampPath = (project) => join(project, 'node_modules', '.treenail-lock');
const lockPath = (project) => join(project, 'package-lock.json');

const hashOf = (path) => createHash('sha256').update(readFileSync(path)).digest('hex');

const readJson = (path) => JSON.parse(readFileSync(path, 'utf8'));

/** Whether what npm says it installed has every package of the lock that this kind of machine takes. */
export function agrees(locked, installed) {
  return Object.entries(locked.packages).every(([path, wanted]) => {
    // npm ci leaves out what nobody asks for any more, though the lock may still list it.
    if (path === '' || wanted.extraneous) return true;
    const found = installed.packages[path];
    return found ? found.version === wanted.version : Boolean(wanted.optional);
  });
}

/** npm ci empties the folder behind a link, which may be another project's. */
function refuseLinkedPackages(project) {
  if (!lstatSync(join(project, 'node_modules'), { throwIfNoEntry: false })?.isSymbolicLink()) return;
  throw new StartFault(
    'node_modules is a link to another folder and does not fit package-lock.json. Remove the link and start again.',
  );
}

/** @returns {'missing' | 'stale' | 'current'} */
export function packageState(project) {
  const installedPath = join(project, 'node_modules', '.package-lock.json');
  if (!existsSync(installedPath)) return 'missing';
  const stamp = existsSync(stampPath(project)) ? readFileSync(stampPath(project), 'utf8').trim() : '';
  if (stamp === hashOf(lockPath(project))) return 'current';
  // Somebody may have installed by hand; then npm's own record speaks for it.
  return agrees(readJson(lockPath(project)), readJson(installedPath)) ? 'current' : 'stale';
}

/** Two copies may share one project, so only one installs or builds at a time. */
export const preparing = (project, work, onWait) =>
  withLock(join(project, '.local', 'preparing.lock'), work, onWait);

/** `run` is given a command, its arguments and what to say when it fails. */
export async function installPackages(project, { run, say, env = process.env }) {
  // Nothing is written when nothing is to be done: the project may belong to another account.
  if (packageState(project) === 'current') return 'in place';
  refuseLinkedPackages(project);
  return preparing(project, async () => {
    if (packageState(project) === 'current') return 'in place';
    say('installing the locked set, about a minute');
    await run({
      name: 'install',
      command: 'npm',
      args: ['ci', '--include=dev', '--no-fund', '--no-audit'],
      cwd: project,
      env,
      refusal:
        'The packages could not be installed. Is the network there? Try again with npm ci --include=dev.',
    });
    writeFileSync(stampPath(project), hashOf(lockPath(project)));
    return 'installed';
  });
}

const mayInstall = () => process.getuid?.() === 0 && existsSync('/usr/bin/apt-get');

/** Installs Debian packages, or says in plain words why that is left to a person. */
export async function installDebian(packages, { purpose, otherwise, run, env = process.env }) {
  const byHand = `apt-get install -y --no-install-recommends ${packages.join(' ')}`;
  if (!mayInstall()) {
    const who = existsSync('/usr/bin/apt-get')
      ? 'this account may not install it'
      : 'this system has no apt-get';
    throw new StartFault(
      `${purpose} is not installed and ${who}. Run once as an administrator: ${byHand}\n${otherwise}`.trimEnd(),
    );
  }
  const refusal = `${purpose} could not be installed. Is the network there? Try again with: ${byHand}`;
  const quiet = { ...env, DEBIAN_FRONTEND: 'noninteractive', LC_ALL: 'C.UTF-8' };
  const apt = (args) => run({ name: 'install', command: 'apt-get', args, cwd: '/', env: quiet, refusal });
  await apt(['update']);
  await apt(['install', '-y', '--no-install-recommends', ...packages]);
}
