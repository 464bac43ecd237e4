// The file that state survives in: one line for each unit of work, only ever added to while running.
import {
  closeSync,
  existsSync,
  fsyncSync,
  mkdirSync,
  openSync,
  readFileSync,
  renameSync,
  writeSync,
} from 'node:fs';
import { join } from 'node:path';
import { z } from 'zod';

/** Collection, id, and the row as it now is; null when it is gone. */
export type Change = [collection: string, id: string, row: unknown];
const lineSchema = z.array(z.tuple([z.string(), z.string(), z.unknown()]));

export type Journal = { append(changes: readonly Change[]): void; stop(): void };
const FILE = 'journal.jsonl';

/** Every change written so far, oldest first. A last line cut short by a kill is one unit of work that was never answered. */
export function readJournal(folder: string): Change[] {
  const path = join(folder, FILE);
  if (!existsSync(path)) return [];
  const lines = readFileSync(path, 'utf8').split('\n');
  lines.pop();
  return lines.flatMap((line) => lineSchema.parse(JSON.parse(line)));
}

/** Starts a fresh journal that holds just these rows, then keeps adding to it. */
export function openJournal(folder: string, rows: Iterable<Change>): Journal {
  mkdirSync(folder, { recursive: true });
  const path = join(folder, FILE);
  // Written aside and renamed, so that a kill leaves either the old journal or the new one, never half of one.
  const aside = openSync(`${path}.new`, 'w');
  for (const row of rows) writeSync(aside, `${JSON.stringify([row])}\n`);
  fsyncSync(aside);
  closeSync(aside);
  renameSync(`${path}.new`, path);
  const file = openSync(path, 'a');
  return {
    // Synchronous on purpose: once an answer leaves, a kill of the process can lose nothing of it.
    append: (changes) => void writeSync(file, `${JSON.stringify(changes)}\n`),
    stop: () => closeSync(file),
  };
}
