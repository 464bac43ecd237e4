// The books guard themselves: tried as the application's own role on a real database.
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { addFund, postCardFee, postGiftReceived, runChecks } from '#server/books/index.ts';
import { findConstraint, type Db, type Trx } from '#server/platform/db.ts';
import { pence } from '#shared/money.ts';
import { cloneDatabase, type TestDatabase } from '#tests/support/database.ts';

let database: TestDatabase;
let db: Db;
let figure: string;
let general: string;
const at = new Date('2027-05-03T12:00:00Z');

beforeAll(async () => {
  database = await cloneDatabase();
  db = database.db;
  figure = (
    await db.transaction((trx) =>
      addFund(trx, { slug: 'figure', name: 'The figure', restriction: 'restricted', purpose: 'p' }),
    )
  ).id;
  general = (
    await db.transaction((trx) =>
      addFund(trx, { slug: 'general', name: 'General', restriction: 'unrestricted', purpose: 'p' }),
    )
  ).id;
});
afterAll(() => database.drop());

async function addEntry(trx: Trx, lines: readonly (readonly [string, string, number])[]): Promise<void> {
  const [entry] = await trx('books.entries')
    .insert({ day: '2027-05-03', recorded_at: at, source: 'test', source_id: randomUUID(), kind: 'received' })
    .returning<{ id: string }[]>('id');
  if (lines.length > 0)
    await trx('books.lines').insert(
      lines.map(([account_code, fund_id, amount_pence]) => ({
        entry_id: entry?.id,
        account_code,
        fund_id,
        amount_pence,
      })),
    );
}
const refusal = async (deed: (trx: Trx) => Promise<unknown>): Promise<unknown> => {
  const before = await countLines();
  const error: unknown = await db.transaction(deed).then(
    () => 'not refused',
    (fault: unknown) => fault,
  );
  expect(await countLines()).toBe(before);
  return error;
};
const countLines = async () =>
  Number((await db('books.lines').count<{ count: string }[]>({ count: '*' }).first())?.count);

describe('an entry is refused at commit', () => {
  test('when debit and credit differ', async () => {
    const error = await refusal((trx) =>
      addEntry(trx, [
        ['card:pending', figure, 100],
        ['income:gifts:card', figure, -99],
      ]),
    );
    expect(findConstraint(error)).toBe('entry_balances');
  });
  test('when it balances over all but not in each fund', async () => {
    const error = await refusal((trx) =>
      addEntry(trx, [
        ['card:pending', figure, 100],
        ['income:gifts:card', general, -100],
      ]),
    );
    expect(findConstraint(error)).toBe('entry_balances');
  });
  test('when it has no lines at all', async () => {
    expect(findConstraint(await refusal((trx) => addEntry(trx, [])))).toBe('entry_has_lines');
  });
  test('when a line holds nothing', async () => {
    const error = await refusal((trx) =>
      addEntry(trx, [
        ['card:pending', figure, 0],
        ['income:gifts:card', figure, 0],
      ]),
    );
    expect(findConstraint(error)).toBe('lines_amount_not_zero');
  });
});

describe('what is posted stays', () => {
  const words = async (sql: string, as: Db = db) =>
    String(
      await as.raw(sql).then(
        () => 'done',
        (error: unknown) => error,
      ),
    );
  test.each([
    ['update books.lines set amount_pence = 1', 'permission denied'],
    ['delete from books.entries', 'permission denied'],
    ['truncate books.lines', 'permission denied'],
    ['update audit.lines set action = 1::text', 'permission denied'],
    ['delete from audit.lines', 'permission denied'],
    ['truncate audit.lines', 'permission denied'],
    ["insert into books.accounts values ('a', 'a', 'asset')", 'permission denied'],
    ['drop table books.lines', 'must be owner'],
    ['alter table books.lines disable trigger all', 'must be owner'],
  ])('the application may not: %s', async (sql, fault) => {
    expect(await words(sql)).toContain(fault);
  });
  test.each([
    'update books.lines set amount_pence = 1',
    'delete from books.lines',
    'truncate books.entries cascade',
    'truncate audit.lines cascade',
  ])('nor may the owner by mistake: %s', async (sql) => {
    await db.transaction((trx) =>
      addEntry(trx, [
        ['card:pending', figure, 1],
        ['income:gifts:card', figure, -1],
      ]),
    );
    expect(await words(sql, database.owner)).toMatch(/never changed/);
  });
});

describe('a gift and its fee', () => {
  test('post once, whatever is repeated', async () => {
    const giftId = randomUUID();
    const shares = [{ fundId: figure, amountPence: pence(2_000) }];
    const post = () => db.transaction((trx) => postGiftReceived(trx, { giftId, at, recordedAt: at }, shares));
    expect([await post(), await post()]).toEqual([true, false]);
    const [one, other] = await Promise.all(
      [1, 2].map(() =>
        db.transaction((trx) =>
          postCardFee(
            trx,
            { giftId, at, recordedAt: at },
            { feePence: pence(50), shares, bornByFundId: null },
          ),
        ),
      ),
    );
    expect([one, other].filter(Boolean)).toHaveLength(1);
  });

  test('a fee over two funds is borne in proportion and loses no penny', async () => {
    const giftId = randomUUID();
    const shares = [
      { fundId: figure, amountPence: pence(333) },
      { fundId: general, amountPence: pence(667) },
    ];
    await db.transaction((trx) => postGiftReceived(trx, { giftId, at, recordedAt: at }, shares));
    await db.transaction((trx) =>
      postCardFee(trx, { giftId, at, recordedAt: at }, { feePence: pence(35), shares, bornByFundId: null }),
    );
    const lines = await db('books.lines as l')
      .join('books.entries as e', 'e.id', 'l.entry_id')
      .where({ 'e.source_id': giftId, 'e.kind': 'card-fee', 'l.account_code': 'expense:card-fees' })
      .orderBy('amount_pence')
      .pluck('amount_pence');
    expect(lines).toEqual(['12', '23']);
  });

  test('a setting lets one fund bear it', async () => {
    const giftId = randomUUID();
    const shares = [{ fundId: figure, amountPence: pence(1_000) }];
    await db.transaction((trx) => postGiftReceived(trx, { giftId, at, recordedAt: at }, shares));
    await db.transaction((trx) =>
      postCardFee(
        trx,
        { giftId, at, recordedAt: at },
        { feePence: pence(35), shares, bornByFundId: general },
      ),
    );
    const funds = await db('books.lines as l')
      .join('books.entries as e', 'e.id', 'l.entry_id')
      .where({ 'e.source_id': giftId, 'e.kind': 'card-fee' })
      .distinct('l.fund_id')
      .pluck('l.fund_id');
    expect(funds).toEqual([general]);
  });
});

test('every check can fail: an entry for no gift is found', async () => {
  await db.transaction((trx) =>
    postGiftReceived(trx, { giftId: randomUUID(), at, recordedAt: at }, [
      { fundId: figure, amountPence: pence(5) },
    ]),
  );
  const found = (await runChecks(db)).filter((one) => one.faults.length > 0).map((one) => one.name);
  expect(found).toContain('entries_have_gifts');
  expect(found).toContain('shown_total');
});
