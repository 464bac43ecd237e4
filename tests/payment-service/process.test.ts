// The stand-in as a process of its own: it starts from its environment, stops when asked, and a kill loses nothing.
import { spawn } from 'node:child_process';
import type { ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { createInterface } from 'node:readline';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { KEY, giftOf, sdkFor } from './stand-in.ts';

const root = resolve(import.meta.dirname, '../..');
let folder: string;
let child: ChildProcess | undefined;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'payment-process-'));
});
afterEach(async () => {
  child?.kill('SIGKILL');
  await rm(folder, { recursive: true });
});

function run(env: Record<string, string>): ChildProcess {
  child = spawn(process.execPath, ['--import', 'tsx', 'fakes/payment-service/main.ts'], {
    cwd: root,
    env: { PATH: process.env.PATH, ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  return child;
}

/** The address of its API, read from the line it says when it is ready. */
async function ready(started: ChildProcess): Promise<string> {
  if (!started.stdout) throw new Error('the stand-in says nothing');
  for await (const line of createInterface(started.stdout)) {
    const url = /service (http:\S+), controls http/.exec(line)?.[1];
    if (url) return url;
  }
  throw new Error('the stand-in did not start');
}
const settings = () => ({ PAYMENT_SERVICE_STATE: folder, PAYMENT_SERVICE_KEY: KEY });

it('keeps everything that it answered through a kill', { timeout: 30_000 }, async () => {
  const first = run(settings());
  const stripe = sdkFor(await ready(first));
  const made: string[] = [];
  for (let count = 0; count < 20; count += 1)
    made.unshift((await stripe.checkout.sessions.create(giftOf(500))).id);
  first.kill('SIGKILL');
  await once(first, 'exit');
  const second = run(settings());
  const list = await sdkFor(await ready(second)).checkout.sessions.list({ limit: 100 });
  expect(list.data.map((session) => session.id)).toEqual(made);
  second.kill('SIGTERM');
  expect(await once(second, 'exit')).toEqual([0, null]);
});

it('does not start without its key, and says what is wrong', { timeout: 30_000 }, async () => {
  const started = run({ PAYMENT_SERVICE_STATE: folder });
  let said = '';
  started.stderr?.on('data', (chunk: Buffer) => (said += chunk.toString()));
  expect(await once(started, 'exit')).toEqual([1, null]);
  expect(said).toContain('PAYMENT_SERVICE_KEY');
});
