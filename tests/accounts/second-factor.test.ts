// The second factor: asked of those who can move money or people, each code once, recovery codes once.
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { problemSchema } from '#shared/errors.ts';
import {
  recoveryCodesSchema,
  secondFactorKeptSchema,
  secondFactorOfferSchema,
} from '#shared/accounts/session-schemas.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';
import {
  codeFor,
  comeIn,
  makePerson,
  openVisitor,
  stepOf,
  type DeskPersonForTests,
  type Visitor,
} from './desk-visitor.ts';

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
});
afterAll(() => app.stop());

const SETUP = '/api/session/second-factor/setup';

async function setUp(
  visitor: Visitor,
  proof: object = {},
): Promise<{ secret: string; recoveryCodes: string[] }> {
  const offer = secondFactorOfferSchema.parse((await visitor.post(SETUP, proof)).body);
  visitor.noteToken(offer.session);
  const answer = await visitor.post(`${SETUP}/confirm`, { code: await codeFor(offer.secret) });
  const kept = secondFactorKeptSchema.parse(answer.body);
  visitor.noteToken(kept.session);
  return { secret: offer.secret, recoveryCodes: kept.recoveryCodes };
}

describe('a second factor that is not set up', () => {
  it('must be before the treasurer sees anything at the desk', async () => {
    const visitor = openVisitor(app);
    const answer = await visitor.signIn(await makePerson(app, { roles: ['treasurer'] }));
    expect(answer.body).toMatchObject({ step: 'second-factor-setup', person: null });
    const refused = await visitor.get('/api/desk/account');
    expect(refused.status).toBe(403);
    expect(problemSchema.parse(refused.body).reason).toBe('second-factor-setup');
  });

  it('opens the desk once confirmed, with ten recovery codes', async () => {
    const person = await makePerson(app, { roles: ['chair'] });
    const visitor = openVisitor(app);
    await visitor.signIn(person);
    const { recoveryCodes } = await setUp(visitor);
    expect(new Set(recoveryCodes).size).toBe(10);
    const account = await visitor.get('/api/desk/account');
    expect(account.body).toMatchObject({
      secondFactor: { isOn: true, isNeeded: true, recoveryCodesLeft: 10 },
    });
    const kept: { totp_secret: string } = await app.deps
      .db('accounts')
      .where({ id: person.id })
      .first('totp_secret');
    expect(kept.totp_secret).toMatch(/^v1\./);
  });

  it('is not confirmed by a wrong code, nor without a picture', async () => {
    const visitor = openVisitor(app);
    await visitor.signIn(await makePerson(app, { roles: ['chair'] }));
    expect((await visitor.post(`${SETUP}/confirm`, { code: '123456' })).status).toBe(409);
    const offer = secondFactorOfferSchema.parse((await visitor.post(SETUP)).body);
    visitor.noteToken(offer.session);
    const right = await codeFor(offer.secret);
    const wrong = await visitor.post(`${SETUP}/confirm`, { code: right === '000000' ? '111111' : '000000' });
    expect(wrong.status).toBe(400);
    expect(problemSchema.parse(wrong.body).fields).toHaveProperty('code');
  });

  it('is asked for the moment a role needs it, though the person is signed in', async () => {
    const person = await makePerson(app);
    const visitor = await comeIn(app, person);
    await app.deps
      .db('accounts')
      .where({ id: person.id })
      .update({ roles: ['secretary', 'treasurer'] });
    expect((await visitor.get('/api/desk/account')).status).toBe(403);
    expect(stepOf(await visitor.get('/api/session'))).toBe('second-factor-setup');
  });
});

