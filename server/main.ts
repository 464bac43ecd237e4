// The web process: reads the config, opens what it needs, listens, and closes cleanly when told to.
import { createServer } from 'node:http';
import { refuseDemonstrationAccounts } from '#server/accounts/index.ts';
import { createApp } from '#server/app.ts';
import { openDeps } from '#server/open-deps.ts';
import { ConfigFaults, isLoopback } from '#server/platform/config.ts';

const HEADERS_TIMEOUT_MS = 15_000;
const REQUEST_TIMEOUT_MS = 60_000;

async function serve(): Promise<void> {
  const deps = await openDeps();
  const { config, log } = deps;
  if (config.mode === 'live') await refuseDemonstrationAccounts(deps.db);
  const app = await createApp(deps);
  // A sender that dribbles its request is let go, so that a few of them cannot hold the door.
  const server = createServer(
    { headersTimeout: HEADERS_TIMEOUT_MS, requestTimeout: REQUEST_TIMEOUT_MS },
    app,
  );
  // A demonstration with known passwords is not for the network, unless it was given a name there.
  const isLocal = isLoopback(config.publicAddress);
  server.listen({ port: config.port, ...(isLocal && { host: '127.0.0.1' }) }, () =>
    log.info({ port: config.port }, 'listening'),
  );
  const stop = (): void => {
    server.close(() => void deps.close().then(() => process.exit(0)));
    server.closeIdleConnections();
    setTimeout(() => server.closeAllConnections(), 5_000).unref();
  };
  process.once('SIGTERM', stop);
  process.once('SIGINT', stop);
}

try {
  await serve();
} catch (error) {
  if (error instanceof ConfigFaults) for (const fault of error.faults) console.error(fault);
  else console.error(error);
  process.exit(1);
}
