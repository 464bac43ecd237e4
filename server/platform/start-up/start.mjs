// Brings Treenail up on a bare machine with one command, looks after it, and takes it down cleanly.
import { chmodSync, existsSync, mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { createCrew, stopLeftOvers } from './children.mjs';
import { appEnvironment } from './environment.mjs';
import { StartFault } from './faults.mjs';
import { takeLock } from './locks.mjs';
import { DEFAULT_PORT, chooseSitePort } from './ports.mjs';
import { readSettings } from './settings.mjs';
import * as stages from './stages.mjs';
import { alreadyRunning, closingSummary, createTeller, portMoved } from './words.mjs';

/** npm passes a terminal's Ctrl-C on to us a second time at once; a person's second one comes later. */
const ECHO_MS = 1000;

const tell = createTeller((text) => process.stdout.write(text));

function refuseOldNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major > 20 || (major === 20 && minor >= 19)) return;
  throw new StartFault(`This is Node ${process.versions.node}. Treenail needs Node 20.19 or newer.`);
}

function openDataFolder(data) {
  if (existsSync(data)) return;
  mkdirSync(data, { recursive: true });
  // The database's own account has to pass through when we are root; nobody needs to list.
  chmodSync(data, process.getuid?.() === 0 ? 0o711 : 0o700);
}

function lockDataFolder(settings) {
  openDataFolder(settings.data);
  const { held, heldBy } = takeLock(join(settings.data, 'lock.json'));
  if (heldBy) throw new StartFault(alreadyRunning(heldBy, settings.data));
  return held;
}

/** Stops at the first signal in good order; at a second one at once. */
function watchSignals({ crew, lock }) {
  let stopping;
  let since = 0;
  const leave = (code) => {
    lock.release();
    process.exit(code);
  };
  const stop = (words, code) => {
    since ||= Date.now();
    stopping ??= (async () => {
      if (code === 0 || !crew.isEmpty()) tell.line(words);
      await crew.stopAll();
      if (code === 0) tell.line('Stopped.');
      leave(code);
    })().catch((error) => {
      tell.line(String(error));
      crew.killAll();
      leave(1);
    });
    return stopping;
  };
  const onSignal = () => {
    if (!stopping) return void stop('Stopping …', 0);
    if (Date.now() - since < ECHO_MS) return;
    crew.killAll();
    leave(1);
  };
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, onSignal);
  // The terminal may be gone before we are.
  for (const stream of [process.stdout, process.stderr]) stream.on('error', () => {});
  return { stop, isStopping: () => Boolean(stopping) };
}

async function runStages(settings, crew, lock) {
  const { env } = process;
  const { port, moved } = await chooseSitePort(settings.askedPort);
  if (moved) tell.line(`  ${portMoved(DEFAULT_PORT, port)}`);
  const base = { settings, crew, env, port };
  await tell.step('packages', (say) => stages.putPackagesInPlace({ ...base, say }));
  if (!settings.isDemonstration)
    await tell.step('live settings', () => stages.checkLive(base).then(() => 'complete'));
  const kept = await stages.readKept(base);
  let database;
  await tell.step('database', async (say) => {
    database = await stages.bringUpDatabase({ ...base, kept, say });
    return database.words;
  });
  const childEnv = appEnvironment({ env, settings, port, database, ...kept });
  const all = { ...base, kept, database, childEnv };
  await tell.step('tables', () => stages.migrate(all));
  await tell.step('pages', (say) => stages.build({ ...all, say }));
  if (settings.isDemonstration) {
    await tell.step('stand-ins', () => stages.startStandIns(all));
    await tell.step('demonstration', (say) => stages.seed({ ...all, say }));
  }
  await tell.step('site', () => stages.startSite(all));
  const signIns = settings.isDemonstration ? await stages.readSignIns(all) : '';
  const summary = stages.summaryParts({ ...all, signIns });
  lock.tell({ address: summary.address });
  crew.started();
  tell.line(closingSummary(summary));
}

function tellFault(error) {
  if (!(error instanceof StartFault)) return tell.line(error.stack ?? String(error));
  tell.line(['', error.message, error.detail].join('\n').trimEnd());
}

async function start() {
  refuseOldNode();
  const settings = readSettings(process.env, process.argv.slice(2));
  tell.line(`Treenail${settings.isDemonstration ? ', demonstration' : ''}, data in ${settings.data}`);
  const lock = lockDataFolder(settings);
  const rosterFile = join(settings.data, 'children.json');
  const crew = createCrew({
    logs: join(settings.data, 'logs'),
    rosterFile,
    say: tell.line,
    onGivenUp: () => void signals.stop('Stopping …', 1),
  });
  const signals = watchSignals({ crew, lock });
  try {
    await stopLeftOvers(rosterFile);
    await runStages(settings, crew, lock);
  } catch (error) {
    if (signals.isStopping()) return;
    tellFault(error);
    await signals.stop('Stopping …', 1);
  }
}

start().catch((error) => {
  tellFault(error);
  process.exitCode = 1;
});
