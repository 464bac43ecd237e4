// Which tests belong together: quick ones side by side, those with a browser or a kill one file at a time.
import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('..', import.meta.url));
const ANY = 'tests/**/*.test.{ts,tsx}';
const LONG = 'tests/**/*.long.test.ts';
const FOLDERS_OF_THEIR_OWN = ['tests/journeys/**', 'tests/faults/**', 'tests/bench/**'];

const project = (name: string, include: string[], exclude: string[], testTimeout: number) => ({
  root,
  test: { name, include, exclude, testTimeout, hookTimeout: Math.max(testTimeout, 60_000) },
});

export default defineConfig({
  root,
  test: {
    projects: [
      project('spec', [ANY], [LONG, ...FOLDERS_OF_THEIR_OWN], 20_000),
      project('browser', ['tests/journeys/**/*.test.{ts,tsx}'], [LONG], 90_000),
      project('faults', ['tests/faults/**/*.test.ts'], [LONG], 120_000),
      project('long', [LONG], [], 1_800_000),
    ],
  },
});
