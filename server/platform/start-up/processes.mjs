// Tells whether a process noted earlier is still that very process.
import { readFileSync } from 'node:fs';
import { setTimeout as pause } from 'node:timers/promises';

const readOrNothing = (path) => {
  try {
    return readFileSync(path, 'utf8');
  } catch {
    return '';
  }
};

/** State and start moment of a process, or undefined where the system does not tell (no /proc). */
function look(pid) {
  const stat = readOrNothing(`/proc/${pid}/stat`);
  // The command's name may hold spaces and brackets, so count from the last bracket.
  const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
  return stat ? { state: fields[0], started: fields[19] } : undefined;
}

const bootId = () => readOrNothing('/proc/sys/kernel/random/boot_id').trim();

/** What to write down about a process, so that a later one with the same number is not taken for it. */
export function identify(pid) {
  return { pid, started: look(pid)?.started ?? '', boot: bootId() };
}

function answersSignals(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
}

export function isSameProcess({ pid, started, boot }) {
  if (!Number.isSafeInteger(pid) || pid <= 0 || !answersSignals(pid)) return false;
  if (!started) return true;
  const now = look(pid);
  return now !== undefined && now.state !== 'Z' && now.started === started && bootId() === boot;
}

/** Signals the whole group that a child leads, or the child alone where it leads none. */
export function signalGroup(pid, signal) {
  for (const target of [-pid, pid]) {
    try {
      process.kill(target, signal);
      return;
    } catch (error) {
      if (error.code !== 'ESRCH') throw error;
    }
  }
}

/** Stops a process noted earlier: kindly first, hard when it will not go. */
export async function stopNoted(noted, signal = 'SIGTERM', waitMs = 10_000) {
  if (!isSameProcess(noted)) return;
  signalGroup(noted.pid, signal);
  const end = Date.now() + waitMs;
  while (isSameProcess(noted)) {
    if (Date.now() > end) return signalGroup(noted.pid, 'SIGKILL');
    await pause(50);
  }
}
