// Runs the commands of a test run, each in a group of its own, and can end all of them at once.
import { spawn } from 'node:child_process';
import { StartFault } from '../../server/platform/start-up/faults.mjs';
import { signalGroup } from '../../server/platform/start-up/processes.mjs';

const running = new Set();
let isEnding = false;

/**
 * @param {'kept' | 'shown' | 'progress'} to whether the output is kept for later, shown at once,
 * or shown as progress on stderr @returns {Promise<{ code: number | null, output: string }>}
 */
export function runCommand({ command, args, cwd, env, uid, gid }, to = 'kept') {
  if (isEnding) return Promise.resolve({ code: 1, output: 'Stopped.' });
  const stdio = { kept: 'pipe', shown: 'inherit', progress: process.stderr }[to];
  const account = uid === undefined ? {} : { uid, gid };
  const child = spawn(command, args, {
    cwd,
    env,
    ...account,
    detached: true,
    stdio: ['ignore', stdio, stdio],
  });
  running.add(child);
  let output = '';
  child.stdout?.on('data', (bytes) => (output += String(bytes)));
  child.stderr?.on('data', (bytes) => (output += String(bytes)));
  return new Promise((resolve) => {
    const finish = (code) => {
      running.delete(child);
      resolve({ code, output: output.trimEnd() });
    };
    child.once('error', (error) => {
      output += error.message;
      finish(1);
    });
    child.once('close', finish);
  });
}

/** For what must succeed before anything can be tested. */
export async function mustRun(spec, to = 'kept') {
  const { code, output } = await runCommand(spec, to);
  if (code !== 0) throw new StartFault(spec.refusal ?? `${spec.name} failed.`, output);
}

export function endCommands() {
  isEnding = true;
  for (const child of running) if (child.pid) signalGroup(child.pid, 'SIGTERM');
}
