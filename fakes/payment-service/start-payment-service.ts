// Starts the stand-in inside a process: opens its state, listens on two ports, and stops cleanly.
import { createServer } from 'node:http';
import type { RequestListener, Server } from 'node:http';
import { createApp } from './api/app.ts';
import { forgetOldAnswers } from './api/idempotency.ts';
import { createControls } from './controls/app.ts';
import { startTimers } from './payments/timers.ts';
import type { Service, ServiceOptions } from './service.ts';
import { openStore } from './state/store.ts';
import { stopCourier } from './webhooks/courier.ts';
import { createQueue } from './webhooks/queue.ts';

export type RunningPaymentService = { apiUrl: string; controlUrl: string; stop(): Promise<void> };

// Never the outside world: the controls have no lock.
const LOOPBACK = '127.0.0.1';
const EVERYWHERE = '::';

/** A card page with a name on the network has to be reached from there, by a phone in the same room. */
function hostOfPages(publicUrl: string | undefined): string {
  const isLocal = !publicUrl || /^(localhost|127(\.\d+){3}|\[::1\])$/.test(new URL(publicUrl).hostname);
  return isLocal ? LOOPBACK : EVERYWHERE;
}

function listen(app: RequestListener, port: number, host: string): Promise<Server> {
  const server = createServer(app);
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, host, () => resolve(server));
  });
}

function urlOf(server: Server): string {
  const address = server.address();
  if (typeof address !== 'object' || address === null)
    throw new Error('the payment stand-in is not listening');
  return `http://${LOOPBACK}:${address.port}`;
}

function close(server: Server): Promise<void> {
  const closed = new Promise<void>((resolve) => server.close(() => resolve()));
  server.closeAllConnections();
  return closed;
}

export async function startPaymentService(options: ServiceOptions): Promise<RunningPaymentService> {
  let pageUrl = '';
  const store = openStore(options.stateFolder);
  const service: Service = {
    options,
    store,
    queue: createQueue(store),
    keysInUse: new Set(),
    pageUrl: () => options.publicUrl ?? pageUrl,
  };
  forgetOldAnswers(service);
  const api = await listen(createApp(service), options.port ?? 0, hostOfPages(options.publicUrl));
  pageUrl = urlOf(api);
  const controls = await listen(createControls(service), options.controlPort ?? 0, LOOPBACK).catch(
    async (error: unknown) => {
      await close(api);
      throw error;
    },
  );
  const stopTimers = startTimers(service);
  const stopAll = async () => {
    stopTimers();
    await Promise.all([close(api), close(controls)]);
    await stopCourier(service);
    store.stop();
  };
  let stopped: Promise<void> | undefined;
  return { apiUrl: pageUrl, controlUrl: urlOf(controls), stop: () => (stopped ??= stopAll()) };
}
