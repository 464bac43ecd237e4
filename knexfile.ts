// For the knex command alone: makes and runs migrations as the owner. The product itself uses server/migrate.ts.
import { migrationSource } from './server/platform/migrations.ts';

export default {
  client: 'pg',
  connection: process.env.DATABASE_OWNER_URL,
  migrations: {
    migrationSource: migrationSource(new URL('migrations', import.meta.url).pathname),
    schemaName: 'migrations',
  },
};
