// Brings the database to the newest shape as its owner, then gives the application's role its rights.
import { fileURLToPath } from 'node:url';
import pg from 'pg';
import { z } from 'zod';
import { migrateDatabase } from '#server/platform/migrations.ts';

const environment = z
  .object({
    DATABASE_OWNER_URL: z.string(
      'Set DATABASE_OWNER_URL: the address of the database for the role that owns it',
    ),
    DATABASE_URL: z.string('Set DATABASE_URL: the address of the database for the application’s role'),
  })
  // eslint-disable-next-line no-restricted-syntax -- a command of its own: it needs two addresses and no other setting
  .safeParse(process.env);

if (!environment.success) {
  for (const issue of environment.error.issues) console.error(issue.message);
  process.exit(1);
}
pg.defaults.connectionTimeoutMillis = 10_000;
const done = await migrateDatabase({
  ownerUrl: environment.data.DATABASE_OWNER_URL,
  appUrl: environment.data.DATABASE_URL,
  folder: fileURLToPath(new URL('../migrations', import.meta.url)),
});
console.log(done.length === 0 ? 'The database is up to date.' : `Migrated: ${done.join(', ')}.`);
