// The one thing every part of the stand-in is given.
import type { Store } from './state/store.ts';
import type { Queue } from './webhooks/queue.ts';

export type ServiceOptions = {
  /** The secret key that callers must show. */
  key: string;
  /** The folder that state is kept in. */
  stateFolder: string;
  /** 0 asks for any free port. */
  port?: number | undefined;
  controlPort?: number | undefined;
  /** Where a browser finds the card page, when that is not the loopback address. */
  publicUrl?: string | undefined;
  webhook?: { url: string; secret: string } | undefined;
};

export type Service = {
  options: ServiceOptions;
  store: Store;
  queue: Queue;
  /** Keys of requests that are being worked at this moment. */
  keysInUse: Set<string>;
  /** Known once the port is. */
  pageUrl(): string;
};
