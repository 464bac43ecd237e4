// A database of its own for each test file, cloned from the migrated template; tests work as the application's role.
import { randomUUID } from 'node:crypto';
import pg from 'pg';
import { openDatabase, type Db } from '#server/platform/db.ts';

export type TestDatabase = {
  db: Db;
  /** As the owner, for what only a migration may do. */
  owner: Db;
  appUrl: string;
  ownerUrl: string;
  drop(): Promise<void>;
};

function required(name: string): string {
  const value = process.env[name];
  if (!value)
    throw new Error(`${name} is not set: run the tests through \`npm test\` or \`npm run test:spec\``);
  return value;
}

const withDatabase = (url: string, name: string): string => {
  const changed = new URL(url);
  changed.pathname = `/${name}`;
  return changed.href;
};

async function asAdmin(work: (client: pg.Client) => Promise<unknown>): Promise<void> {
  const client = new pg.Client({ connectionString: required('TEST_DATABASE_ADMIN_URL') });
  await client.connect();
  try {
    await work(client);
  } finally {
    await client.end();
  }
}

export async function cloneDatabase(): Promise<TestDatabase> {
  const name = `t_${randomUUID().replaceAll('-', '')}`;
  const template = new URL(required('TEST_DATABASE_OWNER_URL')).pathname.slice(1);
  const ownerRole = new URL(required('TEST_DATABASE_OWNER_URL')).username;
  await asAdmin((client) =>
    client.query(`create database ${name} template ${template} owner ${ownerRole} strategy file_copy`),
  );
  const appUrl = withDatabase(required('TEST_DATABASE_APP_URL'), name);
  const ownerUrl = withDatabase(required('TEST_DATABASE_OWNER_URL'), name);
  const db = openDatabase(appUrl, { poolSize: 8 });
  const owner = openDatabase(ownerUrl, { poolSize: 2 });
  return {
    db,
    owner,
    appUrl,
    ownerUrl,
    async drop() {
      await db.destroy();
      await owner.destroy();
      await asAdmin((client) => client.query(`drop database ${name} with (force)`));
    },
  };
}
