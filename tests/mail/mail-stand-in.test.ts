// The mail stand-in: keeps what came across a restart, shows it safely, and misbehaves when it is told to.
import { appendFileSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import nodemailer, { type SendMailOptions } from 'nodemailer';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { startSmtp, type SmtpStandIn } from '#fakes/smtp/start-smtp.ts';

const folder = mkdtempSync(join(tmpdir(), 'mail-test-'));
let standIn: SmtpStandIn;
const start = async () => (standIn = await startSmtp({ port: 0, pagePort: 0, stateFolder: folder }));
beforeAll(async () => void (await start()));
afterAll(async () => {
  await standIn.stop();
  rmSync(folder, { recursive: true, force: true });
});
beforeEach(() => {
  standIn.clear();
  standIn.setMode({});
});

const send = (more: SendMailOptions = {}) =>
  nodemailer.createTransport(standIn.smtpUrl).sendMail({
    from: 'post@brackenhythe.example',
    to: 'thea@post.example',
    subject: 'Thank you',
    text: 'Plain words. https://lampwoman.example/receipts/abc',
    html: '<h1>Words</h1><script>alert(1)</script>',
    ...more,
  });

const get = async (path: string) => {
  const answer = await fetch(standIn.pageUrl + path);
  return { status: answer.status, headers: answer.headers, text: await answer.text() };
};
const post = (path: string, body: string, headers: Record<string, string>) =>
  fetch(standIn.pageUrl + path, { method: 'POST', body, headers, redirect: 'manual' });

describe('what came', () => {
  it('is kept with its envelope, and is there after a restart', async () => {
    await send({ envelope: { from: 'bounce@brackenhythe.example', to: ['hidden@post.example'] } });
    await standIn.stop();
    await start();
    expect(standIn.messages()).toMatchObject([
      {
        envelopeFrom: 'bounce@brackenhythe.example',
        envelopeTo: ['hidden@post.example'],
        toText: 'thea@post.example',
        subject: 'Thank you',
      },
    ]);
    const { source } = await standIn.read(standIn.messages()[0]?.id ?? '');
    expect(source).toContain('Subject: Thank you');
  });

  it('outlives a line of the index that was cut short by a kill', async () => {
    await send({ subject: 'First' });
    appendFileSync(join(folder, 'letters.jsonl'), '{"id":"2","rec');
    await standIn.stop();
    await start();
    await send({ subject: 'Second' });
    await standIn.stop();
    await start();
    expect(standIn.messages().map((one) => one.subject)).toEqual(['Second', 'First']);
  });

  it('is given as JSON, newest first, and forgotten on request', async () => {
    await send({ subject: 'First' });
    await send({ subject: 'Second' });
    const list = z.object({ messages: z.array(z.object({ id: z.string(), subject: z.string() })) });
    const { messages } = list.parse(JSON.parse((await get('/messages')).text));
    expect(messages.map((one) => one.subject)).toEqual(['Second', 'First']);
    const one = JSON.parse((await get(`/messages/${messages[0]?.id}`)).text) as unknown;
    expect(one).toMatchObject({ plain: expect.stringContaining('Plain words.') as string });
    expect((await fetch(`${standIn.pageUrl}/messages`, { method: 'DELETE' })).status).toBe(204);
    expect(standIn.messages()).toEqual([]);
    expect((await get(`/messages/${messages[0]?.id}`)).status).toBe(404);
  });
});

describe('the pages', () => {
  it('show a letter’s HTML only in a frame that can run nothing', async () => {
    await send({ subject: '<img src=x onerror=alert(1)>' });
    const id = standIn.messages()[0]?.id ?? '';
    const page = await get(`/letters/${id}`);
    expect(page.text).toContain('sandbox="allow-popups');
    expect(page.text).not.toMatch(/<img|<script|style=/);
    expect(page.text).toContain('href="https://lampwoman.example/receipts/abc"');
    expect(page.headers.get('content-security-policy')).toMatch(/default-src 'none'.*frame-ancestors 'none'/);
    const letter = await get(`/letters/${id}/html`);
    const policy = letter.headers.get('content-security-policy') ?? '';
    expect(policy).toMatch(/default-src 'none'.*sandbox allow-popups/);
    expect(policy).not.toMatch(/script-src|allow-scripts|allow-same-origin/);
  });

  it('find letters by address and turn in fifties', async () => {
    const transport = nodemailer.createTransport({ url: standIn.smtpUrl, pool: true, maxConnections: 1 });
    for (let index = 0; index < 55; index += 1)
      await transport.sendMail({
        from: 'post@brackenhythe.example',
        to: `giver${index}@post.example`,
        text: 'x',
      });
    transport.close();
    const first = await get('/');
    expect(first.text).toContain('55 letters');
    expect(first.text).toContain('giver54@');
    expect(first.text).not.toContain('giver4@');
    expect((await get('/?page=2')).text).toContain('giver4@');
    expect((await get('/?words=GIVER7@')).text).toContain('One letter');
    expect((await get('/?page=nonsense')).status).toBe(200);
  });

  it('say so when there is no such letter', async () => {
    for (const path of ['/letters/99', '/letters/99/html', '/letters/..%2f..%2fetc', '/nothing'])
      expect((await get(path)).status).toBe(404);
  });

  it('answer to this machine’s own names only', async () => {
    const { request } = await import('node:http');
    const status = await new Promise((resolve) => {
      request(standIn.pageUrl, { headers: { host: 'evil.example' } }, (answer) => {
        answer.resume();
        resolve(answer.statusCode);
      }).end();
    });
    expect(status).toBe(421);
  });
});

describe('its behaviour', () => {
  const JSON_TYPE = { 'content-type': 'application/json' };
  const FORM_TYPE = { 'content-type': 'application/x-www-form-urlencoded' };

  it.each([550, 452])('can refuse one address with %i and take the others', async (code) => {
    const mode = JSON.stringify({ refuse: [{ address: 'gone@post.example', code }] });
    expect((await post('/mode', mode, JSON_TYPE)).status).toBe(200);
    await expect(send({ to: 'gone@post.example' })).rejects.toMatchObject({ responseCode: code });
    await send();
    expect(standIn.messages()).toHaveLength(1);
  });

  it('can refuse after the text, and forgets that letter', async () => {
    standIn.setMode({ afterData: 'answer', afterDataCode: 451, times: 1 });
    await expect(send()).rejects.toMatchObject({ responseCode: 451 });
    await send();
    expect(standIn.messages()).toHaveLength(1);
  });

  it.each([
    ['drop', 1],
    ['drop-lost', 0],
  ] as const)('can %s the line after the text, keeping %i letters', async (afterData, kept) => {
    standIn.setMode({ afterData });
    await expect(send()).rejects.toThrow(/closed/i);
    expect(standIn.messages()).toHaveLength(kept);
  });

  it('can take its time', async () => {
    standIn.setMode({ delayMs: 300 });
    const began = performance.now();
    await send();
    expect(performance.now() - began).toBeGreaterThan(290);
  });

  it('can be chosen on the page, but not by another site’s form', async () => {
    expect(
      (await post('/mode', 'choice=soft', { ...FORM_TYPE, 'sec-fetch-site': 'cross-site' })).status,
    ).toBe(400);
    expect(
      (await post('/mode', 'choice=soft', { ...FORM_TYPE, origin: 'https://evil.example' })).status,
    ).toBe(400);
    await send();
    expect((await post('/mode', 'choice=soft', FORM_TYPE)).status).toBe(303);
    await expect(send()).rejects.toMatchObject({ responseCode: 452 });
    expect((await post('/mode', '{"afterDatas":"drop"}', JSON_TYPE)).status).toBe(400);
  });
});
