// Builds the browser's part when its sources changed since the last build.
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, readdirSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { preparing } from './install.mjs';

const SOURCES = [
  'src',
  'shared',
  'public',
  'index.html',
  'vite.config.ts',
  'tailwind.config.ts',
  'tsconfig.json',
  'package.json',
  'package-lock.json',
];
const RESULTS = ['client/index.html', 'server/entry-server.js'];

function listFiles(path) {
  if (!existsSync(path)) return [];
  if (!statSync(path).isDirectory()) return [path];
  return readdirSync(path)
    .sort()
    .flatMap((name) => listFiles(join(path, name)));
}

/** One hash over every name and every byte that the build reads: times say nothing after a checkout. */
export function hashSources(project, sources = SOURCES) {
  const hash = createHash('sha256');
  for (const file of sources.flatMap((source) => listFiles(join(project, source)))) {
    const bytes = readFileSync(file);
    hash.update(`${relative(project, file)}\0${bytes.length}\0`).update(bytes);
  }
  return hash.digest('hex');
}

const stampPath = (project) => join(project, 'dist', '.treenail-build');

export function isBuildCurrent(project, hash = hashSources(project)) {
  const stamp = stampPath(project);
  if (!existsSync(stamp) || readFileSync(stamp, 'utf8').trim() !== hash) return false;
  return RESULTS.every((name) => existsSync(join(project, 'dist', name)));
}

/** The two commands of `npm run build`. */
const COMMANDS = [
  ['build', '--outDir', 'dist/client'],
  ['build', '--ssr', 'src/entry-server.tsx', '--outDir', 'dist/server'],
];

export async function buildIfStale(project, { run, say, env = process.env }) {
  if (isBuildCurrent(project)) return 'current';
  return preparing(project, async () => {
    const hash = hashSources(project);
    if (isBuildCurrent(project, hash)) return 'current';
    say('building');
    rmSync(stampPath(project), { force: true });
    for (const args of COMMANDS) {
      const vite = join(project, 'node_modules', 'vite', 'bin', 'vite.js');
      const refusal = 'The pages could not be built.';
      await run({
        name: 'build',
        command: process.execPath,
        args: [vite, ...args],
        cwd: project,
        env,
        refusal,
      });
    }
    writeFileSync(stampPath(project), hash);
    return 'built';
  });
}
