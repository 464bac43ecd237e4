// What stands before the desk: strangers, other sites, other kinds of body, roles, and the cookie's name.
import { request } from 'node:http';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { problemSchema } from '#shared/errors.ts';
import { refuseDemonstrationAccounts } from '#server/accounts/index.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';
import { comeIn, makePerson, openVisitor, type Visitor } from './desk-visitor.ts';

let app: TestApp;
let visitor: Visitor;
beforeAll(async () => {
  app = await startTestApp();
  visitor = await comeIn(app, await makePerson(app));
});
afterAll(() => app.stop());

const PASSWORD = '/api/desk/account/password';
const cookieHeader = (): string =>
  visitor.agent.jar
    .getCookies({ path: '/', domain: '127.0.0.1', secure: false, script: false })
    .map((cookie) => cookie.toValueString())
    .join('; ');

describe('a stranger', () => {
  it.each(['/api/desk', '/api/desk/today', '/api/desk/gifts', '/api/desk/account', '/api/desk/no-such-room'])(
    'gets nothing at %s but 401',
    async (path) => {
      const answer = await supertest(app.url).get(path);
      expect(answer.status).toBe(401);
      expect(answer.type).toBe('application/problem+json');
      expect(answer.get('Cache-Control')).toBe('no-store');
      expect(answer.get('Set-Cookie')).toBeUndefined();
    },
  );

  it('is told so, and given no cookie, when asking who they are', async () => {
    const answer = await supertest(app.url).get('/api/session');
    expect(answer.body).toEqual({ person: null, step: 'signed-out', token: null });
    expect(answer.get('Set-Cookie')).toBeUndefined();
  });
});

describe('a change asked for with the cookie of somebody signed in', () => {
  const wanted = { password: 'x', newPassword: 'four other words here' };
  it('is refused without the token of that session', async () => {
    const headers = { ...visitor.headers(), 'X-Treenail-Token': '' };
    const without = await visitor.agent.post(PASSWORD).set(headers).send(wanted);
    expect(without.status).toBe(403);
    expect(problemSchema.parse(without.body).reason).toBe('stale-token');
    const other = await comeIn(app, await makePerson(app));
    const foreign = await visitor.agent
      .post(PASSWORD)
      .set({ ...headers, 'X-Treenail-Token': other.token() })
      .send(wanted);
    expect(foreign.status).toBe(403);
    const left = await visitor.agent.delete('/api/session').set(headers);
    expect(left.status).toBe(403);
  });

  it.each([
    ['another origin', { Origin: 'https://evil.example', 'Sec-Fetch-Site': 'cross-site' }],
    ['a sister site', { Origin: 'https://other.brackenhythe.example', 'Sec-Fetch-Site': 'same-site' }],
    ['an old browser on another site', { Origin: 'https://evil.example' }],
    ['a sandboxed frame of an old browser', { Origin: 'null' }],
    ['nowhere that it tells', {}],
  ])('is refused when it comes from %s', async (_where, from) => {
    const answer = await supertest(app.url)
      .post(PASSWORD)
      .set({ Cookie: cookieHeader(), 'X-Treenail-Token': visitor.token(), ...from })
      .send(wanted);
    expect(answer.status).toBe(403);
    expect(problemSchema.parse(answer.body).reason).toBe('other-site');
  });

  it.each([
    ['this very page', () => ({ Origin: app.deps.config.publicAddress, 'Sec-Fetch-Site': 'same-origin' })],
    ['a form of ours under no-referrer', () => ({ Origin: 'null', 'Sec-Fetch-Site': 'same-origin' })],
    ['another name of this host', () => ({ Origin: 'http://localhost:1', 'Sec-Fetch-Site': 'same-origin' })],
    ['an old browser on this site', () => ({ Origin: app.deps.config.publicAddress })],
  ])('goes on to be read when it comes from %s', async (_where, from) => {
    const answer = await supertest(app.url)
      .post(PASSWORD)
      .set({ Cookie: cookieHeader(), 'X-Treenail-Token': visitor.token(), ...from() })
      .send({});
    expect(answer.status).toBe(400);
  });

  it.each(['text/plain', 'application/x-www-form-urlencoded', 'multipart/form-data'])(
    'is refused as %s',
    async (type) => {
      const answer = await visitor.agent
        .post(PASSWORD)
        .set({ ...visitor.headers(), 'Content-Type': type })
        .send(JSON.stringify(wanted));
      expect(answer.status).toBe(415);
    },
  );
});

