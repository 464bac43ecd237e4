// Every check of the books can fail: each is shown a row that breaks its rule, with the guards taken off.
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { runChecks } from '#server/books/index.ts';
import { addInKindShare } from '#server/campaign/index.ts';
import type { Trx } from '#server/platform/db.ts';
import { daySchema } from '#shared/dates.ts';
import { pence } from '#shared/money.ts';
import { cloneDatabase, type TestDatabase } from '#tests/support/database.ts';
import { addGift, addWorld, type AddedGift, type World } from '#tests/giving/desk-rows.ts';
import { expectBooksToAgree } from '#tests/support/invariants.ts';

let database: TestDatabase;
let world: World;
let gift: AddedGift;
const at = new Date('2026-05-04T11:00:00Z');

beforeAll(async () => {
  database = await cloneDatabase();
  world = await addWorld(database.db);
  // The lantern costs £42,000, of which a firm meets £2,000.
  gift = await addGift(database.db, world, { part: 'lantern', sumPence: pence(4_000_000) });
  await database.db.transaction((trx) =>
    addInKindShare(trx, {
      partId: world.partIds.lantern,
      firm: 'Staithe Glass',
      amountPence: pence(200_000),
      agreedOn: daySchema.parse('2026-01-01'),
    }),
  );
});
afterAll(() => database.drop());

const GUARDED = ['books.entries', 'books.lines', 'gifts', 'gift_shares'];
class Undone extends Error {}

/** The faults that the checks find once `plant` has done its worst; all of it is undone. */
async function faultsAfter(plant: (trx: Trx) => Promise<unknown>): Promise<Map<string, string[]>> {
  const found = new Map<string, string[]>();
  const undo = database.owner.transaction(async (trx) => {
    for (const table of GUARDED) await trx.raw(`alter table ${table} disable trigger user`);
    await plant(trx);
    for (const { name, faults } of await runChecks(trx))
      if (faults.length > 0)
        found.set(
          name,
          faults.map((one) => one.id),
        );
    throw new Undone();
  });
  await expect(undo).rejects.toBeInstanceOf(Undone);
  return found;
}

const addLine = async (trx: Trx, entryId: string, account: string, amount: number): Promise<void> => {
  await trx('books.lines').insert({
    entry_id: entryId,
    account_code: account,
    fund_id: world.fundId,
    amount_pence: amount,
  });
};
async function addEntry(trx: Trx, source: string, sourceId: string): Promise<string> {
  const [entry] = await trx('books.entries')
    .insert({ day: '2026-05-04', recorded_at: at, source, source_id: sourceId, kind: 'received' })
    .returning<{ id: string }[]>('id');
  return z.uuid().parse(entry?.id);
}
const entryOf = async (trx: Trx): Promise<string> =>
  z.object({ id: z.uuid() }).parse(await trx('books.entries').where({ source_id: gift.id }).first('id')).id;
async function otherFund(trx: Trx): Promise<string> {
  const [fund] = await trx('funds')
    .insert({ slug: 'other', name: 'Other', restriction: 'unrestricted', purpose: 'p' })
    .returning<{ id: string }[]>('id');
  return z.uuid().parse(fund?.id);
}
/** Came so many minutes from now, by the database's own clock. */
const addEvent = async (trx: Trx, minutes: number, state = 'waiting'): Promise<void> => {
  await trx('payment_events').insert({
    id: `evt_${randomUUID()}`,
    type: 'charge.updated',
    object_kind: 'charge',
    object_id: 'ch_1',
    happened_at: at,
    received_at: trx.raw('now() + make_interval(mins => ?)', [minutes]),
    payload: '{}',
    state,
  });
};

type Plant = (trx: Trx) => Promise<unknown>;
const withoutIncome: Plant = async (trx) =>
  trx('books.lines')
    .where({ account_code: 'income:gifts:card' })
    .update({ account_code: 'suspense:unpegged' });
const withoutGift: Plant = async (trx) => {
  await trx('gift_shares').delete();
  await trx('gifts').delete();
};

/** One way to break the rule of each check. */
const WORST: Record<string, Plant> = {
  entries_balance: async (trx) => addLine(trx, await entryOf(trx), 'rounding', 1),
  entries_have_lines: (trx) => addEntry(trx, 'test', randomUUID()),
  trial_balance: async (trx) => addLine(trx, await addEntry(trx, 'test', randomUUID()), 'bank:current', 5),
  gifts_posted_once: async (trx) => {
    await trx('books.lines').delete();
    await trx('books.entries').delete();
  },
  entries_have_gifts: (trx) => addEntry(trx, 'gift', randomUUID()),
  gift_amounts: withoutIncome,
  gift_shares_sum: async (trx) => trx('gift_shares').where({ gift_id: gift.id }).delete(),
  shown_total: async (trx) => trx('gifts').where({ id: gift.id }).update({ amount_pence: 3_999_999 }),
  income_by_fund: async (trx) =>
    trx('gift_shares')
      .where({ gift_id: gift.id })
      .update({ fund_id: await otherFund(trx) }),
  fees_posted: async (trx) =>
    trx('gifts').where({ id: gift.id }).update({ fee_pence: 50, fee_posted_at: at }),
  paid_intents_have_gifts: withoutGift,
  // Less than the part costs, and a penny more than it needs.
  parts_not_overfilled: async (trx) =>
    trx('gift_shares').where({ gift_id: gift.id }).update({ amount_pence: 4_000_001 }),
  gifts_thanked: async (trx) => trx('mail_outbox').delete(),
  events_worked: (trx) => addEvent(trx, -61),
  rounding_is_nothing: async (trx) => addLine(trx, await entryOf(trx), 'rounding', 1),
  published_goal: async (trx) => trx('campaigns').update({ goal_pence: 1 }),
};

describe('the checks', () => {
  test('find nothing in books that are right, a part filled with help in kind included', () =>
    expectBooksToAgree(database.db));

  test('are all tried here', async () => {
    const names = (await runChecks(database.db)).map((one) => one.name);
    expect(Object.keys(WORST).sort()).toEqual(names);
  });

  test.each(Object.entries(WORST))('%s fails when its rule is broken', async (name, plant) => {
    expect([...(await faultsAfter(plant)).keys()]).toContain(name);
  });

  test('a gift without any line of income is found, though its entry balances', async () => {
    const found = await faultsAfter(withoutIncome);
    expect(found.get('gift_amounts')).toEqual([gift.id]);
    expect(found.has('entries_balance')).toBe(false);
  });

  test('a paid intent without a gift is named by its card page, never by its own id', async () => {
    expect((await faultsAfter(withoutGift)).get('paid_intents_have_gifts')).toEqual([gift.sessionId]);
  });

  test('events that came within the hour, are worked, or come of a clock set forward are left alone', async () => {
    const found = await faultsAfter(async (trx) => {
      await addEvent(trx, -59);
      await addEvent(trx, 300);
      await addEvent(trx, -300, 'worked');
    });
    expect(found.has('events_worked')).toBe(false);
  });
});
