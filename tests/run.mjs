// The one test command: brings what the tests need, runs them, and ends with one line that counts.
import { existsSync } from 'node:fs';
import { stripVTControlCharacters } from 'node:util';
import { buildIfStale } from '../server/platform/start-up/build.mjs';
import { StartFault } from '../server/platform/start-up/faults.mjs';
import { installDebian, installPackages } from '../server/platform/start-up/install.mjs';
import { toolEnvironment } from '../server/platform/start-up/environment.mjs';
import { PROJECT } from '../server/platform/start-up/settings.mjs';
import {
  ONE_FILE_AT_A_TIME,
  checkFormat,
  checkLint,
  checkTypes,
  hasTests,
  runTool,
  runVitest,
} from './support/checks.mjs';
import { startTestCluster } from './support/cluster.mjs';
import { endCommands, mustRun } from './support/commands.mjs';

const CHROMIUM = '/usr/bin/chromium';

const project = PROJECT;
const [mode = 'all', ...filters] = process.argv.slice(2);
const results = [];
let clearUp = async () => {};

const say = (words) => process.stderr.write(`tests: ${words} …\n`);
const env = { ...toolEnvironment(process.env), ...(process.stdout.isTTY ? {} : { NO_COLOR: '1' }) };

const seconds = (ms) => (ms === undefined ? '' : ` (${Math.round(ms / 1000)} s)`);

function record(result) {
  results.push(result);
  const { name, passed, failed, skipped, ms, output } = result;
  const more = skipped ? `, ${skipped} skipped` : '';
  console.log(
    `${failed ? 'FAILED' : 'passed'}  ${name}: ${passed} passed, ${failed} failed${more}${seconds(ms)}`,
  );
  if (output) console.log(`${process.stdout.isTTY ? output : stripVTControlCharacters(output)}\n`);
}

const progress = (spec) => mustRun(spec, 'progress');

async function needChromium() {
  if (existsSync(CHROMIUM)) return;
  say('installing Chromium');
  const packages = ['chromium', 'fonts-liberation'];
  await installDebian(packages, { purpose: 'Chromium', otherwise: '', run: progress, env });
}

async function bringCluster(isDurable = false) {
  say('making a database');
  const onFolder = (undo) => (clearUp = undo);
  return { ...env, ...(await startTestCluster({ project, say, env, onFolder, isDurable })) };
}

async function build() {
  const began = Date.now();
  try {
    await buildIfStale(project, { run: mustRun, say, env });
    record({ name: 'build', passed: 1, failed: 0, ms: Date.now() - began });
  } catch (error) {
    record({
      name: 'build',
      passed: 0,
      failed: 1,
      output: error.detail || String(error),
      ms: Date.now() - began,
    });
  }
}

const browser = (testEnv) =>
  runVitest('browser', { project, env: testEnv, filters }, ONE_FILE_AT_A_TIME).then(record);

async function runWithDatabase() {
  const testEnv = await bringCluster();
  await build();
  record(await runVitest('spec', { project, env: testEnv, filters }));
  return testEnv;
}

/** Types and lint need no database, so they use the core that waits while the other one works. */
async function runAll() {
  const context = { project, env };
  const quiet = [];
  const still = (async () => {
    for (const check of [checkFormat, checkTypes, checkLint]) quiet.push(await check(context));
  })();
  const working = runWithDatabase();
  await Promise.allSettled([still, working]);
  quiet.forEach(record);
  const testEnv = await working;
  if (hasTests(project, 'tests/journeys')) {
    await needChromium();
    await browser(testEnv);
  }
  if (hasTests(project, 'tests/faults'))
    record(await runVitest('faults', { project, env: testEnv, filters }, ONE_FILE_AT_A_TIME));
}

const RUNS = {
  all: runAll,
  spec: runWithDatabase,
  browser: async () => {
    await needChromium();
    const testEnv = await bringCluster();
    await build();
    await browser(testEnv);
  },
  long: async () => {
    const testEnv = await bringCluster();
    await build();
    record(await runVitest('long', { project, env: testEnv, filters }, ONE_FILE_AT_A_TIME));
  },
  bench: async () => {
    const testEnv = await bringCluster(true);
    await build();
    const args = ['--import', 'tsx', 'tests/bench/main.ts', ...filters];
    record(await runTool('bench', { project, env: testEnv, args, isShown: true }));
  },
};

function finish() {
  const sum = (key) => results.reduce((total, result) => total + result[key], 0);
  const passed = sum('passed');
  const failed = sum('failed');
  process.exitCode = failed > 0 || passed === 0 ? 1 : 0;
  process.stdout.write(`${passed} passed, ${failed} failed\n`);
}

function stopOnSignals() {
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
    process.once(signal, async () => {
      endCommands();
      await clearUp();
      process.exit(1);
    });
  }
}

async function main() {
  if (!RUNS[mode])
    throw new StartFault(`"${mode}" is not a test run. Choose one of: ${Object.keys(RUNS).join(', ')}.`);
  await installPackages(project, { run: progress, say, env });
  await RUNS[mode]();
}

stopOnSignals();
try {
  await main();
} catch (error) {
  const words =
    error instanceof StartFault ? [error.message, error.detail].join('\n').trimEnd() : error.stack;
  record({ name: 'preparation', passed: 0, failed: 1, output: words });
} finally {
  endCommands();
  await clearUp();
}
finish();
