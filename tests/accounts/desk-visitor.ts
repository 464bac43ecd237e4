// A person for tests who has an account, and a browser of their own with which they come to the desk.
import { generate, generateSecret } from 'otplib';
import supertest from 'supertest';
import { sessionSchema, type Session } from '#shared/accounts/session-schemas.ts';
import type { Role } from '#shared/roles.ts';
import { createAccount } from '#server/accounts/index.ts';
import type { TestApp } from '#tests/support/app.ts';

const PASSWORD = 'four words on a wall';
let made = 0;

export type DeskPersonForTests = { id: string; email: string; password: string; secret: string | undefined };

export async function makePerson(
  app: TestApp,
  {
    roles = ['secretary'],
    hasSecondFactor = false,
    isDemonstration = false,
  }: {
    roles?: Role[];
    hasSecondFactor?: boolean;
    isDemonstration?: boolean;
  } = {},
): Promise<DeskPersonForTests> {
  made += 1;
  const email = `person-${made}@brackenhythe.example`;
  const secret = hasSecondFactor ? generateSecret() : undefined;
  const { sessionSecret } = app.deps.config;
  const id = await app.deps.db.transaction((trx) =>
    createAccount(trx, {
      name: `Person ${made}`,
      email,
      password: PASSWORD,
      roles,
      isDemonstration,
      ...(secret !== undefined && { secondFactor: { secret, sessionSecret } }),
      createdAt: app.clock.now(),
    }),
  );
  return { id, email, password: PASSWORD, secret };
}

type Header = Record<string, string>;

/** One browser: keeps its cookie, names its origin, and shows the token of its last answer. */
export function openVisitor(app: TestApp, more: Header = {}) {
  const agent = supertest.agent(app.url);
  let token = '';
  const headers = (): Header => ({
    Origin: app.deps.config.publicAddress,
    'Sec-Fetch-Site': 'same-origin',
    ...(token !== '' && { 'X-Treenail-Token': token }),
    ...more,
  });
  const noteToken = (body: unknown): void => {
    const parsed = sessionSchema.safeParse(body);
    if (parsed.success) token = parsed.data.token ?? '';
  };
  const note = <T extends { body: unknown }>(response: T): T => {
    noteToken(response.body);
    return response;
  };
  return {
    agent,
    headers,
    noteToken,
    token: () => token,
    get: async (path: string) => note(await agent.get(path).set(headers())),
    post: async (path: string, body: object = {}) => note(await agent.post(path).set(headers()).send(body)),
    delete: async (path: string) => note(await agent.delete(path).set(headers())),
    signIn: async (person: { email: string; password: string }) =>
      note(
        await agent
          .post('/api/session')
          .set(headers())
          .send({ email: person.email, password: person.password }),
      ),
  };
}
export type Visitor = ReturnType<typeof openVisitor>;

export const codeFor = (secret: string, offsetSeconds = 0): Promise<string> =>
  generate({ secret, epoch: Math.floor(Date.now() / 1000) + offsetSeconds });

/** Signs a person in with everything that their roles ask for. */
export async function comeIn(app: TestApp, person: DeskPersonForTests): Promise<Visitor> {
  const visitor = openVisitor(app);
  await visitor.signIn(person);
  if (person.secret !== undefined)
    await visitor.post('/api/session/second-factor', { code: await codeFor(person.secret) });
  return visitor;
}

export const stepOf = (response: { body: unknown }): Session['step'] =>
  sessionSchema.parse(response.body).step;
