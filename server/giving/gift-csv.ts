// The gifts' list as CSV for a spreadsheet: the same filter, every gift of it, and no cell that a sheet would run.
import { stringify } from 'csv-stringify';
import { formatTime } from '#shared/dates.ts';
import type { GiftFilter, GiftRow } from '#shared/giving/desk-schemas.ts';
import { DEDICATION_WORDS, THANKS_WORDS } from '#shared/giving/desk-words.ts';
import { formatPlain } from '#shared/money.ts';
import type { Db } from '#server/platform/db.ts';
import { listGiftRows } from './gift-list-reads.ts';
import type { Reader } from './withheld-names.ts';

const ROWS_AT_ONCE = 500;

const COLUMNS = [
  { key: 'number', header: 'No.' },
  { key: 'day', header: 'Day' },
  { key: 'time', header: 'Time' },
  { key: 'giver', header: 'From whom' },
  { key: 'how', header: 'How' },
  { key: 'towards', header: 'For' },
  { key: 'dedication', header: 'Dedication' },
  { key: 'sum', header: 'Sum £' },
  { key: 'giftAid', header: 'Gift Aid £' },
  { key: 'thanks', header: 'Thanks' },
  { key: 'unreadWords', header: 'Words to read' },
];

const toCells = (row: GiftRow): Record<string, string> => ({
  number: String(row.number),
  day: row.day,
  time: formatTime(new Date(row.receivedAt)),
  giver: row.giver,
  how: row.how,
  towards: row.towards,
  dedication: row.dedication === null ? '' : DEDICATION_WORDS[row.dedication],
  sum: formatPlain(row.sumPence),
  giftAid: formatPlain(row.giftAidPence),
  thanks: THANKS_WORDS[row.thanks],
  unreadWords: String(row.unreadWords),
});

/** Page by page, so that a long list never stands in memory whole. */
export async function* readGiftCells(
  db: Db,
  filter: GiftFilter,
  reader: Reader,
): AsyncGenerator<Record<string, string>> {
  let after = '';
  for (;;) {
    const rows = await listGiftRows(db, { ...filter, after }, reader, ROWS_AT_ONCE);
    for (const row of rows) yield toCells(row);
    if (rows.length < ROWS_AT_ONCE) return;
    after = String(rows.at(-1)?.number ?? '');
  }
}

/**
 * Cells that begin like a formula get a leading apostrophe; every cell is quoted, so that a comma, quote or
 * line break in a name stays inside it.
 */
export const createCsvStream = (): ReturnType<typeof stringify> =>
  stringify({
    header: true,
    columns: COLUMNS,
    bom: true,
    quoted: true,
    quoted_empty: true,
    escape_formulas: true,
    record_delimiter: 'windows',
  });
