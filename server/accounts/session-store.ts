// Keeps sessions in PostgreSQL under a digest of their id: a copy of the table signs nobody in.
import { createHash } from 'node:crypto';
import connectPgSimple from 'connect-pg-simple';
import session, { type Store } from 'express-session';
import type { Db, Trx } from '#server/platform/db.ts';
import type { Log } from '#server/platform/log.ts';

export const IDLE_MS = 60 * 60_000;
export const ABSOLUTE_MS = 12 * 60 * 60_000;

const PostgresStore = connectPgSimple(session);
const digest = (sessionId: string): string => createHash('sha256').update(sessionId).digest('base64url');

const toBinding = (value: unknown): string => (typeof value === 'string' ? value : JSON.stringify(value));

/** The store asks with $1, $2; our pool speaks named bindings. */
async function ask(db: Db, sql: string, values: readonly unknown[]): Promise<unknown[]> {
  const bindings = Object.fromEntries(values.map((value, index) => [`p${index + 1}`, toBinding(value)]));
  const result: { rows: unknown[] } = await db.raw(sql.replaceAll(/\$(\d+)/g, ':p$1'), bindings);
  return result.rows;
}

export function createSessionStore(db: Db, log: Log): Store {
  const store = new PostgresStore({
    pgPromise: { any: (sql: string, values: readonly unknown[] = []) => ask(db, sql, values) },
    tableName: 'sessions',
    createTableIfMissing: false,
    ttl: IDLE_MS / 1000,
    // The library would write with every request; touchSession below writes once a minute at most.
    disableTouch: true,
    errorLog: (words: unknown, error: unknown) => log.warn({ err: error }, String(words)),
  });
  const [get, set, destroy] = [store.get.bind(store), store.set.bind(store), store.destroy.bind(store)];
  store.get = (id, done) => get(digest(id), done);
  store.set = (id, data, done) => set(digest(id), data, done);
  store.destroy = (id, done) => destroy(digest(id), done);
  return store;
}

/** Puts the idle limit off. Never makes a row: a session that was ended meanwhile stays ended. */
export async function touchSession(db: Db, sessionId: string, startedAtMs: number): Promise<void> {
  const now = Date.now();
  const expire = new Date(Math.min(now + IDLE_MS, startedAtMs + ABSOLUTE_MS));
  await db('sessions')
    .where({ sid: digest(sessionId) })
    .update({
      expire,
      sess: db.raw(`jsonb_set(sess::jsonb, '{desk,seenAt}', to_jsonb(?::bigint))::json`, [now]),
    });
}

/** Ends every session of a person, wherever it is open. */
export async function endSessionsOf(trx: Trx, accountId: string): Promise<void> {
  await trx('sessions').whereRaw(`sess -> 'desk' ->> 'accountId' = ?`, [accountId]).delete();
}
