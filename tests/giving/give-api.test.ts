// The giver's endpoints from outside: drafts, checks, checkout, receipts, and what is never cached.
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { SETTING_KEYS, setSetting } from '#server/society/index.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';
import {
  APPEAL_VERSION,
  control,
  filledSheet,
  setUpTown,
  withDeclaration,
} from '#tests/support/factories.ts';

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
  await setUpTown(app);
});
afterAll(() => app.stop());

describe('the draft', () => {
  test('keeps what was typed, right or wrong, and names every wrong field', async () => {
    const agent = app.agent();
    const wrong = filledSheet({
      email: 'thea.post.example',
      declare: 'on',
      postcode: 'nonsense',
      amount: 'other',
      other: '25,00',
    });
    const answer = await agent
      .put('/api/gifts/draft')
      .send(wrong)
      .expect(400)
      .expect('Content-Type', /problem\+json/);
    expect(Object.keys(answer.body.fields).sort()).toEqual([
      'address1',
      'email',
      'other',
      'postcode',
      'town',
    ]);
    expect(answer.body.fields.other).toContain('£25 or £2,500');
    const sheet = await agent.get('/api/gifts/sheet').expect(200).expect('Cache-Control', 'no-store');
    expect(sheet.body.answers).toMatchObject({
      email: 'thea.post.example',
      postcode: 'nonsense',
      other: '25,00',
    });
  });

  test('lies under an unguessable cookie that scripts cannot read', async () => {
    const answer = await app.agent().put('/api/gifts/draft').send(filledSheet()).expect(200);
    expect(answer.headers['set-cookie']?.[0]).toMatch(/^treenail-gift=[\w-]{43}; .*HttpOnly; SameSite=Lax$/);
    const kept = await app.deps.db('give_drafts').pluck<string[]>('token_hash');
    expect(kept.every((hash) => /^[0-9a-f]{64}$/.test(hash))).toBe(true);
  });

  test('of somebody else is not shown', async () => {
    const other = await app.agent().get('/api/gifts/sheet').expect(200);
    expect(other.body.answers.name ?? '').toBe('');
    await app.agent().get('/api/gifts/check').expect(409);
  });

  test('a quiet save complains of nothing and asks for nothing', async () => {
    const agent = app.agent();
    await agent.put('/api/gifts/draft?quiet=1').send({ name: 'Half a na' }).expect(200);
    const sheet = await agent.get('/api/gifts/sheet');
    expect(sheet.body.answers.name).toBe('Half a na');
  });

  test.each([
    ['text/plain', 415],
    ['application/x-www-form-urlencoded', 415],
  ])('%s is refused', async (type, status) => {
    await app.agent().put('/api/gifts/draft').set('Content-Type', type).send('name=x').expect(status);
  });

  test('another site cannot write it', async () => {
    await app
      .agent()
      .put('/api/gifts/draft')
      .set('Sec-Fetch-Site', 'cross-site')
      .send(filledSheet())
      .expect(403);
    await app
      .agent()
      .put('/api/gifts/draft')
      .set('Origin', 'https://elsewhere.example')
      .send(filledSheet())
      .expect(403);
  });
});

describe('the check', () => {
  test('says a large sum back in words, and what Gift Aid adds', async () => {
    const agent = app.agent();
    await agent
      .put('/api/gifts/draft')
      .send(filledSheet({ ...withDeclaration, amount: 'other', other: '£1,500' }))
      .expect(200);
    const { body } = await agent.get('/api/gifts/check').expect(200);
    expect(body).toMatchObject({ sumPence: 150_000, giftAidPence: 37_500, isDeclared: true });
    expect(body.saidBack[0]).toContain('one thousand five hundred pounds');
  });

  test('refuses less than the society’s least gift', async () => {
    await app.deps.db.transaction((trx) => setSetting(trx, SETTING_KEYS.leastGift, '2020-01-01', 500));
    const answer = await app
      .agent()
      .put('/api/gifts/draft')
      .send(filledSheet({ amount: 'other', other: '0.99' }))
      .expect(400);
    expect(answer.body.fields.other).toContain('The least');
  });
});

