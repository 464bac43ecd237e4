// Where the wording makes each part a fund of its own: the gift, its split and its fee keep to their funds.
import { afterAll, beforeAll, expect, test } from 'vitest';
import { addFund } from '#server/books/index.ts';
import { addAppealWording, publishCampaign } from '#server/campaign/index.ts';
import { givingTasks } from '#server/giving/index.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';
import { control, giveGift, setUpTown } from '#tests/support/factories.ts';
import { expectBooksToAgree } from '#tests/support/invariants.ts';

let app: TestApp;
let campaignId: string;
beforeAll(async () => {
  app = await startTestApp();
  ({ campaignId } = await setUpTown(app));
  const wording = { version: 3, purpose: 'p', onShortfall: 's', onSurplus: 's', partChoice: 'fund' as const };
  await app.deps.db.transaction((trx) => addAppealWording(trx, campaignId, wording, new Date(0)));
});
afterAll(() => app.stop());
const deed = { actor: { kind: 'system' as const }, at: new Date() };

test('a wording that makes funds is not published while a part has none', async () => {
  await expect(
    app.deps.db.transaction((trx) => publishCampaign(trx, campaignId, deed)),
  ).rejects.toMatchObject({
    extra: { reason: 'part-without-fund' },
  });
});

test('a split gift is two funds in one entry, and the fee is borne by both', async () => {
  const { db } = app.deps;
  const arm = await db.transaction((trx) =>
    addFund(trx, { slug: 'arm', name: 'Forearm', restriction: 'restricted', purpose: 'p' }),
  );
  await db('parts').update({ fund_id: arm.id });
  await db.transaction((trx) => publishCampaign(trx, campaignId, deed));
  const { giftId } = await giveGift(app, { amount: 'other', other: '4200', towards: 'right-forearm' }, 3);
  await control(app, '/fees/settle');
  await givingTasks(app.deps)['poll-payments']();
  const lines = await db('books.lines as l')
    .join('books.entries as e', 'e.id', 'l.entry_id')
    .join('funds as f', 'f.id', 'l.fund_id')
    .where({ 'e.source_id': giftId })
    .orderBy(['e.kind', 'f.slug', 'l.amount_pence'])
    .select('e.kind', 'f.slug', 'l.amount_pence');
  expect(lines).toEqual([
    { kind: 'card-fee', slug: 'arm', amount_pence: '-6170' },
    { kind: 'card-fee', slug: 'arm', amount_pence: '6170' },
    { kind: 'card-fee', slug: 'the-figure', amount_pence: '-150' },
    { kind: 'card-fee', slug: 'the-figure', amount_pence: '150' },
    { kind: 'received', slug: 'arm', amount_pence: '-410000' },
    { kind: 'received', slug: 'arm', amount_pence: '410000' },
    { kind: 'received', slug: 'the-figure', amount_pence: '-10000' },
    { kind: 'received', slug: 'the-figure', amount_pence: '10000' },
  ]);
  await expectBooksToAgree(db);
});
