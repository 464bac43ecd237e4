// The only file that names the tables of the books and funds.
import { z } from 'zod';
import type { Day } from '#shared/dates.ts';
import type { Pence } from '#shared/money.ts';
import { toPence, type Db, type Trx } from '#server/platform/db.ts';
import { NotFound } from '#server/platform/errors.ts';

export type EntryKey = { source: string; sourceId: string; kind: string };
/** Debit is positive, credit negative. */
export type Line = { accountCode: string; fundId: string; amountPence: Pence };

/** @returns false when an entry with this key stands already: a repeat is harmless. */
export async function insertEntry(
  trx: Trx,
  key: EntryKey,
  day: Day,
  recordedAt: Date,
  lines: readonly Line[],
): Promise<boolean> {
  const [entry] = await trx('books.entries')
    .insert({ day, recorded_at: recordedAt, source: key.source, source_id: key.sourceId, kind: key.kind })
    .onConflict(['source', 'source_id', 'kind'])
    .ignore()
    .returning<{ id: string }[]>('id');
  if (!entry) return false;
  await trx('books.lines').insert(
    lines.map((line) => ({
      entry_id: entry.id,
      account_code: line.accountCode,
      fund_id: line.fundId,
      amount_pence: line.amountPence,
    })),
  );
  return true;
}

const fundSchema = z.object({
  id: z.string(),
  slug: z.string(),
  name: z.string(),
  restriction: z.enum(['restricted', 'unrestricted']),
  purpose: z.string(),
});
export type Fund = z.infer<typeof fundSchema>;

export async function getFund(db: Db, slug: string): Promise<Fund> {
  const row: unknown = await db('funds').where({ slug }).first();
  if (row === undefined) throw new NotFound(`There is no fund “${slug}”.`);
  return fundSchema.parse(row);
}

export async function addFund(trx: Trx, fund: Omit<Fund, 'id'>): Promise<Fund> {
  const rows: unknown[] = await trx('funds').insert(fund).returning('*');
  return fundSchema.parse(rows[0]);
}

const entryLineSchema = z.object({
  entry_id: z.string(),
  kind: z.string(),
  day: z.string(),
  recorded_at: z.date(),
  account_code: z.string(),
  account_name: z.string(),
  fund_name: z.string(),
  amount_pence: z.unknown().transform(toPence),
});
export type PostedLine = {
  entryId: string;
  kind: string;
  day: Day;
  recordedAt: Date;
  accountCode: string;
  accountName: string;
  fundName: string;
  amountPence: Pence;
};

/** Every line that was ever posted for one source, in the order in which it was posted. */
export async function listPostings(db: Db, source: string, sourceId: string): Promise<PostedLine[]> {
  const rows: unknown[] = await db('books.lines as l')
    .join('books.entries as e', 'e.id', 'l.entry_id')
    .join('books.accounts as a', 'a.code', 'l.account_code')
    .join('funds as f', 'f.id', 'l.fund_id')
    .where({ 'e.source': source, 'e.source_id': sourceId })
    .orderBy('l.id')
    .select('l.entry_id', 'e.kind', 'e.day', 'e.recorded_at', 'l.account_code', 'l.amount_pence', {
      account_name: 'a.name',
      fund_name: 'f.name',
    });
  return rows.map((row) => {
    const line = entryLineSchema.parse(row);
    return {
      entryId: line.entry_id,
      kind: line.kind,
      day: line.day,
      recordedAt: line.recorded_at,
      accountCode: line.account_code,
      accountName: line.account_name,
      fundName: line.fund_name,
      amountPence: line.amount_pence,
    };
  });
}

/** What one account holds over all funds, debit positive. */
export async function accountBalance(db: Db, accountCode: string): Promise<Pence> {
  const row = await db('books.lines')
    .where({ account_code: accountCode })
    .sum<{ sum: string | null }[]>({ sum: 'amount_pence' })
    .first();
  return toPence(row?.sum);
}
