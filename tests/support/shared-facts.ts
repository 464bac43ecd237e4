// Finds test data that lies beside the project and may not be committed; where it is absent, tests say so and skip.
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

const besides = process.env.TREENAIL_SHARED ?? fileURLToPath(new URL('../../../shared', import.meta.url));

/** The file's place, or undefined (with a word on the console) when it is not on this machine. */
export function findShared(name: string): string | undefined {
  const place = `${besides}/${name}`;
  if (existsSync(place)) return place;
  console.warn(`skipped: ${name} is not beside the project`);
  return undefined;
}
