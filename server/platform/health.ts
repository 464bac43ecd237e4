// Whether the database answers and a worker has shown a sign of life a moment ago.
import type { RequestHandler } from 'express';
import { z } from 'zod';
import { queryRows, type Db } from './db.ts';

const FRESH_SECONDS = 30;
export const BEAT_EVERY_MS = 5_000;
const beatSchema = z.object({ alive: z.boolean() });

/** By the database's own clock, so that two machines need not agree on the time. */
export async function beat(db: Db, name: string): Promise<void> {
  await db.raw(
    `insert into worker_beats (name, beat_at) values (?, now()) on conflict (name) do update set beat_at = now()`,
    [name],
  );
}

export async function isWorkerAlive(db: Db): Promise<boolean> {
  const [row] = await queryRows(
    db,
    beatSchema,
    `select exists (select 1 from worker_beats where beat_at > now() - make_interval(secs => ?)) as alive`,
    [FRESH_SECONDS],
  );
  return row?.alive ?? false;
}

/** 200 only when all is well, so that a watcher outside needs to look at nothing but the status. */
export const healthHandler =
  (db: Db): RequestHandler =>
  async (_req, res) => {
    const [database, worker] = await isWorkerAlive(db)
      .then((alive) => ['well', alive ? 'well' : 'silent'] as const)
      .catch(() => ['away', 'unknown'] as const);
    res.setHeader('Cache-Control', 'no-store');
    res.status(database === 'well' && worker === 'well' ? 200 : 503).json({ database, worker });
  };
