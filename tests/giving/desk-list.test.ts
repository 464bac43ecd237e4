// The ledger list of gifts: filters, days of London with their sums, pages that never cut a sum, and order.
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { giftFilterSchema, type GiftFilterInput, type GiftList } from '#shared/giving/desk-schemas.ts';
import { pence } from '#shared/money.ts';
import { getGiftList, PAGE_ROWS } from '#server/giving/gift-list-reads.ts';
import { cloneDatabase, type TestDatabase } from '#tests/support/database.ts';
import { addGift, addWorld, type World } from './desk-rows.ts';

const TREASURER = { roles: ['treasurer'] as const };
let database: TestDatabase;
let world: World;
const read = (filter: GiftFilterInput = {}): Promise<GiftList> =>
  getGiftList(database.db, giftFilterSchema.parse(filter), TREASURER);
const numbers = (list: GiftList): number[] => list.days.flatMap((day) => day.rows.map((row) => row.number));

beforeAll(async () => {
  database = await cloneDatabase();
  world = await addWorld(database.db);
});
afterAll(() => database.drop());
beforeEach(async () => {
  for (const table of ['mail_outbox', 'public_words', 'gift_shares', 'gifts', 'gift_intents'])
    await database.db(table).delete();
});

describe('days', () => {
  it('a gift at 11.30pm UTC in summer belongs to the next London day, in winter to its own', async () => {
    await addGift(database.db, world, { at: new Date('2026-06-10T22:59:00Z'), sumPence: pence(500) });
    await addGift(database.db, world, { at: new Date('2026-06-10T23:30:00Z'), sumPence: pence(2000) });
    await addGift(database.db, world, { at: new Date('2026-12-10T23:30:00Z'), sumPence: pence(6000) });
    const { days } = await read();
    expect(days.map(({ day, sums }) => [day, sums.count, sums.sumPence])).toEqual([
      ['2026-12-10', 1, 6000],
      ['2026-06-11', 1, 2000],
      ['2026-06-10', 1, 500],
    ]);
  });

  it('a day on which the clocks go back is one day, with both of its one o’clocks', async () => {
    await addGift(database.db, world, { at: new Date('2026-10-24T23:30:00Z') });
    await addGift(database.db, world, { at: new Date('2026-10-25T00:30:00Z') });
    await addGift(database.db, world, { at: new Date('2026-10-25T01:30:00Z') });
    await addGift(database.db, world, { at: new Date('2026-10-25T23:30:00Z') });
    const { days } = await read();
    expect(days).toHaveLength(1);
    expect(days[0]).toMatchObject({ day: '2026-10-25', sums: { count: 4 } });
  });

  it('Gift Aid counts only gifts whose declaration stands, to the penny gift by gift', async () => {
    await addGift(database.db, world, { isDeclared: true, sumPence: pence(1030) });
    await addGift(database.db, world, { isDeclared: true, sumPence: pence(1030) });
    await addGift(database.db, world, { sumPence: pence(9000) });
    const gone = await addGift(database.db, world, { isDeclared: true, sumPence: pence(4000) });
    await database
      .db('declarations')
      .where({ supporter_id: gone.supporterId })
      .update({ cancelled_at: new Date() });
    const list = await read();
    // 25p in the pound of £10.30 is £2.575, to the nearest penny £2.58 each.
    expect(list.total).toEqual({ count: 4, sumPence: 15_060, giftAidPence: 516 });
    expect(list.days[0]?.rows.map((row) => row.giftAidPence)).toEqual([0, 0, 258, 258]);
  });
});

