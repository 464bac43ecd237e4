// The processes that the start-up looks after: starts them, notices their death, starts them again, stops them all.
import { spawn } from 'node:child_process';
import { closeSync, existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { StartFault } from './faults.mjs';
import { lastLines, openLog } from './logs.mjs';
import { identify, signalGroup, stopNoted } from './processes.mjs';
import { died } from './words.mjs';

const MOST_DEATHS_IN_A_ROW = 5;
const STEADY_MS = 60_000;
const LONGEST_PAUSE_MS = 15_000;

/** Starts one process in a group of its own, so that a Ctrl-C in the terminal reaches us and not it. */
function launch(spec, logs) {
  const log = openLog(logs, spec.name);
  const { cwd, env, uid, gid } = spec;
  const out = spec.isMirrored || spec.isCaptured ? 'pipe' : log.fd;
  const child = spawn(spec.command, spec.args, {
    ...(uid === undefined ? {} : { uid, gid }),
    cwd,
    env,
    detached: true,
    stdio: ['ignore', out, spec.isMirrored ? 'pipe' : log.fd],
  });
  closeSync(log.fd);
  const run = { spec, child, log, since: Date.now(), end: undefined, output: '' };
  child.stdout?.on('data', (bytes) => {
    run.output = spec.isCaptured ? run.output + String(bytes) : '';
    if (spec.isMirrored) process.stdout.write(bytes);
  });
  child.stderr?.pipe(process.stderr, { end: false });
  run.ended = new Promise((resolve) => {
    const finish = (end) => resolve((run.end ??= end));
    child.once('error', (error) => finish({ code: error.code, signal: null }));
    child.once(spec.isCaptured ? 'close' : 'exit', (code, signal) => finish({ code, signal }));
  });
  return run;
}

async function stopRun(run) {
  if (run.end || !run.child.pid) return;
  const { stopSignal = 'SIGTERM', hardSignal = 'SIGKILL', stopWaitMs = 10_000 } = run.spec;
  signalGroup(run.child.pid, stopSignal);
  const hard = setTimeout(() => signalGroup(run.child.pid, hardSignal), stopWaitMs);
  await run.ended;
  clearTimeout(hard);
}

const tellDeath = (run, end) =>
  `${died(run.spec.name, end, run.log.path)}\n${lastLines(run.log.path, { from: run.log.from })}`;

/** Processes that an earlier start left behind because it was killed outright. */
export async function stopLeftOvers(rosterFile) {
  if (!existsSync(rosterFile)) return 0;
  let noted = [];
  try {
    noted = JSON.parse(readFileSync(rosterFile, 'utf8'));
  } catch {
    // A half-written roster names nobody; the database's own lock file still guards the data.
  }
  await Promise.all(noted.map((child) => stopNoted(child, child.stopSignal)));
  rmSync(rosterFile, { force: true });
  return noted.length;
}

export function createCrew({ logs, rosterFile, say, onGivenUp }) {
  const runs = new Set();
  const waiting = new Set();
  let phase = 'starting';
  let failStart;
  const startFailure = new Promise((_, reject) => (failStart = reject));
  startFailure.catch(() => {});

  function writeRoster() {
    const begun = [...runs].filter(({ child }) => child.pid);
    const noted = begun.map(({ child, spec }) => ({
      ...identify(child.pid),
      stopSignal: spec.stopSignal,
    }));
    if (noted.length > 0) writeFileSync(rosterFile, JSON.stringify(noted));
    else rmSync(rosterFile, { force: true });
  }

  function begin(spec) {
    if (phase === 'stopping') throw new StartFault('Stopped before the start was finished.');
    const run = launch(spec, logs);
    runs.add(run);
    writeRoster();
    void run.ended.then(() => {
      runs.delete(run);
      writeRoster();
    });
    return run;
  }

  /** Runs a command to its end; gives what it printed when asked to capture it. */
  async function runToEnd(spec) {
    const run = begin(spec);
    const end = await run.ended;
    if (phase === 'stopping') throw new StartFault('Stopped before the start was finished.');
    if (end.code === 0) return run.output.trim();
    const [words, ...tail] = tellDeath(run, end).split('\n');
    throw new StartFault(spec.refusal ?? words, [...tail, run.output].join('\n').trimEnd());
  }

  /** Starts a process that is to live as long as we do. */
  function keep(spec, deathsBefore = 0) {
    const run = begin(spec);
    void run.ended.then((end) => {
      if (phase === 'stopping') return;
      const [words, ...tail] = tellDeath(run, end).split('\n');
      if (phase === 'starting') return failStart(new StartFault(words, tail.join('\n')));
      say([words, ...tail].join('\n'));
      reviveLater(run, deathsBefore);
    });
    return run;
  }

  function reviveLater(run, deathsBefore) {
    const deaths = Date.now() - run.since > STEADY_MS ? 1 : deathsBefore + 1;
    if (deaths > MOST_DEATHS_IN_A_ROW) {
      say(`${run.spec.name} died ${deaths} times in a row. Everything is stopped.`);
      return onGivenUp();
    }
    const pauseMs = Math.min(1000 * 2 ** (deaths - 1), LONGEST_PAUSE_MS);
    say(`${run.spec.name} is started again in ${pauseMs / 1000} s (${deaths} of ${MOST_DEATHS_IN_A_ROW}).`);
    const timer = setTimeout(() => {
      waiting.delete(timer);
      keep(run.spec, deaths);
    }, pauseMs);
    waiting.add(timer);
  }

  /** Stops all, those with the lowest rank first: what uses a thing goes before the thing. */
  async function stopAll() {
    phase = 'stopping';
    for (const timer of waiting) clearTimeout(timer);
    const ranks = [...new Set([...runs].map(({ spec }) => spec.stopRank ?? 0))].sort((a, b) => a - b);
    for (const rank of ranks) {
      await Promise.all([...runs].filter(({ spec }) => (spec.stopRank ?? 0) === rank).map(stopRun));
    }
  }

  function killAll() {
    phase = 'stopping';
    for (const { child, spec } of runs) {
      if (child.pid) signalGroup(child.pid, spec.hardSignal ?? 'SIGKILL');
    }
  }

  return {
    runToEnd,
    keep,
    stopAll,
    killAll,
    /** Waits for `work`, but not longer than every kept process lives. */
    whileAllLive: (work) => Promise.race([work, startFailure]),
    isEmpty: () => runs.size === 0 && waiting.size === 0,
    started: () => void (phase = 'running'),
  };
}
