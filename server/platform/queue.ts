// Nudges the worker inside the caller's transaction. Only a nudge: what is to be done stands in our own rows.
import type { Trx } from './db.ts';

export type TaskName =
  'send-mail' | 'work-payment-events' | 'sweep' | 'poll-payments' | 'run-checks' | 'tidy';

/** Adds one job at commit; many nudges with one key before it runs are one job. */
export async function nudge(trx: Trx, task: TaskName): Promise<void> {
  await trx.raw(`select graphile_worker.add_job(?, job_key => ?)`, [task, task]);
}
