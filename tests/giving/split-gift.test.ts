// A part that fills while a gift is on its way: the gift is split under a lock and both halves are told.
import { afterAll, beforeAll, expect, test } from 'vitest';
import { readOutcome, readStanding } from '#server/giving/index.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';
import {
  askToGive,
  control,
  APPEAL_VERSION,
  filledSheet,
  giveGift,
  setUpTown,
} from '#tests/support/factories.ts';
import { expectBooksToAgree } from '#tests/support/invariants.ts';

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
  await setUpTown(app);
});
afterAll(() => app.stop());

const sum = (pounds: number) => ({ amount: 'other' as const, other: String(pounds) });

test('two gifts that would together overfill a part are shared out, and no part takes more than it needs', async () => {
  const asked = await Promise.all(
    ['one', 'two', 'three'].map((who) =>
      askToGive(app, {
        ...sum(2_000),
        towards: 'right-forearm',
        email: `${who}@post.example`,
        name: `Giver ${who}`,
      }),
    ),
  );
  for (const one of asked) await control(app, `/sessions/${one.sessionId}/pay`);
  const outcomes = await Promise.all(asked.map((one) => readOutcome(app.deps, one.intentId)));
  expect(outcomes.every((one) => one.outcome === 'paid')).toBe(true);
  const meant = outcomes.flatMap((one) =>
    one.shares.filter((share) => share.isMeant).map((share) => share.amountPence),
  );
  expect(meant.reduce((a, b) => a + b, 0)).toBe(410_000);
  const split = outcomes.filter((one) => one.splitNote !== null);
  expect(split).toHaveLength(1);
  expect(split[0]?.shares.map((share) => share.amountPence)).toEqual([10_000, 190_000]);
  expect(split[0]?.splitNote).toContain('needed only £100 more');
  const letter = await app.deps.db('mail_outbox').where('plain', 'like', '%needed only £100 more%');
  expect(letter).toHaveLength(1);
  await expectBooksToAgree(app.deps.db);
});

test('a full part cannot be chosen, and the free half fills the next part in building order', async () => {
  await expect(askToGive(app, { ...sum(5), towards: 'right-forearm' })).rejects.toMatchObject({
    extra: { fields: { towards: expect.stringContaining('paid for now') } },
  });
  const { reach } = await readStanding(app.deps.db);
  expect(reach.parts[0]).toMatchObject({ slug: 'footing', givenPence: 190_000 });
});

test('a part filled by free money between checking and paying is refused with its reason, nothing lost', async () => {
  const agent = app.agent();
  await agent
    .put('/api/gifts/draft')
    .send({ ...filledSheet({ towards: 'footing' }) })
    .expect(200);
  await giveGift(app, { ...sum(4_500), email: 'quick@post.example' });
  const answer = await agent.post('/api/gifts/checkout').send({ appealVersion: APPEAL_VERSION }).expect(422);
  expect(answer.body).toMatchObject({ code: 'refused', reason: 'part-full' });
  const sheet = await agent.get('/api/gifts/sheet').expect(200);
  expect(sheet.body).toMatchObject({ answers: { name: 'Thea Quillan' } });
});
