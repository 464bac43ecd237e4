// The checks of a test run: each gives how many passed and failed, and what there is to read about it.
import { existsSync, mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { runCommand } from './commands.mjs';

const bin = (project, ...path) => join(project, 'node_modules', ...path);

/** A tool that is content or not counts as one check. */
export async function runTool(name, { project, env, args, isShown = false }) {
  const began = Date.now();
  const { code, output } = await runCommand(
    { command: process.execPath, args, cwd: project, env },
    isShown ? 'shown' : 'kept',
  );
  const isGood = code === 0;
  return {
    name,
    passed: isGood ? 1 : 0,
    failed: isGood ? 0 : 1,
    output: isGood ? '' : output,
    ms: Date.now() - began,
  };
}

export const checkFormat = (context) =>
  runTool('format', {
    ...context,
    args: [bin(context.project, 'prettier/bin/prettier.cjs'), '--check', '--log-level', 'warn', '.'],
  });

export const checkTypes = (context) =>
  runTool('types', { ...context, args: [bin(context.project, 'typescript/bin/tsc'), '-p', '.', '--noEmit'] });

export const checkLint = (context) =>
  runTool('lint', { ...context, args: [bin(context.project, 'eslint/bin/eslint.js'), '.'] });

/** A file that cannot even be loaded has no tests to count, yet it has failed. */
export function countReport(report, exitCode) {
  const unloaded = report.testResults.filter(
    ({ status, assertionResults }) => status === 'failed' && assertionResults.length === 0,
  ).length;
  const passed = report.numPassedTests;
  const failed = report.numFailedTests + unloaded;
  const skipped = report.numPendingTests + report.numTodoTests;
  const isSilentlyBad = failed === 0 && (exitCode !== 0 || !report.success || passed === 0);
  return { passed, failed: isSilentlyBad ? 1 : failed, skipped };
}

export async function runVitest(name, { project, env, filters = [] }, more = []) {
  const began = Date.now();
  const folder = mkdtempSync(join(tmpdir(), 'treenail-report-'));
  const file = join(folder, 'report.json');
  const args = [
    bin(project, 'vitest/vitest.mjs'),
    'run',
    '--config',
    'tests/vitest.config.ts',
    '--project',
    name,
  ];
  args.push('--reporter=default', '--reporter=json', `--outputFile.json=${file}`, ...more, ...filters);
  try {
    const { code } = await runCommand({ command: process.execPath, args, cwd: project, env }, 'shown');
    const ms = Date.now() - began;
    if (!existsSync(file))
      return { name, passed: 0, failed: 1, output: 'The test runner gave no report.', ms };
    return { name, ...countReport(JSON.parse(readFileSync(file, 'utf8')), code), ms };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

export const ONE_FILE_AT_A_TIME = ['--no-file-parallelism'];

export function hasTests(project, folder) {
  const path = join(project, folder);
  return (
    existsSync(path) &&
    readdirSync(path, { recursive: true }).some((name) => /\.test\.tsx?$/.test(String(name)))
  );
}
