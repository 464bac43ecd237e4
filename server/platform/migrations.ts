// Runs the migrations as the owner, one runner at a time, and renews the rights of the application's role.
import { readdir } from 'node:fs/promises';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { makeWorkerUtils } from 'graphile-worker';
import knexModule from 'knex';
import type { Knex } from 'knex';
import pg from 'pg';

const ONE_RUNNER_LOCK = 7001;
const WORKER_TABLES = ['_private_jobs', '_private_job_queues', '_private_tasks', '_private_known_crontabs'];

type Source = { ownerUrl: string; appUrl: string; folder: string };
type Migration = { up: (knex: Knex) => Promise<void>; down: (knex: Knex) => Promise<void> };

/** Names carry no extension, so that a migration run from source and from a build is the same one. */
export function migrationSource(folder: string): Knex.MigrationSource<string> {
  return {
    getMigrations: async () => {
      const files = await readdir(folder);
      return files
        .filter((file) => /^\d.*\.ts$/.test(file))
        .map((file) => file.slice(0, -3))
        .sort();
    },
    getMigrationName: (name) => name,
    getMigration: async (name) =>
      (await import(pathToFileURL(path.join(folder, `${name}.ts`)).href)) as Migration,
  };
}

/** @returns the names of the migrations that were run now. */
export async function migrateDatabase({ ownerUrl, appUrl, folder }: Source): Promise<string[]> {
  const lock = new pg.Client({ connectionString: ownerUrl });
  await lock.connect();
  const owner = knexModule({ client: 'pg', connection: ownerUrl, pool: { min: 0, max: 2 } });
  try {
    await lock.query('select pg_advisory_lock($1)', [ONE_RUNNER_LOCK]);
    await owner.raw('create schema if not exists migrations');
    const [, done] = (await owner.migrate.latest({
      migrationSource: migrationSource(folder),
      schemaName: 'migrations',
    })) as [number, string[]];
    const utils = await makeWorkerUtils({ connectionString: ownerUrl });
    await utils.migrate();
    await utils.release();
    await grantRights(owner, decodeURIComponent(new URL(appUrl).username));
    return done;
  } finally {
    await owner.destroy();
    await lock.end();
  }
}

/** Books and audit: read and add, never change or take away. The rest of the product's own tables: all four. */
async function grantRights(owner: Knex, role: string): Promise<void> {
  const all = 'select, insert, update, delete';
  await owner.raw(
    `
    grant usage on schema public, books, audit, checks, graphile_worker to :role:;
    grant ${all} on all tables in schema public to :role:;
    revoke truncate, references, trigger on all tables in schema public from :role:;
    grant select, insert on all tables in schema books to :role:;
    grant select, insert on all tables in schema audit to :role:;
    grant select on all tables in schema checks to :role:;
    revoke insert on books.accounts from :role:;
    grant ${all} on all tables in schema graphile_worker to :role:;
    revoke insert, update, delete on graphile_worker.migrations from :role:;
    grant execute on all functions in schema graphile_worker to :role:;
  `,
    { role },
  );
  for (const table of WORKER_TABLES) {
    await owner.raw('drop policy if exists application on graphile_worker.??', [table]);
    await owner.raw('create policy application on graphile_worker.?? to ?? using (true) with check (true)', [
      table,
      role,
    ]);
  }
}