describe('filter', () => {
  it('keeps to a part, to the whole figure, and to days with both ends in', async () => {
    const lantern = await addGift(database.db, world, {
      part: 'lantern',
      at: new Date('2026-05-03T12:00:00Z'),
    });
    const whole = await addGift(database.db, world, { at: new Date('2026-05-04T12:00:00Z') });
    const footing = await addGift(database.db, world, {
      part: 'footing',
      at: new Date('2026-05-05T12:00:00Z'),
    });
    expect(numbers(await read({ towards: 'lantern' }))).toEqual([lantern.number]);
    expect(numbers(await read({ towards: 'whole' }))).toEqual([whole.number]);
    expect(numbers(await read({ from: '2026-05-04', to: '2026-05-05' }))).toEqual([
      footing.number,
      whole.number,
    ]);
    expect((await read({ towards: 'lantern' })).total.count).toBe(1);
    expect(numbers(await read({ towards: 'no-such-part' }))).toEqual([]);
  });

  it('tells thanked from not yet thanked, and every way of waiting apart', async () => {
    const states = ['sent', 'queued', 'soft_failed', 'hard_failed', 'uncertain', 'suppressed', null] as const;
    const added = [];
    for (const thanks of states) added.push(await addGift(database.db, world, { thanks }));
    const rows = (await read({ sort: 'oldest' })).days.flatMap((day) => day.rows);
    expect(rows.map((row) => row.thanks)).toEqual([
      'thanked',
      'on-its-way',
      'trying-again',
      'failed',
      'uncertain',
      'held-back',
      'not-written',
    ]);
    expect(numbers(await read({ thanks: 'thanked' }))).toEqual([added[0]?.number]);
    expect((await read({ thanks: 'not-yet-thanked' })).total.count).toBe(6);
  });

  it('finds gifts with words nobody has read', async () => {
    await addGift(database.db, world);
    const waiting = await addGift(database.db, world, {
      words: [
        { kind: 'message', words: 'Well done' },
        { kind: 'wall-name', words: 'J' },
      ],
    });
    const list = await read({ words: 'unread' });
    expect(numbers(list)).toEqual([waiting.number]);
    expect(list.days[0]?.rows[0]?.unreadWords).toBe(2);
  });

  it('refuses a last day before the first, a sort of its own making and keys that are not asked for', () => {
    const faultsOf = (input: unknown) =>
      giftFilterSchema.safeParse(input).error?.issues.map((issue) => issue.path.join());
    expect(faultsOf({ from: '2026-05-05', to: '2026-05-04' })).toEqual(['to']);
    expect(faultsOf({ sort: 'name;drop table gifts' })).toEqual(['sort']);
    expect(faultsOf({ from: '2026-02-30' })).toEqual(['from']);
    expect(faultsOf({ after: '1 or 1=1' })).toEqual(['after']);
    expect(faultsOf({ name: 'x' })).toHaveLength(1);
    expect(faultsOf({ towards: ['a', 'b'] })).toEqual(['towards']);
  });
});

describe('pages', () => {
  it('follow each other without a gap or a repeat, and give every day its whole sum', async () => {
    const day = new Date('2026-05-04T08:00:00Z').getTime();
    // One day larger than a page, then another: the page cuts through the first.
    for (let index = 0; index < PAGE_ROWS + 8; index += 1)
      await addGift(database.db, world, {
        at: new Date(day + (index % 3) * 60_000),
        sumPence: pence(100 + index),
      });
    await addGift(database.db, world, { at: new Date('2026-05-03T08:00:00Z') });
    const first = await read();
    expect(numbers(first)).toHaveLength(PAGE_ROWS);
    expect(first.days[0]).toMatchObject({ isContinued: false, goesOn: true, sums: { count: PAGE_ROWS + 8 } });
    const second = await read({ after: first.nextAfter ?? '' });
    expect(
      second.days.map((one) => [one.day, one.isContinued, one.goesOn, one.sums.count, one.rows.length]),
    ).toEqual([
      ['2026-05-04', true, false, PAGE_ROWS + 8, 8],
      ['2026-05-03', false, false, 1, 1],
    ]);
    expect(second.nextAfter).toBeNull();
    expect(second.total).toEqual(first.total);
    const all = [...numbers(first), ...numbers(second)];
    expect(new Set(all).size).toBe(PAGE_ROWS + 9);
    for (const sort of ['oldest', 'largest'] as const) {
      const one = await read({ sort });
      const two = await read({ sort, after: one.nextAfter ?? '' });
      expect(new Set([...numbers(one), ...numbers(two)]).size).toBe(PAGE_ROWS + 9);
    }
    const largest = (await read({ sort: 'largest' })).days.flatMap((one) =>
      one.rows.map((row) => row.sumPence),
    );
    expect(largest).toEqual([...largest].sort((a, b) => b - a));
  });

  it('an empty list says whether the society has any gift at all', async () => {
    expect(await read({ thanks: 'thanked' })).toMatchObject({ days: [], hasAnyGift: false, nextAfter: null });
    await addGift(database.db, world, { thanks: null });
    expect(await read({ thanks: 'thanked' })).toMatchObject({ days: [], hasAnyGift: true });
  });
});
