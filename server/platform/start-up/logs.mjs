// The log file of each child: opened for appending, kept to a sane size, and its end read back when it dies.
import { closeSync, existsSync, mkdirSync, openSync, readSync, renameSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { stripVTControlCharacters } from 'node:util';

const KEEP_BYTES = 10 * 1024 * 1024;
const TAIL_BYTES = 8 * 1024;

export const logPath = (folder, name) => join(folder, `${name}.log`);

/** @returns {{ fd: number, path: string, from: number }} `from` is where this run's own lines begin */
export function openLog(folder, name) {
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  const path = logPath(folder, name);
  if (existsSync(path) && statSync(path).size > KEEP_BYTES) renameSync(path, `${path}.old`);
  const fd = openSync(path, 'a', 0o600);
  return { fd, path, from: statSync(path).size };
}

/** The last lines written since `from`. */
export function lastLines(path, { from = 0, count = 20 } = {}) {
  if (!existsSync(path)) return '';
  const size = statSync(path).size;
  const start = Math.max(Math.min(from, size), size - TAIL_BYTES);
  const bytes = Buffer.alloc(size - start);
  const fd = openSync(path, 'r');
  readSync(fd, bytes, 0, bytes.length, start);
  closeSync(fd);
  // Tools write colour into their logs, which is noise wherever the end of a log is read back.
  return stripVTControlCharacters(bytes.toString('utf8')).trimEnd().split('\n').slice(-count).join('\n');
}
