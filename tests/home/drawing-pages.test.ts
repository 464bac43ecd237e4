// The way of a page through the server: kept for all or drawn for one, cookies, forms, turns to other pages.
import express from 'express';
import request from 'supertest';
import { describe, expect, it } from 'vitest';
import { createCookieJar } from '#server/platform/pages/cookie-jar.ts';
import { openInProcess } from '#server/platform/pages/in-process.ts';
import { keepAnswer, sendKept } from '#server/platform/pages/index.ts';
import { isNeverKept, keptUnder } from '#server/platform/pages/page-rules.ts';
import { createPageApi } from '#server/platform/pages/server-api.ts';

describe('keptUnder', () => {
  it.each([
    ['/', '/'],
    ['/parts/body', '/parts/body'],
    ['/parts/body/', '/parts/body'],
    ['/privacy', '/privacy'],
    ['/give', null],
    ['/give/check', null],
    ['/receipts/abc', null],
    ['/desk', null],
    ['/nowhere', null],
    ['/parts/%2e%2e', null],
  ])('%s is kept under %s', (path, key) => {
    expect(keptUnder(path)).toBe(key);
  });

  it('never keeps anything that belongs to one person, however it is spelt', () => {
    for (const path of ['/give', '/GIVE', '/give/check', '/receipts/x', '/desk/gifts'])
      expect(isNeverKept(path), path).toBe(true);
    expect(isNeverKept('/gives')).toBe(false);
  });
});

describe('sendKept', () => {
  const app = express();
  const kept = keepAnswer('<p>The figure</p>'.repeat(50), 'html');
  const lost = keepAnswer('nothing', 'html', 404);
  app.get('/', async (req, res) => sendKept(req, res, await kept));
  app.get('/lost', async (req, res) => sendKept(req, res, await lost));

  it.each(['br', 'gzip', 'identity'])('sends the same page as %s, with one tag', async (encoding) => {
    const answer = await request(app).get('/').set('Accept-Encoding', encoding).expect(200);
    expect(answer.headers['content-encoding']).toBe(encoding === 'identity' ? undefined : encoding);
    expect(answer.headers.etag).toBe((await kept).etag);
    expect(answer.headers['cache-control']).toBe('public, max-age=0, must-revalidate');
    expect(answer.headers.vary).toContain('Accept-Encoding');
  });

  it('answers 304 to who has it, and a bare head to HEAD', async () => {
    const again = await request(app)
      .get('/')
      .set('If-None-Match', (await kept).etag)
      .expect(304);
    expect(again.text).toBe('');
    await request(app).head('/').expect(200);
  });

  it('lets nobody keep what was not found', async () => {
    const answer = await request(app).get('/lost').expect(404);
    expect(answer.headers['cache-control']).toBe('no-store');
    expect(answer.headers.etag).not.toBe((await lost).etag);
  });
});

describe('createPageApi', () => {
  const api = express();
  api.use(express.json());
  api.put('/api/draft', (req, res) => {
    res.cookie('draft', 'd1', { httpOnly: true, path: '/' });
    res.status(200).json({ heard: req.body as unknown, caller: req.ip, origin: req.get('origin') });
  });
  api.get('/api/draft', (req, res) => void res.json({ cookie: req.get('cookie') ?? null }));
  api.delete('/api/draft', (_req, res) => void res.clearCookie('draft').json({}));
  const ask = openInProcess(api);

  /** Runs a page's questions as the page handler would, in the name of a real request. */
  async function asReader(questions: (page: ReturnType<typeof createPageApi>) => Promise<unknown>) {
    const site = express();
    site.get('/', async (req, res) => {
      const page = createPageApi(ask, req);
      res.json({ answers: await questions(page), setCookies: page.setCookies() });
    });
    const answer = await request(site).get('/').set('Cookie', 'a=1').set('Origin', 'http://site.example');
    return answer.body as { answers: { status: number; text: string }[]; setCookies: string[] };
  }

  it('passes on body, origin and caller, and shows the next question the cookie just given', async () => {
    const { answers, setCookies } = await asReader(async ({ exchange }) => [
      await exchange({ method: 'PUT', path: '/api/draft', body: { name: 'Łucja' } }),
      await exchange({ method: 'GET', path: '/api/draft' }),
    ]);
    expect(JSON.parse(answers[0]?.text ?? '')).toMatchObject({
      heard: { name: 'Łucja' },
      origin: 'http://site.example',
      caller: expect.stringMatching(/127\.0\.0\.1$/) as string,
    });
    expect(JSON.parse(answers[1]?.text ?? '')).toEqual({ cookie: 'a=1; draft=d1' });
    expect(setCookies).toEqual([expect.stringContaining('draft=d1; Path=/; HttpOnly')]);
  });

  it('asks without a reader for pages that are the same for all', async () => {
    const { exchange } = createPageApi(ask, null);
    const answer = await exchange({ method: 'GET', path: '/api/draft' });
    expect(JSON.parse(answer.text)).toEqual({ cookie: null });
  });

  it('works while real requests run, and for many at once', async () => {
    const answers = await Promise.all(
      Array.from({ length: 20 }, () =>
        ask({ method: 'GET', path: '/api/draft', headers: { cookie: 'b=2' } }),
      ),
    );
    expect(answers.every(({ status, text }) => status === 200 && text === '{"cookie":"b=2"}')).toBe(true);
    await request(api).get('/api/draft').expect(200);
  });

  it('tells when the handler breaks off', async () => {
    const broken = openInProcess((_req, res) => void res.destroy());
    await expect(broken({ method: 'GET', path: '/', headers: {} })).rejects.toThrow();
  });
});

describe('createCookieJar', () => {
  it('forgets a cookie that is taken back, and still passes that on', () => {
    const jar = createCookieJar('a=1; draft=d1');
    jar.take(['draft=; Path=/; Expires=Thu, 01 Jan 1970 00:00:00 GMT']);
    expect(jar.header()).toBe('a=1');
    expect(jar.given()).toHaveLength(1);
  });

  it('keeps a value with = whole and the last of two', () => {
    const jar = createCookieJar('s=abc==');
    jar.take(['x=1; Path=/', 'x=2; Path=/; Max-Age=60']);
    expect(jar.header()).toBe('s=abc==; x=2');
    expect(jar.given()).toEqual(['x=2; Path=/; Max-Age=60']);
  });
});
