// What goes out with every answer: headers by address, and files of the build that may be kept.
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import express from 'express';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { readConfig } from '#server/platform/config.ts';
import { securityHeaders } from '#server/platform/headers.ts';
import { openBuiltSite } from '#server/platform/pages/site-build.ts';

const config = readConfig({
  DATABASE_URL: 'postgres://app@db/treenail',
  TREENAIL_PUBLIC_ADDRESS: 'https://lampwoman.example',
  TREENAIL_SESSION_SECRET: 'a secret',
  TREENAIL_PAYMENT_KEY: 'sk_test_invented',
  TREENAIL_PAYMENT_WEBHOOK_SECRET: 'whsec_invented',
  TREENAIL_SMTP_URL: 'smtp://127.0.0.1:9',
});

describe('headers', () => {
  const app = express()
    .use(securityHeaders(config))
    .use((_req, res) => void res.send('here'));

  test.each(['/receipts/abc', '/give/done?gift=1', '/desk', '/desk/gifts', '/api/campaign', '/DESK'])(
    '%s is not for search engines',
    async (path) => {
      await request(app).get(path).expect('X-Robots-Tag', 'noindex');
    },
  );

  test.each(['/', '/give', '/parts/body', '/desks'])('%s is', async (path) => {
    expect((await request(app).get(path)).headers).not.toHaveProperty('x-robots-tag');
  });

  test('TLS is demanded for this host and no other', async () => {
    await request(app).get('/').expect('Strict-Transport-Security', 'max-age=31536000');
  });
});

describe('the built site', () => {
  let root = '';
  beforeAll(() => {
    root = mkdtempSync(join(tmpdir(), 'treenail-build-'));
    for (const folder of ['dist/client/assets', 'dist/server'])
      mkdirSync(join(root, folder), { recursive: true });
    writeFileSync(join(root, 'package.json'), '{"type":"module"}');
    writeFileSync(join(root, 'dist/client/index.html'), '<!--app-html-->');
    writeFileSync(join(root, 'dist/client/assets/index-abc.js'), '1');
    writeFileSync(join(root, 'dist/server/entry-server.js'), 'export const render = () => 0;');
  });
  afterAll(() => rmSync(root, { recursive: true }));

  test('gives its hashed files for a year, and its template to nobody', async () => {
    const site = await openBuiltSite(root);
    const app = express().use(site.assets);
    const file = await request(app).get('/assets/index-abc.js').expect(200);
    expect(file.headers['cache-control']).toContain('immutable');
    for (const path of ['/index.html', '/assets/index.html', '/assets/../index.html', '/assets'])
      await request(app).get(path).expect(404);
  });
});
