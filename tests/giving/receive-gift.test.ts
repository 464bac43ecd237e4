// From the card page to the books: each payment one gift, whoever tells of it first and however often.
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { accountBalance } from '#server/books/index.ts';
import { givingTasks, readOutcome, readStanding } from '#server/giving/index.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';
import { askToGive, control, giveGift, setUpTown, withDeclaration } from '#tests/support/factories.ts';
import { expectBooksToAgree } from '#tests/support/invariants.ts';

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
  await setUpTown(app);
});
afterAll(() => app.stop());
beforeEach(() => control(app, '/webhooks/mode', { dropNext: 0, doubleNext: 0, delayMs: 0, paused: false }));

const giftsOf = (intentId: string) => app.deps.db('gifts').where({ intent_id: intentId });
const work = async () => {
  await control(app, '/webhooks/flush');
  await givingTasks(app.deps)['work-payment-events']();
};

describe('a paid session becomes one gift', () => {
  test('with entry, shares, thanks and audit line in one go', async () => {
    const before = (await readStanding(app.deps.db)).givenPence;
    const { giftId } = await giveGift(app, withDeclaration);
    const { db } = app.deps;
    expect(await db('mail_outbox').where({ subject_id: giftId, kind: 'gift-thanks' })).toHaveLength(1);
    expect(await db('audit.lines').where({ object_id: giftId, action: 'gift-received' })).toHaveLength(1);
    expect(
      await db('declarations')
        .join('gifts', 'gifts.declaration_id', 'declarations.id')
        .where('gifts.id', giftId),
    ).toHaveLength(1);
    expect((await readStanding(db)).givenPence - before).toBe(2_000);
    await expectBooksToAgree(db);
  });

  test('when page, webhook and poller all come, at once and again', async () => {
    await control(app, '/webhooks/mode', { doubleNext: 3 });
    const asked = await askToGive(app, { email: 'all.at.once@post.example' });
    await control(app, `/sessions/${asked.sessionId}/pay`);
    await control(app, '/webhooks/flush');
    const tasks = givingTasks(app.deps);
    await Promise.all([
      readOutcome(app.deps, asked.intentId),
      readOutcome(app.deps, asked.intentId),
      tasks['work-payment-events'](),
      tasks['work-payment-events'](),
      tasks['poll-payments'](),
    ]);
    await readOutcome(app.deps, asked.intentId);
    expect(await giftsOf(asked.intentId)).toHaveLength(1);
    await expectBooksToAgree(app.deps.db);
  });

  test('when only the webhook tells', async () => {
    const asked = await askToGive(app);
    await control(app, `/sessions/${asked.sessionId}/pay`);
    await work();
    expect(await giftsOf(asked.intentId)).toHaveLength(1);
  });

  test('when no webhook ever tells: the poller finds it', async () => {
    await control(app, '/webhooks/mode', { dropNext: 'all' });
    const asked = await askToGive(app);
    await control(app, `/sessions/${asked.sessionId}/pay`);
    app.clock.moveTo(new Date(Date.now() + 5 * 60_000));
    await givingTasks(app.deps)['poll-payments']();
    app.clock.moveTo(new Date());
    expect(await giftsOf(asked.intentId)).toHaveLength(1);
  });

  test('when the answer of the session call was lost: found by its reference', async () => {
    const asked = await askToGive(app);
    await app.deps
      .db('gift_intents')
      .where({ id: asked.intentId })
      .update({ session_id: null, session_url: null, state: 'started' });
    await control(app, '/webhooks/mode', { dropNext: 'all' });
    await control(app, `/sessions/${asked.sessionId}/pay`);
    app.clock.moveTo(new Date(Date.now() + 5 * 60_000));
    await givingTasks(app.deps)['poll-payments']();
    app.clock.moveTo(new Date());
    expect(await giftsOf(asked.intentId)).toHaveLength(1);
  });
});

describe('the card fee', () => {
  test('comes later, is posted once, and the card account agrees with the service to the penny', async () => {
    const { giftId } = await giveGift(app, { email: 'with.a.fee@post.example' });
    await control(app, '/fees/settle');
    await work();
    await Promise.all([givingTasks(app.deps)['poll-payments'](), givingTasks(app.deps)['poll-payments']()]);
    expect(await app.deps.db('gifts').where({ id: giftId }).first('fee_pence')).toEqual({ fee_pence: '50' });
    const balance = await app.deps.payments.balance.retrieve();
    const held = [...balance.pending, ...balance.available].reduce((sum, one) => sum + one.amount, 0);
    expect(await accountBalance(app.deps.db, 'card:pending')).toBe(held);
    await expectBooksToAgree(app.deps.db);
  });
});

describe('what is not paid makes no gift', () => {
  test('a declined card leaves the session open and nothing lost', async () => {
    const asked = await askToGive(app);
    await control(app, `/sessions/${asked.sessionId}/pay`, { card: '4000000000000002' });
    await work();
    expect(await giftsOf(asked.intentId)).toHaveLength(0);
    expect((await readOutcome(app.deps, asked.intentId)).outcome).toBe('not-paid');
    await control(app, `/sessions/${asked.sessionId}/pay`);
    expect((await readOutcome(app.deps, asked.intentId)).outcome).toBe('paid');
  });

  test('a slow payment is being confirmed, then paid', async () => {
    const asked = await askToGive(app);
    await control(app, `/sessions/${asked.sessionId}/pay`, { card: '4000009900000012' });
    expect((await readOutcome(app.deps, asked.intentId)).outcome).toBe('confirming');
    expect(await giftsOf(asked.intentId)).toHaveLength(0);
    await control(app, '/async/confirm');
    await work();
    expect(await giftsOf(asked.intentId)).toHaveLength(1);
  });

  test('a sum that is not the one asked for is marked for a person', async () => {
    const asked = await askToGive(app);
    await app.deps.db('gift_intents').where({ id: asked.intentId }).update({ amount_pence: 9_900 });
    await control(app, `/sessions/${asked.sessionId}/pay`);
    await work();
    expect(await giftsOf(asked.intentId)).toHaveLength(0);
    expect(await app.deps.db('gift_intents').where({ id: asked.intentId }).first('state')).toEqual({
      state: 'mismatched',
    });
  });
});
