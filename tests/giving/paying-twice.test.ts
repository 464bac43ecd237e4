// Nobody pays twice for one sheet, and nobody is told that nothing was taken when that is not known.
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { givingTasks, readOutcome } from '#server/giving/index.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';
import { APPEAL_VERSION, askToGive, control, filledSheet, setUpTown } from '#tests/support/factories.ts';
import { expectBooksToAgree } from '#tests/support/invariants.ts';

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
  await setUpTown(app);
});
afterAll(() => app.stop());
beforeEach(() => control(app, '/requests/mode', { latencyMs: 0, cutNext: 0, failNext: 0 }));

type Agent = ReturnType<TestApp['agent']>;
const fill = (agent: Agent, changes = {}) =>
  agent.put('/api/gifts/draft').send(filledSheet(changes)).expect(200);
const press = (agent: Agent) => agent.post('/api/gifts/checkout').send({ appealVersion: APPEAL_VERSION });
const sessionOf = (url: unknown) => /(cs_[A-Za-z0-9_]+)/.exec(String(url))?.[1] ?? '';
const pay = (sessionId: string, body: object = {}) => control(app, `/sessions/${sessionId}/pay`, body);

describe('a second card page of the same sheet', () => {
  test('closes the first one, which can then no longer be paid', async () => {
    const agent = app.agent();
    await fill(agent, { email: 'changed.mind@post.example' });
    const first = sessionOf((await press(agent).expect(200)).body.url);
    await fill(agent, { email: 'changed.mind@post.example', amount: '60' });
    const second = sessionOf((await press(agent).expect(200)).body.url);
    expect(second).not.toBe(first);
    await expect(pay(first)).rejects.toThrow(/409/);
    await pay(second);
  });

  test('is refused when the first was paid meanwhile and nobody told us yet', async () => {
    await control(app, '/webhooks/mode', { dropNext: 'all' });
    const agent = app.agent();
    await fill(agent, { email: 'other.tab@post.example' });
    const first = sessionOf((await press(agent).expect(200)).body.url);
    await pay(first);
    await fill(agent, { email: 'other.tab@post.example', amount: '60' });
    const refused = await press(agent).expect(409);
    expect(refused.body.reason).toBe('already-paid');
    expect(await app.deps.db('gifts').where({ session_id: first })).toHaveLength(1);
    // What was written for the second gift is still there.
    expect((await agent.get('/api/gifts/check').expect(200)).body.sumPence).toBe(6_000);
    await control(app, '/webhooks/mode', { dropNext: 0 });
  });

  test('is refused while the bank has not confirmed the first, and the check page says so', async () => {
    await control(app, '/async/delay', { delayMs: 600_000 });
    const agent = app.agent();
    await fill(agent, { email: 'slow.bank@post.example' });
    await pay(sessionOf((await press(agent).expect(200)).body.url), { card: '4000009900000012' });
    const refused = await press(agent).expect(409);
    expect(refused.body.reason).toBe('still-confirming');
    const { body } = await agent.get('/api/gifts/check').expect(200);
    expect(body.saidBack[0]).toContain('Please do not pay a second time');
    await control(app, '/async/confirm');
  });
});

describe('the return page', () => {
  test('does not say that nothing was taken when the card service could not be asked', async () => {
    const asked = await askToGive(app, { email: 'unlucky@post.example' });
    await pay(asked.sessionId);
    // The SDK tries three times.
    await control(app, '/requests/mode', { failNext: 3 });
    expect((await readOutcome(app.deps, asked.intentId)).outcome).toBe('confirming');
    expect((await readOutcome(app.deps, asked.intentId)).outcome).toBe('paid');
  });

  test('says not paid when a slow payment failed in the end, and trying again is a new session', async () => {
    const agent = app.agent();
    await fill(agent, { email: 'failed.slowly@post.example' });
    const first = sessionOf((await press(agent).expect(200)).body.url);
    await pay(first, { card: '4000009900000012' });
    await control(app, '/async/fail');
    await control(app, '/webhooks/flush');
    await givingTasks(app.deps)['work-payment-events']();
    const intent = await app.deps
      .db('gift_intents')
      .where({ session_id: first })
      .first<{ id: string; state: string }>('id', 'state');
    expect(intent.state).toBe('failed');
    expect((await readOutcome(app.deps, intent.id)).outcome).toBe('not-paid');
    await pay(sessionOf((await press(agent).expect(200)).body.url));
    await expectBooksToAgree(app.deps.db);
  });
});

test('a late word never turns a paid intent into something else', async () => {
  const asked = await askToGive(app, { email: 'late.word@post.example' });
  await pay(asked.sessionId);
  await readOutcome(app.deps, asked.intentId);
  await app.deps.db.transaction(async (trx) => {
    const { markIntent } = await import('#server/giving/intent-store.ts');
    await markIntent(trx, asked.intentId, 'failed', 'late');
  });
  expect(await app.deps.db('gift_intents').where({ id: asked.intentId }).first('state')).toEqual({
    state: 'paid',
  });
});

test('a sheet whose words changed since it was opened is asked to be read again', async () => {
  const agent = app.agent();
  const answer = await agent
    .put('/api/gifts/draft')
    .send(filledSheet({ byEmail: 'on', shownWordings: '0.9' }))
    .expect(400);
  expect(answer.body.fields.declare).toContain('have changed since this page was opened');
});

test('a token that we never gave is not taken up', async () => {
  const planted = 'A'.repeat(43);
  const answer = await app
    .agent()
    .put('/api/gifts/draft')
    .set('Cookie', `treenail-gift=${planted}`)
    .send(filledSheet())
    .expect(200);
  expect(answer.headers['set-cookie']?.[0]).not.toContain(planted);
});
