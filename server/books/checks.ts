// What must always hold, asked of the database's own views; a row is a fault.
import { z } from 'zod';
import { queryRows, type Db, type Trx } from '#server/platform/db.ts';

const nameSchema = z.object({ viewname: z.string() });
const faultSchema = z.object({ id: z.string(), fault: z.string() });
export type CheckResult = { name: string; faults: { id: string; fault: string }[] };
const MOST_FAULTS_KEPT = 50;

export async function runChecks(db: Db): Promise<CheckResult[]> {
  const views = await queryRows(
    db,
    nameSchema,
    `select viewname from pg_views where schemaname = 'checks' order by 1`,
  );
  const results: CheckResult[] = [];
  for (const { viewname } of views) {
    const faults: unknown[] = await db
      .withSchema('checks')
      .from(viewname)
      .select('id', 'fault')
      .limit(MOST_FAULTS_KEPT);
    results.push({ name: viewname, faults: faults.map((row) => faultSchema.parse(row)) });
  }
  return results;
}

export async function keepCheckRun(trx: Trx, results: readonly CheckResult[], at: Date): Promise<void> {
  if (results.length === 0) return;
  await trx('check_runs').insert(
    results.map((one) => ({
      ran_at: at,
      name: one.name,
      faults: one.faults.length,
      detail: JSON.stringify(one.faults),
    })),
  );
}
