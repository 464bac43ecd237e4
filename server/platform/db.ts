// The database: one pool, readers take Db, writers take Trx, and values arrive as what they mean.
import knexModule from 'knex';
import type { Knex } from 'knex';
import pg from 'pg';
import { z } from 'zod';
import { pence, type Pence } from '#shared/money.ts';

export type Db = Knex;
export type Trx = Knex.Transaction;

const DATE_OID = 1082;
// A day is kept as YYYY-MM-DD: as a local midnight it would slip to the day before.
pg.types.setTypeParser(DATE_OID, (value) => value);

export function openDatabase(url: string, { poolSize = 10 } = {}): Db {
  return knexModule({
    client: 'pg',
    connection: { connectionString: url, application_name: 'treenail', keepAlive: true },
    pool: { min: 0, max: poolSize },
    acquireConnectionTimeout: 10_000,
  });
}

const integerText = z.union([z.string().regex(/^-?\d+$/), z.number(), z.bigint()]);

/** bigint columns and sums arrive as text; a sum that is not a safe whole number is a fault, not a gift. */
export const toPence = (value: unknown): Pence => pence(Number(integerText.parse(value ?? '0')));

export const toCount = (value: unknown): number => {
  const count = Number(integerText.parse(value ?? '0'));
  if (!Number.isSafeInteger(count)) throw new RangeError(`${count} is no count`);
  return count;
};

/** The rows of a raw query, each parsed. */
export async function queryRows<T>(
  db: Db,
  schema: z.ZodType<T>,
  sql: string,
  bindings: Knex.RawBinding[] = [],
): Promise<T[]> {
  const result: { rows: unknown[] } = await db.raw(sql, bindings);
  return result.rows.map((row) => schema.parse(row));
}

const pgErrorSchema = z.object({ code: z.string(), constraint: z.string().optional() });

/** The violated constraint of a refused statement, when it was one. */
export function findConstraint(error: unknown): string | undefined {
  const parsed = pgErrorSchema.safeParse(error);
  return parsed.success && parsed.data.code.startsWith('23') ? parsed.data.constraint : undefined;
}

/** Whether the database itself is away, so that asking again later is right. */
export function isDatabaseAway(error: unknown): boolean {
  const parsed = pgErrorSchema.safeParse(error);
  if (parsed.success && /^(08|57P0|53|ECONN|25006)/.test(parsed.data.code)) return true;
  return (
    error instanceof Error &&
    /Timeout acquiring a connection|Connection terminated|ECONNREFUSED/.test(error.message)
  );
}
