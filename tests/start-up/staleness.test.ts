// When packages are installed anew, when pages are built anew, and what a test run counts.
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { hashSources, isBuildCurrent } from '#server/platform/start-up/build.mjs';
import { agrees } from '#server/platform/start-up/install.mjs';
import { countReport } from '#tests/support/checks.mjs';

describe('installed packages', () => {
  const locked = {
    packages: {
      '': {},
      'node_modules/a': { version: '1.0.0' },
      'node_modules/b': { version: '2.0.0', optional: true },
      'node_modules/c': { version: '3.0.0', extraneous: true },
    },
  };

  test('agree with the lock without what this machine or anybody needs', () => {
    expect(agrees(locked, { packages: { 'node_modules/a': { version: '1.0.0' } } })).toBe(true);
  });

  test.each([
    ['a missing one', {}],
    ['another version', { 'node_modules/a': { version: '1.0.1' } }],
    [
      'another version of an optional one',
      { 'node_modules/a': { version: '1.0.0' }, 'node_modules/b': { version: '1.9.0' } },
    ],
  ])('do not agree with %s', (_what, packages) => {
    expect(agrees(locked, { packages })).toBe(false);
  });
});

describe('built pages', () => {
  let project = '';
  beforeEach(() => {
    project = mkdtempSync(join(tmpdir(), 'treenail-build-'));
    for (const path of ['src/home', 'dist/client', 'dist/server'])
      mkdirSync(join(project, path), { recursive: true });
    writeFileSync(join(project, 'src/home/HomePage.tsx'), 'one');
    writeFileSync(join(project, 'dist/client/index.html'), '');
    writeFileSync(join(project, 'dist/server/entry-server.js'), '');
    writeFileSync(join(project, 'dist/.treenail-build'), hashSources(project));
  });
  afterEach(() => rmSync(project, { recursive: true }));

  test('are current until a source changes', () => {
    expect(isBuildCurrent(project)).toBe(true);
    writeFileSync(join(project, 'src/home/HomePage.tsx'), 'two');
    expect(isBuildCurrent(project)).toBe(false);
  });

  test('are stale when a file is added, or when a result is gone', () => {
    writeFileSync(join(project, 'src/home/Staff.tsx'), '');
    expect(isBuildCurrent(project)).toBe(false);
    rmSync(join(project, 'src/home/Staff.tsx'));
    expect(isBuildCurrent(project)).toBe(true);
    rmSync(join(project, 'dist/server/entry-server.js'));
    expect(isBuildCurrent(project)).toBe(false);
  });
});

describe('the count of a test run', () => {
  const report = {
    success: true,
    numPassedTests: 3,
    numFailedTests: 0,
    numPendingTests: 1,
    numTodoTests: 0,
    testResults: [],
  };

  test('is what the runner reports', () => {
    expect(countReport(report, 0)).toEqual({ passed: 3, failed: 0, skipped: 1 });
  });

  test('takes a file that could not be loaded as one failure', () => {
    const testResults = [{ status: 'failed', assertionResults: [] }];
    expect(countReport({ ...report, success: false, testResults }, 1).failed).toBe(1);
  });

  test('takes a crash after the last test, or no test at all, as one failure', () => {
    expect(countReport(report, 1).failed).toBe(1);
    expect(countReport({ ...report, numPassedTests: 0 }, 0).failed).toBe(1);
  });
});
