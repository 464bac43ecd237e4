// The ledger list of gifts: a page of rows by London day, and the sums of whole days and of the whole filter.
import { z } from 'zod';
import { daySchema, type Day } from '#shared/dates.ts';
import { giftAidOn } from '#shared/declarations/gift-aid-rules.ts';
import {
  thanksStateSchema,
  type GiftFilter,
  type GiftList,
  type GiftRow,
  type GiftSums,
} from '#shared/giving/desk-schemas.ts';
import { add, applyRate, NOTHING } from '#shared/money.ts';
import { queryRows, toCount, toPence, type Db } from '#server/platform/db.ts';
import {
  afterClause,
  filterClause,
  GIFT_TABLES,
  IS_DECLARED_SQL,
  orderClause,
  THANKS_SQL,
} from './gift-list-sql.ts';
import { listGiftHistory } from './gift-history-reads.ts';
import { nameOrWithheld, unlessWithheld, WITHHELD_SQL, type Reader } from './withheld-names.ts';

export const PAGE_ROWS = 100;
const HISTORY_LINES = 6;
const WHOLE_NAME = 'the whole figure';

const rowSchema = z.object({
  number: z.int(),
  received_at: z.date(),
  received_on: daySchema,
  amount_pence: z.unknown().transform(toPence),
  method: z.enum(['card']),
  part_name: z.string().nullable(),
  giver: z.string().nullable(),
  is_withheld: z.boolean(),
  is_declared: z.boolean(),
  thanks: thanksStateSchema,
  dedication: z.enum(['memory', 'honour']).nullable(),
  unread_words: z.unknown().transform(toCount),
});

const toGiftRow = (row: z.output<typeof rowSchema>): GiftRow => ({
  number: row.number,
  receivedAt: row.received_at.toISOString(),
  day: row.received_on,
  giver: nameOrWithheld(row.giver),
  isWithheld: row.is_withheld,
  how: row.method,
  towards: row.part_name ?? WHOLE_NAME,
  dedication: row.dedication,
  sumPence: row.amount_pence,
  giftAidPence: row.is_declared ? giftAidOn(row.amount_pence, row.received_on) : NOTHING,
  thanks: row.thanks,
  unreadWords: row.unread_words,
});

/** At most `limit` gifts of the filter, after its cursor. */
export async function listGiftRows(
  db: Db,
  filter: GiftFilter,
  reader: Reader,
  limit: number,
): Promise<GiftRow[]> {
  const where = filterClause(filter);
  const after = afterClause(filter.sort, filter.after);
  const rows = await queryRows(
    db,
    rowSchema,
    `select g.number, g.received_at, g.received_on, g.amount_pence, g.method, p.name as part_name,
       ${unlessWithheld(reader, 's.name')} as giver, ${WITHHELD_SQL} as is_withheld,
       ${IS_DECLARED_SQL} as is_declared, ${THANKS_SQL} as thanks,
       (select w.kind from public_words w where w.gift_id = g.id and w.kind in ('memory', 'honour') limit 1) as dedication,
       (select count(*) from public_words w where w.gift_id = g.id and w.read_at is null) as unread_words
     ${GIFT_TABLES}
     where true ${where.sql} ${after.sql}
     ${orderClause(filter.sort)}
     limit ?`,
    [...where.bindings, ...after.bindings, limit],
  );
  return rows.map(toGiftRow);
}

const heapSchema = z.object({
  received_on: daySchema,
  amount_pence: z.unknown().transform(toPence),
  is_declared: z.boolean(),
  count: z.unknown().transform(toCount),
});

const NO_SUMS: GiftSums = { count: 0, sumPence: NOTHING, giftAidPence: NOTHING };
const addSums = (one: GiftSums, other: GiftSums): GiftSums => ({
  count: one.count + other.count,
  sumPence: add(one.sumPence, other.sumPence),
  giftAidPence: add(one.giftAidPence, other.giftAidPence),
});

/** Sums of every day under the filter. Like sums of a day come in one heap, so that Gift Aid has its one rule. */
export async function sumGiftsByDay(db: Db, filter: GiftFilter): Promise<Map<Day, GiftSums>> {
  const where = filterClause(filter);
  const heaps = await queryRows(
    db,
    heapSchema,
    `select g.received_on, g.amount_pence, ${IS_DECLARED_SQL} as is_declared, count(*) as count
     ${GIFT_TABLES} where true ${where.sql} group by 1, 2, 3`,
    where.bindings,
  );
  const days = new Map<Day, GiftSums>();
  for (const heap of heaps) {
    const each = heap.is_declared ? giftAidOn(heap.amount_pence, heap.received_on) : NOTHING;
    const sums = {
      count: heap.count,
      sumPence: applyRate(heap.amount_pence, { per: heap.count, of: 1 }),
      giftAidPence: applyRate(each, { per: heap.count, of: 1 }),
    };
    days.set(heap.received_on, addSums(days.get(heap.received_on) ?? NO_SUMS, sums));
  }
  return days;
}

/** Rows in their order, cut where the day changes. */
function groupByDay(rows: readonly GiftRow[]): GiftRow[][] {
  const groups: GiftRow[][] = [];
  for (const row of rows) {
    const last = groups.at(-1);
    if (last?.[0]?.day === row.day) last.push(row);
    else groups.push([row]);
  }
  return groups;
}

const optionSchema = z.object({ slug: z.string(), name: z.string() });

export async function getGiftList(db: Db, filter: GiftFilter, reader: Reader): Promise<GiftList> {
  const [found, byDay, parts, some, history] = await Promise.all([
    listGiftRows(db, filter, reader, PAGE_ROWS + 1),
    sumGiftsByDay(db, filter),
    queryRows(db, optionSchema, 'select slug, name from parts order by building_order'),
    queryRows(db, z.object({ has_gift: z.boolean() }), 'select exists (select 1 from gifts) as has_gift'),
    listGiftHistory(db, new Date(0), HISTORY_LINES),
  ]);
  const rows = found.slice(0, PAGE_ROWS);
  const next = found[PAGE_ROWS];
  const [before] = filter.after === '' ? [] : await findDayOf(db, filter.after);
  const total = [...byDay.values()].reduce(addSums, NO_SUMS);
  const inOrderOfDays = filter.sort !== 'largest';
  return {
    days: (inOrderOfDays ? groupByDay(rows) : rows.length > 0 ? [rows] : []).map((group) => {
      const day = inOrderOfDays ? (group[0]?.day ?? null) : null;
      return {
        day,
        rows: group,
        sums: day === null ? total : (byDay.get(day) ?? NO_SUMS),
        isContinued: day === null ? filter.after !== '' : before?.received_on === day,
        goesOn: day === null ? next !== undefined : next?.day === day,
      };
    }),
    total,
    hasAnyGift: some[0]?.has_gift ?? false,
    nextAfter: next ? String(rows.at(-1)?.number ?? '') : null,
    parts,
    history,
  };
}

const findDayOf = (db: Db, number: string): Promise<{ received_on: Day }[]> =>
  queryRows(db, z.object({ received_on: daySchema }), 'select received_on from gifts where number = ?', [
    Number(number),
  ]);
