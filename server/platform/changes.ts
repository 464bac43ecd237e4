// Hears what other processes changed (PostgreSQL notifications) on a connection of its own that heals itself.
import pg from 'pg';
import type { Log } from './log.ts';

export const CAMPAIGN_CHANGED = 'campaign_changed';
type Channel = typeof CAMPAIGN_CHANGED;

export type Changes = {
  /** Called at each change, and after every reconnection, because what was told meanwhile is lost. */
  onChange(channel: Channel, listener: () => void): void;
  stop(): Promise<void>;
};

const FIRST_WAIT_MS = 100;
const LONGEST_WAIT_MS = 5_000;
const PING_EVERY_MS = 15_000;
const PING_TIMEOUT_MS = 5_000;

export function listenForChanges(databaseUrl: string, log: Log): Changes {
  const listeners = new Map<Channel, (() => void)[]>();
  let client: pg.Client | undefined;
  let stopped = false;
  let waitMs = FIRST_WAIT_MS;
  let timer: NodeJS.Timeout | undefined;
  let ping: NodeJS.Timeout | undefined;

  const tell = (channel: Channel): void => listeners.get(channel)?.forEach((listener) => listener());
  const again = (): void => {
    clearInterval(ping);
    client = undefined;
    if (stopped) return;
    clearTimeout(timer);
    timer = setTimeout(() => void connect(), waitMs);
    waitMs = Math.min(waitMs * 2, LONGEST_WAIT_MS);
  };

  async function connect(): Promise<void> {
    const fresh = new pg.Client({
      connectionString: databaseUrl,
      keepAlive: true,
      query_timeout: PING_TIMEOUT_MS,
    });
    let isLost = false;
    const lose = (): void => {
      if (isLost) return;
      isLost = true;
      fresh.end().catch(() => undefined);
      again();
    };
    fresh.on('error', lose);
    fresh.on('end', lose);
    fresh.on('notification', () => tell(CAMPAIGN_CHANGED));
    try {
      await fresh.connect();
      await fresh.query(`listen ${CAMPAIGN_CHANGED}`);
    } catch (error) {
      log.warn({ err: error }, 'listening for changes failed; trying again');
      return lose();
    }
    if (stopped) return void fresh.end().catch(() => undefined);
    client = fresh;
    waitMs = FIRST_WAIT_MS;
    ping = setInterval(() => void fresh.query('select 1').catch(lose), PING_EVERY_MS);
    ping.unref();
    tell(CAMPAIGN_CHANGED);
  }
  void connect();

  return {
    onChange(channel, listener) {
      listeners.set(channel, [...(listeners.get(channel) ?? []), listener]);
    },
    async stop() {
      stopped = true;
      clearTimeout(timer);
      clearInterval(ping);
      await client?.end().catch(() => undefined);
    },
  };
}
