// After every deed with money: all that must always hold, asked of the database's own views.
import { expect } from 'vitest';
import { runChecks } from '#server/books/index.ts';
import type { Db } from '#server/platform/db.ts';

export async function expectBooksToAgree(db: Db): Promise<void> {
  const results = await runChecks(db);
  expect(results.length).toBeGreaterThan(10);
  expect(results.filter((one) => one.faults.length > 0)).toEqual([]);
}
