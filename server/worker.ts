// The worker process: opens what it needs, works, and stops cleanly when told to.
import { openDeps } from '#server/open-deps.ts';
import { ConfigFaults } from '#server/platform/config.ts';
import { startWorker } from '#server/run-worker.ts';

async function work(): Promise<void> {
  const deps = await openDeps();
  const worker = await startWorker(deps);
  deps.log.info('working');
  const stop = async (): Promise<void> => {
    await worker.stop();
    await deps.close();
    process.exit(0);
  };
  process.once('SIGTERM', () => void stop());
  process.once('SIGINT', () => void stop());
  // Whoever started us starts us again; a worker that does not work must not look alive.
  await worker.failed;
}

try {
  await work();
} catch (error) {
  if (error instanceof ConfigFaults) for (const fault of error.faults) console.error(fault);
  else console.error(error);
  process.exit(1);
}
