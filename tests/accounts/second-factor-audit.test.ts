// A wrong code leaves its line in the audit trail while a second factor is being set up, as it does at sign-in.
import { afterAll, beforeAll, expect, it } from 'vitest';
import { secondFactorOfferSchema } from '#shared/accounts/session-schemas.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';
import { codeFor, makePerson, openVisitor } from './desk-visitor.ts';

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
});
afterAll(() => app.stop());

const SETUP = '/api/session/second-factor/setup';

it('a wrong code at set-up is written down', async () => {
  const person = await makePerson(app, { roles: ['chair'] });
  const visitor = openVisitor(app);
  await visitor.signIn(person);
  const offer = secondFactorOfferSchema.parse((await visitor.post(SETUP)).body);
  visitor.noteToken(offer.session);
  const right = await codeFor(offer.secret);
  const wrong = await visitor.post(`${SETUP}/confirm`, { code: right === '000000' ? '111111' : '000000' });
  expect(wrong.status).toBe(400);
  const lines = await app.deps
    .db('audit.lines')
    .where({ object_id: person.id, action: 'second-factor-failed' })
    .select('actor_kind');
  expect(lines).toEqual([{ actor_kind: 'system' }]);
});
