// The project's own source files, as git knows them, with their text.
import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

export const ROOT = fileURLToPath(new URL('../..', import.meta.url));

export type SourceFile = { path: string; text: string };

/** Tracked files and new ones alike; what is ignored is not ours. */
export function listFiles(pattern: RegExp): SourceFile[] {
  const listed = execFileSync('git', ['ls-files', '--cached', '--others', '--exclude-standard'], {
    cwd: ROOT,
    encoding: 'utf8',
  });
  return [...new Set(listed.split('\n'))]
    .filter((path) => pattern.test(path))
    .flatMap((path) => {
      try {
        return [{ path, text: readFileSync(`${ROOT}/${path}`, 'utf8') }];
      } catch {
        return [];
      }
    });
}

const IMPORT =
  /(?:^|\n)\s*(?:import|export)\s[^'";]*?from\s+'([^']+)'|import\(\s*'([^']+)'\s*\)|(?:^|\n)\s*import\s+'([^']+)'/g;

export const importsOf = (file: SourceFile): string[] =>
  [...file.text.matchAll(IMPORT)].map((found) => found[1] ?? found[2] ?? found[3] ?? '');