describe('a second factor that is set up', () => {
  let person: DeskPersonForTests;
  beforeAll(async () => {
    person = await makePerson(app, { roles: ['treasurer'], hasSecondFactor: true });
  });
  const secret = () => person.secret ?? '';

  it('keeps the desk shut to the password alone', async () => {
    const visitor = openVisitor(app);
    expect((await visitor.signIn(person)).body).toMatchObject({ step: 'second-factor', person: null });
    expect((await visitor.get('/api/desk/account')).status).toBe(401);
    // Whoever has only the password must not be able to put in a second factor of their own.
    expect((await visitor.post(SETUP)).status).toBe(401);
    expect((await visitor.post(`${SETUP}/confirm`, { code: '123456' })).status).toBe(409);
    expect((await visitor.post('/api/desk/account/recovery-codes', { code: '123456' })).status).toBe(401);
  });

  it('opens with the code of the moment and gives a new session id', async () => {
    const visitor = openVisitor(app);
    const half = await visitor.signIn(person);
    const answer = await visitor.post('/api/session/second-factor', { code: await codeFor(secret()) });
    expect(answer.body).toMatchObject({ step: 'signed-in' });
    expect(answer.get('Set-Cookie')).toBeDefined();
    expect(answer.get('Set-Cookie')).not.toEqual(half.get('Set-Cookie'));
    const old = openVisitor(app, { Cookie: String(half.get('Set-Cookie')).split(';')[0] ?? '' });
    expect(stepOf(await old.get('/api/session'))).toBe('signed-out');
  });

  it('refuses a code that was used, by however many at once', async () => {
    const other = await makePerson(app, { roles: ['treasurer'], hasSecondFactor: true });
    const code = await codeFor(other.secret ?? '');
    const visitors = [openVisitor(app), openVisitor(app), openVisitor(app)];
    for (const visitor of visitors) await visitor.signIn(other);
    const answers = await Promise.all(
      visitors.map((visitor) => visitor.post('/api/session/second-factor', { code })),
    );
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 400, 400]);
  });

  it('bears a clock that is half a minute out, and no more', async () => {
    const other = await makePerson(app, { roles: ['treasurer'], hasSecondFactor: true });
    const visitor = openVisitor(app);
    await visitor.signIn(other);
    const far = await codeFor(other.secret ?? '', -95);
    expect((await visitor.post('/api/session/second-factor', { code: far })).status).toBe(400);
    const near = await codeFor(other.secret ?? '', -30);
    expect(
      (await visitor.post('/api/session/second-factor', { code: `${near.slice(0, 3)} ${near.slice(3)}` }))
        .status,
    ).toBe(200);
  });

  it('makes guesses of the code wait', async () => {
    const other = await makePerson(app, { roles: ['treasurer'], hasSecondFactor: true });
    const visitor = openVisitor(app);
    await visitor.signIn(other);
    const statuses: number[] = [];
    for (let guess = 0; guess < 8; guess += 1)
      statuses.push((await visitor.post('/api/session/second-factor', { code: `00000${guess}` })).status);
    expect(statuses).toContain(429);
  });

  it('is replaced only by password and code together', async () => {
    const other = await makePerson(app, { roles: ['treasurer'], hasSecondFactor: true });
    const visitor = openVisitor(app);
    await visitor.signIn(other);
    await visitor.post('/api/session/second-factor', { code: await codeFor(other.secret ?? '', -30) });
    const bare = await visitor.post(SETUP, { password: other.password });
    expect(problemSchema.parse(bare.body).fields).toHaveProperty('code');
    const wrong = await visitor.post(SETUP, {
      password: 'not mine',
      code: await codeFor(other.secret ?? ''),
    });
    expect(problemSchema.parse(wrong.body).fields).toHaveProperty('password');
    const elsewhere = openVisitor(app);
    await elsewhere.signIn(other);
    const made = await setUp(visitor, { password: other.password, code: await codeFor(other.secret ?? '') });
    expect(made.secret).not.toBe(other.secret);
    expect(stepOf(await elsewhere.get('/api/session'))).toBe('signed-out');
  });
});

describe('recovery codes', () => {
  it('stand in for the code once each, and a new set ends the old', async () => {
    const person = await makePerson(app, { roles: ['treasurer'] });
    const visitor = openVisitor(app);
    await visitor.signIn(person);
    const { secret, recoveryCodes } = await setUp(visitor);
    const [first = '', second = ''] = recoveryCodes;
    const give = async (code: string): Promise<number> => {
      const other = openVisitor(app);
      await other.signIn(person);
      return (await other.post('/api/session/second-factor', { code })).status;
    };
    expect(await give(first.toUpperCase().replaceAll('-', ' '))).toBe(200);
    expect(await give(first)).toBe(400);
    expect((await visitor.get('/api/desk/account')).body).toMatchObject({
      secondFactor: { recoveryCodesLeft: 9 },
    });

    const renewed = await visitor.post('/api/desk/account/recovery-codes', {
      code: await codeFor(secret, 30),
    });
    expect(recoveryCodesSchema.parse(renewed.body).recoveryCodes).toHaveLength(10);
    expect(await give(second)).toBe(400);
    const kept = await app.deps
      .db('recovery_codes')
      .where({ account_id: person.id })
      .pluck<string[]>('code_hash');
    expect(kept).not.toContain(second.replaceAll('-', ''));
    const deeds = await app.deps.db('audit.lines').where({ object_id: person.id }).pluck<string[]>('action');
    expect(deeds).toEqual(
      expect.arrayContaining(['second-factor-kept', 'recovery-code-used', 'recovery-codes-renewed']),
    );
  });
});
