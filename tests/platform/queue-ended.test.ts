// A queue that ends although nobody stopped it: the worker says so and beats no more.
import type * as graphileWorker from 'graphile-worker';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { startWorker } from '#server/run-worker.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';

const queue = vi.hoisted(() => ({ end: (): void => undefined, jobs: 0 }));
vi.mock('graphile-worker', async (original) => ({
  ...(await original<typeof graphileWorker>()),
  run: (): Promise<Pick<graphileWorker.Runner, 'addJob' | 'promise' | 'stop'>> =>
    Promise.resolve({
      addJob: () => Promise.reject(new Error(`job ${(queue.jobs += 1)}`)),
      promise: new Promise<void>((resolve) => (queue.end = resolve)),
      stop: () => Promise.resolve(),
    }),
}));

let app: TestApp;
beforeEach(async () => {
  app = await startTestApp();
});
afterEach(() => app.stop());

test('it fails, and shows no more signs of life', async () => {
  vi.useFakeTimers({ toFake: ['setInterval', 'clearInterval'] });
  const worker = await startWorker(app.deps);
  vi.advanceTimersByTime(5_000);
  expect(queue.jobs).toBe(2);
  queue.end();
  await expect(worker.failed).rejects.toThrow('stopped by itself');
  vi.advanceTimersByTime(60_000);
  vi.useRealTimers();
  expect(queue.jobs).toBe(2);
});