describe('signing in from another site', () => {
  it('is refused, so that nobody is signed in as somebody else unawares', async () => {
    const person = await makePerson(app);
    const answer = await supertest(app.url)
      .post('/api/session')
      .set({ Origin: 'https://evil.example', 'Sec-Fetch-Site': 'cross-site' })
      .send({ email: person.email, password: person.password });
    expect(answer.status).toBe(403);
  });
});

describe('a new password', () => {
  it('needs the present one, ends other sessions, and leaves this one open', async () => {
    const person = await makePerson(app);
    const [here, elsewhere] = [await comeIn(app, person), await comeIn(app, person)];
    const wrong = await here.post(PASSWORD, { password: 'not mine', newPassword: 'four other words here' });
    expect(problemSchema.parse(wrong.body).fields).toHaveProperty('password');
    const common = await here.post(PASSWORD, { password: person.password, newPassword: 'Treenail2027!' });
    expect(problemSchema.parse(common.body).fields).toHaveProperty('newPassword');
    const own = await here.post(PASSWORD, { password: person.password, newPassword: person.email });
    expect(problemSchema.parse(own.body).fields).toHaveProperty('newPassword');
    const changed = await here.post(PASSWORD, {
      password: person.password,
      newPassword: 'four other words here',
    });
    expect(changed.body).toMatchObject({ step: 'signed-in' });
    expect((await here.get('/api/desk/account')).status).toBe(200);
    expect((await elsewhere.get('/api/desk/account')).status).toBe(401);
    expect((await openVisitor(app).signIn(person)).status).toBe(401);
    expect((await openVisitor(app).signIn({ ...person, password: 'four other words here' })).status).toBe(
      200,
    );
  });
});

describe('the cookie behind a proxy that ends TLS', () => {
  let secure: TestApp;
  beforeAll(async () => {
    secure = await startTestApp({
      env: { TREENAIL_PUBLIC_ADDRESS: 'https://lampwoman.example', TREENAIL_PROXY_HOPS: '1' },
    });
  });
  afterAll(() => secure.stop());

  it('is __Host-treenail and Secure, and opens the desk', async () => {
    const person = await makePerson(secure);
    const from = { Origin: 'https://lampwoman.example', 'X-Forwarded-Proto': 'https' };
    const answer = await supertest(secure.url)
      .post('/api/session')
      .set(from)
      .send({ email: person.email, password: person.password });
    const cookie = String(answer.get('Set-Cookie'));
    expect(cookie).toMatch(/^__Host-treenail=/);
    for (const part of ['Path=/', 'HttpOnly', 'Secure', 'SameSite=Lax']) expect(cookie).toContain(part);
    expect(cookie).not.toContain('Domain');
    const account = await supertest(secure.url)
      .get('/api/desk/account')
      .set({ ...from, Cookie: cookie.split(';')[0] ?? '' });
    expect(account.status).toBe(200);
  });
});

describe('the cookie behind a proxy that does not say how the visitor came', () => {
  it('is no silent nothing: the sign-in says what the proxy must send', async () => {
    const app = await startTestApp({ env: { TREENAIL_PUBLIC_ADDRESS: 'https://lampwoman.example' } });
    try {
      const person = await makePerson(app);
      const answer = await openVisitor(app).signIn(person);
      expect(answer.status).toBe(500);
      expect(problemSchema.parse(answer.body).detail).toContain('TREENAIL_PROXY_HOPS');
    } finally {
      await app.stop();
    }
  });
});

describe('accounts made for show', () => {
  it('keep a live society from starting until they are switched off', async () => {
    await makePerson(app, { isDemonstration: true });
    await expect(refuseDemonstrationAccounts(app.deps.db)).rejects.toThrow(
      /^Switch off the demonstration accounts[^\n]*$/,
    );
    await app.deps.db('accounts').where({ is_demonstration: true }).update({ switched_off_at: new Date() });
    await expect(refuseDemonstrationAccounts(app.deps.db)).resolves.toBeUndefined();
  });
});

describe('a request of unusual shape', () => {
  it('is refused when its body is chunked and not JSON', async () => {
    const status = await new Promise<number | undefined>((resolve, reject) => {
      const asked = request(
        `${app.url}/api/session`,
        { method: 'DELETE', headers: { 'Content-Type': 'text/plain', 'Transfer-Encoding': 'chunked' } },
        (answer) => resolve(answer.resume().statusCode),
      );
      asked.on('error', reject);
      asked.end('{}');
    });
    expect(status).toBe(415);
  });
});