describe('checkout', () => {
  test('pressed twice is one session; changed answers are another', async () => {
    const agent = app.agent();
    await agent.put('/api/gifts/draft').send(filledSheet()).expect(200);
    const [one, two] = await Promise.all([
      agent.post('/api/gifts/checkout').send({ appealVersion: APPEAL_VERSION }),
      agent.post('/api/gifts/checkout').send({ appealVersion: APPEAL_VERSION }),
    ]);
    expect(one?.body.url).toBe(two?.body.url);
    await agent
      .put('/api/gifts/draft')
      .send(filledSheet({ amount: '60' }))
      .expect(200);
    const three = await agent.post('/api/gifts/checkout').send({ appealVersion: APPEAL_VERSION }).expect(200);
    expect(three.body.url).not.toBe(one?.body.url);
  });

  test('under another wording than the one that was shown is a conflict: look once more', async () => {
    const agent = app.agent();
    await agent.put('/api/gifts/draft').send(filledSheet()).expect(200);
    const { body } = await agent.post('/api/gifts/checkout').send({ appealVersion: 1 }).expect(409);
    expect(body.reason).toBe('wording-changed');
  });

  test('without a draft is a conflict, with unknown fields invalid', async () => {
    await app.agent().post('/api/gifts/checkout').send({ appealVersion: APPEAL_VERSION }).expect(409);
    await app.agent().post('/api/gifts/checkout').send({ amountPence: 1 }).expect(400);
  });
});

describe('after the gift', () => {
  test('the sheet is blank again, and the receipt is a page and a file for the giver alone', async () => {
    const agent = app.agent();
    const words = { dedication: 'memory', dedicationName: 'Walter Quillan' } as const;
    await agent
      .put('/api/gifts/draft')
      .send(filledSheet({ ...withDeclaration, ...words, name: 'Zoë Łukasik' }))
      .expect(200);
    const { body: page } = await agent
      .post('/api/gifts/checkout')
      .send({ appealVersion: APPEAL_VERSION })
      .expect(200);
    const sessionId = /(cs_[A-Za-z0-9_]+)/.exec(String(page.url))?.[1] ?? '';
    await control(app, `/sessions/${sessionId}/pay`);
    const { id } = await app.deps
      .db('gift_intents')
      .where({ session_id: sessionId })
      .first<{ id: string }>('id');
    const outcome = await agent.get(`/api/gifts/${id}/outcome`).expect(200);
    expect(outcome.body).toMatchObject({
      outcome: 'paid',
      sumPence: 2_000,
      giftAidPence: 500,
      inMemory: true,
    });
    const token = String(outcome.body.receiptPath).split('/').at(-1);
    const receipt = await agent.get(`/api/receipts/${token}`).expect(200).expect('Cache-Control', 'no-store');
    expect(receipt.body).toMatchObject({
      name: 'Zoë Łukasik',
      dedication: { kind: 'memory', name: 'Walter Quillan' },
    });
    expect(receipt.body.declaration.wording).toContain('I must pay the difference myself');
    const file = await agent
      .get(`/receipts/${token}.pdf`)
      .expect(200)
      .expect('Content-Type', 'application/pdf');
    expect(file.body.subarray(0, 5).toString()).toBe('%PDF-');
    expect((await agent.get('/api/gifts/sheet').expect(200)).body.answers.name ?? '').toBe('');
    const stranger = await app.agent().get(`/api/gifts/${id}/outcome`).expect(200);
    expect(stranger.body).toMatchObject({ outcome: 'paid', email: null, receiptPath: null, inMemory: false });
  });

  test('given again from the same browser within the hour, it is said back', async () => {
    const agent = app.agent();
    await agent.put('/api/gifts/draft').send(filledSheet()).expect(200);
    const { body } = await agent
      .post('/api/gifts/checkout')
      .send({ appealVersion: APPEAL_VERSION })
      .expect(200);
    await control(app, `/sessions/${/(cs_[A-Za-z0-9_]+)/.exec(String(body.url))?.[1]}/pay`);
    const { id } = await app.deps
      .db('gift_intents')
      .orderBy('created_at', 'desc')
      .first<{ id: string }>('id');
    await agent.get(`/api/gifts/${id}/outcome`).expect(200);
    await agent.put('/api/gifts/draft').send(filledSheet()).expect(200);
    const check = await agent.get('/api/gifts/check').expect(200);
    expect(check.body.saidBack[0]).toContain('makes a second gift');
  });

  test.each([
    '/api/gifts/not-an-id/outcome',
    '/api/gifts/00000000-0000-4000-8000-000000000000/outcome',
    '/api/receipts/guess',
  ])('%s is not found', async (path) => {
    await app
      .agent()
      .get(path)
      .expect(404)
      .expect('Content-Type', /problem\+json/);
  });
});

test('Gift Aid is offered only once the society’s recognition is recorded', async () => {
  const { db } = app.deps;
  const { gift_aid_recognised_on: day } = await db('society').first<{ gift_aid_recognised_on: string }>(
    'gift_aid_recognised_on',
  );
  await db('society').update({ gift_aid_recognised_on: null });
  const sheet = await app.agent().get('/api/gifts/sheet');
  expect(sheet.body.giftAid).toBeNull();
  const answer = await app.agent().put('/api/gifts/draft').send(filledSheet(withDeclaration)).expect(400);
  expect(answer.body.fields).toHaveProperty('declare');
  await db('society').update({ gift_aid_recognised_on: day });
});
