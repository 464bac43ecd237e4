// The gifts' list as CSV for a spreadsheet: the same filter, every gift of it, and no cell that a sheet would run.
import { stringify } from 'csv-stringify';
import { z } from 'zod';
import { TIME_ZONE } from '#shared/dates.ts';
import type { GiftFilter, GiftRow } from '#shared/giving/desk-schemas.ts';
import { DEDICATION_WORDS, THANKS_WORDS } from '#shared/giving/desk-words.ts';
import { formatPlain } from '#shared/money.ts';
import { queryRows, type Db } from '#server/platform/db.ts';
import { listGiftRows } from './gift-list-reads.ts';
import { WITHHELD_SQL, type Reader } from './withheld-names.ts';

const ROWS_AT_ONCE = 500;

const COLUMNS = [
  { key: 'number', header: 'No.' },
  { key: 'day', header: 'Day' },
  { key: 'time', header: 'Time' },
  { key: 'giver', header: 'From whom' },
  { key: 'nameShown', header: 'Name shown' },
  { key: 'how', header: 'How' },
  { key: 'towards', header: 'For' },
  { key: 'dedication', header: 'Dedication' },
  { key: 'sum', header: 'Sum £' },
  { key: 'giftAid', header: 'Gift Aid £' },
  { key: 'thanks', header: 'Thanks' },
  { key: 'unreadWords', header: 'Words to read' },
];

const NAME_SHOWN = {
  wall: 'on the wall',
  'not-public': 'not public',
  'treasurer-only': 'treasurer only',
} as const;
const nameShownSchema = z.object({
  number: z.int(),
  name_shown: z.enum(['wall', 'not-public', 'treasurer-only']),
});

/** Where each giver let the name be shown, so that a hidden name carries its mark into every sheet. */
async function listNamesShown(db: Db, numbers: readonly number[]): Promise<Map<number, string>> {
  const rows = await queryRows(
    db,
    nameShownSchema,
    `select g.number, case when ${WITHHELD_SQL} then 'treasurer-only' else g.name_shown end as name_shown
     from gifts g join supporters s on s.id = g.supporter_id where g.number = any(?)`,
    [[...numbers]],
  );
  return new Map(rows.map((row) => [row.number, NAME_SHOWN[row.name_shown]]));
}

/** 09:30: as a spreadsheet sorts it, unlike the times that people read on the desk. */
const sheetTime = new Intl.DateTimeFormat('en-GB', {
  timeZone: TIME_ZONE,
  hour: '2-digit',
  minute: '2-digit',
  hourCycle: 'h23',
});

const toCells = (row: GiftRow, nameShown: string): Record<string, string> => ({
  number: String(row.number),
  day: row.day,
  time: sheetTime.format(new Date(row.receivedAt)),
  giver: row.giver,
  nameShown,
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
    const shown = await listNamesShown(
      db,
      rows.map((row) => row.number),
    );
    for (const row of rows) yield toCells(row, shown.get(row.number) ?? NAME_SHOWN['treasurer-only']);
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
