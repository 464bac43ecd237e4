// The nightly checks that a person must know of: those that found something, stand still or never ran.
import { z } from 'zod';
import { queryRows, type Db } from '#server/platform/db.ts';

const NIGHTLY_MS = 26 * 60 * 60_000;
const faultSchema = z.object({ id: z.string(), fault: z.string() });
const runSchema = z
  .object({
    name: z.string(),
    ran_at: z.date(),
    faults: z.int(),
    detail: z.array(faultSchema).catch([]),
  })
  .transform((row) => ({
    name: row.name,
    ranAt: row.ran_at,
    faults: row.faults,
    detail: row.detail.map((one) => `${one.fault} (${one.id})`),
  }));
export type FailedCheck = z.output<typeof runSchema>;

const nameSchema = z.object({ name: z.string() });

/** Checks that the database knows and that have not run yet. */
export async function listNeverRunChecks(db: Db): Promise<string[]> {
  const rows = await queryRows(
    db,
    nameSchema,
    `select viewname as name from pg_views
     where schemaname = 'checks' and viewname not in (select name from check_runs) order by 1`,
  );
  return rows.map((row) => row.name);
}

/** The last run of each check, when it found faults or lies more than a night back. */
export const listFailedChecks = (db: Db, now: Date): Promise<FailedCheck[]> =>
  queryRows(
    db,
    runSchema,
    `select * from (
       select distinct on (name) name, ran_at, faults, detail from check_runs order by name, ran_at desc
     ) last where faults > 0 or ran_at < ? order by ran_at, name`,
    [new Date(now.getTime() - NIGHTLY_MS)],
  );
