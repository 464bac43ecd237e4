// One holder at a time: a file with the holder's process in it, made and taken over in single steps.
import { linkSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { identify, isSameProcess } from './processes.mjs';

function parseLock(text) {
  try {
    return JSON.parse(text);
  } catch {
    return {};
  }
}

/** @returns what the lock says, {} when it makes no sense, undefined when there is none */
function readLock(path) {
  try {
    return parseLock(readFileSync(path, 'utf8'));
  } catch (error) {
    if (error.code === 'ENOENT') return undefined;
    throw error;
  }
}

/** Puts the whole content in place at once, so that nobody ever reads half a lock; false when one is there. */
function putNew(path, content) {
  const draft = `${path}.${process.pid}`;
  writeFileSync(draft, content, { mode: 0o644 });
  try {
    linkSync(draft, path);
    return true;
  } catch (error) {
    if (error.code === 'EEXIST') return false;
    throw error;
  } finally {
    rmSync(draft, { force: true });
  }
}

/** Moves a dead holder's lock away. Had another newcomer been quicker, its live lock is put back. */
function clearStale(path, stale) {
  const aside = `${path}.stale.${process.pid}`;
  try {
    renameSync(path, aside);
  } catch (error) {
    if (error.code === 'ENOENT') return;
    throw error;
  }
  const moved = readFileSync(aside, 'utf8');
  rmSync(aside);
  if (JSON.stringify(parseLock(moved)) !== JSON.stringify(stale)) putNew(path, moved);
}

function holding(path, me) {
  const mine = () => {
    const now = readLock(path);
    return now?.pid === me.pid && now?.started === me.started;
  };
  return {
    /** Adds to what a second copy is told. */
    tell(more) {
      if (!mine()) return;
      const draft = `${path}.${process.pid}`;
      writeFileSync(draft, JSON.stringify({ ...readLock(path), ...more }));
      renameSync(draft, path);
    },
    release() {
      if (mine()) rmSync(path, { force: true });
    },
  };
}

/** Takes the lock, or gives what its living holder says of itself. */
export function takeLock(path, about = {}) {
  mkdirSync(dirname(path), { recursive: true });
  const me = identify(process.pid);
  for (let tries = 0; tries < 20; tries += 1) {
    if (putNew(path, JSON.stringify({ ...me, ...about }))) return { held: holding(path, me) };
    const other = readLock(path);
    if (other === undefined) continue;
    if (isSameProcess(other)) return { heldBy: other };
    clearStale(path, other);
  }
  throw new Error(`The lock ${path} changes faster than it can be read.`);
}

/** Waits for its turn, works under the lock, and lets go whatever happens. */
export async function withLock(path, work, onWait = () => {}) {
  let taken = takeLock(path);
  if (!taken.held) onWait(taken.heldBy);
  while (!taken.held) {
    await pause(300);
    taken = takeLock(path);
  }
  try {
    return await work();
  } finally {
    taken.held.release();
  }
}
