// The API against its standards: OpenAPI 3.1, RFC 9457 problem details, the routes that truly exist.
import { validate } from '@readme/openapi-parser';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { apiDocument, ENDPOINTS } from '#server/api-description.ts';
import { problemSchema } from '#shared/errors.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';
import { setUpTown } from '#tests/support/factories.ts';

let app: TestApp;
beforeAll(async () => {
  app = await startTestApp();
  await setUpTown(app);
});
afterAll(() => app.stop());

// OpenAPI Specification 3.1.0, checked by @readme/openapi-parser (an independent validator).
describe('the OpenAPI document', () => {
  const document = apiDocument();
  test('is valid', async () => {
    const verdict = await validate(structuredClone(document) as Parameters<typeof validate>[0]);
    expect(verdict).toMatchObject({ valid: true });
  });

  // What the validator is known to miss: unknown JSON types and security schemes nobody declared.
  test('names only JSON types and declared security schemes', () => {
    const types: unknown[] = [];
    const walk = (value: unknown): void => {
      if (typeof value !== 'object' || value === null) return;
      for (const [key, inner] of Object.entries(value)) {
        if (key === 'type' && (typeof inner === 'string' || Array.isArray(inner)))
          types.push(...[inner].flat());
        walk(inner);
      }
    };
    walk(document.paths);
    expect(new Set(types)).toEqual(
      new Set(
        ['object', 'array', 'string', 'integer', 'number', 'boolean', 'null'].filter((type) =>
          types.includes(type),
        ),
      ),
    );
    const used = Object.values(document.paths ?? {}).flatMap((path) =>
      Object.values(
        z
          .record(z.string(), z.looseObject({ security: z.array(z.record(z.string(), z.unknown())) }))
          .parse(path),
      ).flatMap((one) => one.security.flatMap((scheme) => Object.keys(scheme))),
    );
    expect([...new Set(used)]).toEqual(Object.keys(document.components?.securitySchemes ?? {}));
  });

  test('is served, and lists every endpoint once', async () => {
    const { body } = await app.agent().get('/api/openapi.json').expect(200);
    expect(body.openapi).toBe('3.1.0');
    expect(Object.keys(body.paths).every((path) => path.startsWith('/api/'))).toBe(true);
    expect(new Set(ENDPOINTS.map((one) => one.operationId)).size).toBe(ENDPOINTS.length);
  });

  test.each(ENDPOINTS.filter((one) => one.isStaff).map((one) => [one.method, one.path] as const))(
    '%s %s answers 401 to a stranger',
    async (method, path) => {
      const address = path.replace('{number}', '1').replace('{id}', '00000000-0000-4000-8000-000000000000');
      const request = app.agent()[method as 'get' | 'post'](address);
      const answer = await (method === 'get' ? request : request.send({})).expect(401);
      expect(problemSchema.parse(answer.body).code).toBe('not-signed-in');
    },
  );

  test('anything else under /api/desk answers 401 as well', async () => {
    for (const path of [
      '/api/desk',
      '/api/desk/',
      '/api/desk/nothing',
      '/api/desk/gifts/1/../../x',
      '/API/DESK/gifts',
    ])
      await app.agent().get(path).expect(401);
  });
});

// RFC 9457, section 3: type, title, status, detail and instance, sent as application/problem+json.
describe('problems', () => {
  test.each([
    ['get', '/api/nothing-here', undefined, 404],
    ['put', '/api/gifts/draft', { name: 7, colour: 'red' }, 400],
    ['post', '/api/gifts/checkout', { appealVersion: 1 }, 409],
    ['get', '/api/desk/gifts', undefined, 401],
  ] as const)('%s %s is told after the RFC', async (method, path, body, status) => {
    const request = app.agent()[method](path);
    const answer = await (body === undefined ? request : request.send(body));
    expect(answer.status).toBe(status);
    expect(answer.headers['content-type']).toMatch(/^application\/problem\+json/);
    const problem = problemSchema.parse(answer.body);
    expect(problem).toMatchObject({ type: 'about:blank', status });
    expect(problem.title).not.toBe('');
    expect(problem.requestId).toBe(answer.headers['x-request-id']);
  });

  test('every wrong field is named at once, unknown ones too', async () => {
    const { body } = await app
      .agent()
      .put('/api/gifts/draft')
      .send({ name: 'A', email: 'no', wall: 'moon', colour: 'red' })
      .expect(400);
    expect(Object.keys(problemSchema.parse(body).fields ?? {})).toEqual(
      expect.arrayContaining(['wall', 'colour']),
    );
  });

  test('a body that is no JSON or too large is refused with words', async () => {
    await app
      .agent()
      .put('/api/gifts/draft')
      .set('Content-Type', 'application/json')
      .send('{"name":')
      .expect(400);
    const large = await app
      .agent()
      .put('/api/gifts/draft')
      .send({ message: 'x'.repeat(200_000) })
      .expect(413);
    expect(large.headers['content-type']).toMatch(/problem\+json/);
  });

  test('a fault of ours tells nothing of what went wrong inside', async () => {
    const broken = await startTestApp();
    await broken.database.owner.raw('alter table campaigns rename to gone');
    const answer = await broken.agent().get('/api/campaign').expect(500);
    expect(problemSchema.parse(answer.body)).toMatchObject({ code: 'internal', status: 500 });
    expect(JSON.stringify(answer.body)).not.toMatch(/campaigns|select|stack|\.ts/);
    await broken.stop();
  });
});

test('the campaign answers in the shape that was promised', async () => {
  const { body } = await app.agent().get('/api/campaign').expect(200);
  expect(body).toMatchObject({
    name: 'The Lampwoman',
    goalPence: 8_400_000,
    givenPence: 0,
    givers: 0,
    reach: { heightMm: 0, part: 'footing', fraction: 0 },
  });
  expect(body.parts[0]).toMatchObject({
    slug: 'footing',
    name: 'Footing',
    costPence: 640_000,
    givenPence: 0,
    state: 'planned',
    bottomMm: 0,
    topMm: 500,
  });
  expect(body.stages).toHaveLength(5);
});
