// Keeps every letter that came: its exact text in a file of its own, one line about it in the index.
import { appendFileSync, existsSync, mkdirSync, readFileSync, rmSync, truncateSync } from 'node:fs';
import { readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { z } from 'zod';

const keptLetterSchema = z.object({
  id: z.string().regex(/^\d+$/),
  receivedAt: z.iso.datetime(),
  /** The envelope: who was named to the server, whatever the letter itself says. */
  envelopeFrom: z.string(),
  envelopeTo: z.array(z.string()),
  fromText: z.string(),
  toText: z.string(),
  subject: z.string(),
  messageId: z.string(),
  bytes: z.int(),
});
export type KeptLetter = z.infer<typeof keptLetterSchema>;

export type LetterStore = {
  /** Newest first. */
  list(): KeptLetter[];
  find(id: string): KeptLetter | undefined;
  readSource(id: string): Promise<Buffer>;
  keep(letter: Omit<KeptLetter, 'id'>, source: Buffer): Promise<KeptLetter>;
  clear(): void;
};

/** A line that was cut short by a kill belongs to a letter that was never answered for; it is passed over. */
function readIndex(path: string): KeptLetter[] {
  if (!existsSync(path)) return [];
  return readFileSync(path, 'utf8')
    .split('\n')
    .flatMap((line) => {
      try {
        return [keptLetterSchema.parse(JSON.parse(line))];
      } catch {
        return [];
      }
    });
}

export function openLetterStore(folder: string): LetterStore {
  mkdirSync(folder, { recursive: true });
  const indexPath = join(folder, 'letters.jsonl');
  const sourcePath = (id: string): string => join(folder, `${id}.eml`);
  let letters = readIndex(indexPath);
  let byId = new Map(letters.map((letter) => [letter.id, letter]));
  let lastId = letters.reduce((most, letter) => Math.max(most, Number(letter.id)), 0);
  // A cut-off last line must not swallow the next one.
  if (existsSync(indexPath) && !/(^|\n)$/.test(readFileSync(indexPath, 'utf8')))
    appendFileSync(indexPath, '\n');
  return {
    list: () => letters.toReversed(),
    find: (id) => byId.get(id),
    readSource: (id) => readFile(sourcePath(id)),
    async keep(letter, source) {
      const kept = { id: String((lastId += 1)), ...letter };
      await writeFile(sourcePath(kept.id), source);
      appendFileSync(indexPath, `${JSON.stringify(kept)}\n`);
      letters.push(kept);
      byId.set(kept.id, kept);
      return kept;
    },
    clear() {
      for (const letter of letters) rmSync(sourcePath(letter.id), { force: true });
      if (existsSync(indexPath)) truncateSync(indexPath);
      letters = [];
      byId = new Map();
    },
  };
}
