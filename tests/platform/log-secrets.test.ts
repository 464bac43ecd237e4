// The log never holds an address by which a stranger could read a receipt or how a gift came out.
import { Writable } from 'node:stream';
import express from 'express';
import { pino } from 'pino';
import { pinoHttp } from 'pino-http';
import request from 'supertest';
import { describe, expect, test } from 'vitest';
import { httpSerializers, maskSecrets } from '#server/platform/log.ts';
import { reportError } from '#server/platform/problems.ts';

const GIFT = '0b7c1f5e-52a1-4d0b-9f35-6a3b8f1c2d4e';
const TOKEN = 'Zm9ydHktdHdvLWJ5dGVz';

describe('maskSecrets', () => {
  test.each([
    [`/receipts/${TOKEN}`, '/receipts/…'],
    [`/receipts/${TOKEN}.pdf?x=1`, '/receipts/…?x=1'],
    [`/api/receipts/${TOKEN}`, '/api/receipts/…'],
    [`/API/Receipts/${TOKEN}`, '/API/Receipts/…'],
    [`/give/done?gift=${GIFT}`, '/give/done?gift=…'],
    [`/give/done?a=1&gift=${GIFT}&b=2`, '/give/done?a=1&gift=…&b=2'],
    [`/api/gifts/${GIFT}/outcome`, '/api/gifts/…/outcome'],
    [`https://cards.example/c/pay/cs_test_1#key`, 'https://cards.example/c/pay/…'],
    ['/api/gifts/sheet?amount=20', '/api/gifts/sheet?amount=20'],
    ['/api/gifts/checkout', '/api/gifts/checkout'],
    ['/api/desk/gifts/12', '/api/desk/gifts/12'],
    ['/parts/body', '/parts/body'],
  ])('%s is logged as %s', (url, masked) => expect(maskSecrets(url)).toBe(masked));
});

function logged() {
  const lines: string[] = [];
  const sink = new Writable({
    write(chunk, _encoding, done) {
      lines.push(String(chunk));
      done();
    },
  });
  return { lines, log: pino({ level: 'debug' }, sink) };
}

describe('the log of requests', () => {
  test('tells method, masked address and status, and not the secret anywhere', async () => {
    const { lines, log } = logged();
    const app = express();
    app.use(pinoHttp({ logger: log, serializers: httpSerializers }));
    app.get('/give/done', (_req, res) => res.redirect(303, `/receipts/${TOKEN}`));
    app.get('/api/gifts/:id/outcome', (_req, res) => void res.json({}));
    await request(app).get(`/give/done?gift=${GIFT}`).expect(303);
    await request(app).get(`/api/gifts/${GIFT}/outcome`).expect(200);
    const told = lines.join('');
    expect(lines).toHaveLength(2);
    expect(told).toContain('"url":"/give/done?gift=…"');
    expect(told).toContain('"statusCode":303');
    expect(told).not.toContain(GIFT);
    expect(told).not.toContain(TOKEN);
  });

  test('nor does the report of an error', () => {
    const { lines, log } = logged();
    reportError(log, new Error('broken'), { path: `/receipts/${TOKEN}` });
    expect(lines.join('')).toContain('/receipts/…');
    expect(lines.join('')).not.toContain(TOKEN);
  });
});
