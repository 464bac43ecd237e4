// People at the desk for tests: made with their roles, signed in over the API as they would be.
import { randomUUID } from 'node:crypto';
import { generate, generateSecret } from 'otplib';
import type supertest from 'supertest';
import { sessionSchema, TOKEN_HEADER } from '#shared/accounts/session-schemas.ts';
import { needsSecondFactor, type Role } from '#shared/roles.ts';
import { createAccount } from '#server/accounts/index.ts';
import type { TestApp } from '#tests/support/app.ts';

const PASSWORD = 'a peg for every hole, and one more';

export type Present = {
  accountId: string;
  name: string;
  get(path: string): supertest.Test;
  post(path: string, body?: object): supertest.Test;
};

export async function signIn(app: TestApp, roles: readonly Role[], name = 'Joan Pellow'): Promise<Present> {
  const email = `${randomUUID()}@brackenhythe.example`;
  const secret = generateSecret();
  const { sessionSecret } = app.deps.config;
  const accountId = await app.deps.db.transaction((trx) =>
    createAccount(trx, {
      name,
      email,
      password: PASSWORD,
      roles,
      createdAt: app.clock.now(),
      ...(needsSecondFactor(roles) && { secondFactor: { secret, sessionSecret } }),
    }),
  );
  const agent = app.agent();
  const post =
    (token: string) =>
    (path: string, body: object = {}) =>
      agent.post(path).set('Origin', app.url).set(TOKEN_HEADER, token).send(body);
  const begun = await agent.post('/api/session').set('Origin', app.url).send({ email, password: PASSWORD });
  let session = sessionSchema.parse(begun.body);
  if (session.step === 'second-factor') {
    const proven = await post(session.token ?? '')('/api/session/second-factor', {
      code: await generate({ secret }),
    });
    session = sessionSchema.parse(proven.body);
  }
  if (session.step !== 'signed-in') throw new Error(`${roles.join()} is not signed in but ${session.step}`);
  return { accountId, name, get: (path) => agent.get(path), post: post(session.token ?? '') };
}
