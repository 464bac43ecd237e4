// A demonstration that was cut off is begun again; one that is whole, and every other database, is left alone.
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import pg from 'pg';
import { findBinaries } from '#server/platform/start-up/cluster-folder.mjs';
import { beginAgain, isHalfFilled } from '#server/platform/start-up/half-filled.mjs';
import { setSetting } from '#server/society/index.ts';
import { cloneDatabase, type TestDatabase } from '#tests/support/database.ts';

let database: TestDatabase;
beforeAll(async () => {
  database = await cloneDatabase();
});
afterAll(() => database.drop());

const passwordIn = (url: string) => decodeURIComponent(new URL(url).password);
const nameOf = (url: string) => new URL(url).pathname.slice(1);
const mark = (key: string) => database.db.transaction((trx) => setSetting(trx, key, '2027-05-05', true));

function cluster() {
  const admin = new URL(process.env.TEST_DATABASE_ADMIN_URL ?? '');
  const connection = { bin: findBinaries(''), port: Number(admin.port), password: passwordIn(admin.href) };
  const roles = {
    name: nameOf(database.ownerUrl),
    ownerPassword: passwordIn(database.ownerUrl),
    appPassword: passwordIn(database.appUrl),
    ownerMayCreate: true,
  };
  return { connection, roles };
}

async function countTables(): Promise<number> {
  const client = new pg.Client({ connectionString: database.ownerUrl });
  await client.connect();
  const { rowCount } = await client.query(`select from pg_tables where schemaname = 'public'`);
  await client.end();
  return rowCount ?? 0;
}

describe('a demonstration', () => {
  test('with no mark, or with both, is not touched', async () => {
    const { connection, roles } = cluster();
    expect(await isHalfFilled(connection, roles.name)).toBe(false);
    await mark('demonstration-begun');
    expect(await isHalfFilled(connection, roles.name)).toBe(true);
    await mark('demonstration-seeded');
    expect(await isHalfFilled(connection, roles.name)).toBe(false);
    await beginAgain(connection, roles);
    expect(await countTables()).toBeGreaterThan(10);
  });

  test('with the first mark alone gives way to an empty database of the same name and roles', async () => {
    const { connection, roles } = cluster();
    await database.db('settings').where({ key: 'demonstration-seeded' }).delete();
    await beginAgain(connection, roles);
    expect(await countTables()).toBe(0);
  });
});
