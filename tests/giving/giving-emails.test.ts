// Letters about gifts: whole, right in both forms, and safe whatever people write in them.
import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import {
  dedicationLetter,
  queueDedicationLetter,
  queueThanks,
  thanksLetter,
  type DedicationNews,
} from '#server/giving/giving-emails.ts';
import { greetingLine } from '#server/giving/letter-words.ts';
import { receiptSchema, type Receipt } from '#shared/giving/give-schemas.ts';
import { pence } from '#shared/money.ts';
import { cloneDatabase, type TestDatabase } from '#tests/support/database.ts';

const readSample = (name: string): unknown =>
  JSON.parse(readFileSync(new URL(`../../emails/giving/${name}.sample.json`, import.meta.url), 'utf8'));
const sample = z
  .object({ receipt: receiptSchema, addresses: z.object({ receiptUrl: z.url(), siteUrl: z.url() }) })
  .parse(readSample('gift-thanks'));
const write = (changes: Partial<Receipt> = {}) =>
  thanksLetter({ ...sample.receipt, ...changes }, sample.addresses);

/** What a reader sees of the HTML. */
const seen = (html: string): string =>
  html
    .replaceAll(/<style[\s\S]*?<\/style>|<!--[\s\S]*?-->/g, '')
    .replaceAll(/<[^>]+>/g, ' ')
    .replaceAll('&#39;', "'")
    .replaceAll('&amp;', '&')
    .replaceAll(/\s+/g, ' ');

describe('the greeting', () => {
  it.each([
    ['Mrs Quillan', 'Dear Mrs Quillan,'],
    ['Dear Mrs Quillan,', 'Dear Mrs Quillan,'],
    ['', 'Dear Thea Quillan,'],
    ['Hello Thea', 'Hello Thea,'],
  ])('from %j is %j', (greeting, line) => {
    expect(greetingLine(greeting, 'Thea Quillan')).toBe(line);
  });
});

describe('the thank-you', () => {
  it('says in both forms what was given, towards what, and what was declared, word for word', async () => {
    const { subject, html, plain } = await write();
    expect(subject).toBe('Thank you for your gift in memory of Walter Quillan');
    for (const text of [plain, seen(html)])
      for (const words of [
        'Dear Mrs Quillan,',
        'Thank you for your gift in memory of Walter Quillan.',
        'You gave £60 to the Lampwoman on 3 May 2027.',
        'Head and scarf',
        '£45',
        'The whole figure, from the ground up',
        '£15',
        sample.receipt.splitNote ?? '',
        '“Thea Quillan, for Walter”',
        sample.receipt.declaration?.wording ?? '',
        '9 Ropewalk, Brackenhythe, BK4 7HY',
        'Gift Aid adds £15',
        'number 00611',
        sample.addresses.receiptUrl,
        '01632 960 114, post@brackenhythe.example',
        'Registered charity 0000000 (invented).',
        'To complain, write to the secretary',
      ])
        expect(text).toContain(words);
  });

  it('in memory asks for nothing and leads nowhere but to the receipt', async () => {
    const { html, plain } = await write();
    const links = [...html.matchAll(/href="([^"]+)"/g)].map((match) => match[1]);
    expect(new Set(links)).toEqual(new Set([sample.addresses.receiptUrl]));
    expect(plain).not.toMatch(/give again|another gift|support us|share this|hundreds hold up/i);
  });

  it('without a dedication or a declaration says nothing of either', async () => {
    const { subject, html, plain } = await write({
      dedication: null,
      declaration: null,
      splitNote: null,
      wallWords: null,
    });
    expect(subject).toBe('Thank you for your gift to the Lampwoman');
    for (const text of [plain, seen(html)])
      expect(text).not.toMatch(/memory|honour|Gift Aid|wall of names|null|undefined/);
    expect(plain).toContain(`How the Lampwoman stands today: ${sample.addresses.siteUrl}`);
  });

  it('leaves no place unfilled and fetches nothing from anywhere', async () => {
    const { html, plain } = await write();
    expect(html + plain).not.toMatch(/\{\{|\}\}/);
    expect(html).not.toMatch(/<img|<script|<link|@import|url\(|\bsrc=/i);
    expect(html).toContain('prefers-color-scheme: dark');
    expect(html).toContain('lang="en-GB"');
  });

  it('takes whatever people write as words and never as markup', async () => {
    const evil = `<img src=x onerror=alert(1)> {{societyName}} $& </mj-text>"'`;
    const { html, plain } = await write({
      name: evil,
      greeting: evil,
      wallWords: evil,
      dedication: { kind: 'honour', name: evil },
    });
    expect(html).not.toContain('<img');
    expect(html).toContain(
      '&lt;img src=x onerror=alert(1)&gt; {{societyName}} $&amp; &lt;/mj-text&gt;&quot;&#39;',
    );
    expect(plain).toContain(evil);
  });

  it('is not written at all with an address that is no web address', async () => {
    const addresses = { ...sample.addresses, receiptUrl: 'javascript:alert(1)' };
    await expect(thanksLetter(sample.receipt, addresses)).rejects.toThrow('receiptUrl');
  });
});

describe('the letter to the family contact', () => {
  const news: DedicationNews = {
    ...z
      .object({ honouredName: z.string(), contactName: z.string(), campaignName: z.string() })
      .parse(readSample('dedication-told')),
    kind: 'memory',
    giverName: 'Thea Quillan',
    sumPence: null,
    society: { ...sample.receipt },
  };

  it('tells who gave in whose memory, and not how much', async () => {
    const { subject, html, plain } = await dedicationLetter(news);
    expect(subject).toBe('A gift in memory of Walter Quillan');
    for (const text of [plain, seen(html)]) {
      expect(text).toContain('Dear Ann Tolliver,');
      expect(text).toContain('Thea Quillan has made a gift in memory of Walter Quillan to the Lampwoman');
      expect(text).not.toContain('£');
    }
  });

  it('tells the sum when the giver said so, and no name when it is withheld', async () => {
    const { html, plain } = await dedicationLetter({ ...news, sumPence: pence(6000), giverName: null });
    for (const text of [plain, seen(html)]) {
      expect(text).toContain('The gift was £60.');
      expect(text).not.toContain('Thea');
      expect(text).toContain('Somebody who would rather not be named');
    }
  });
});

describe('queueing', () => {
  let database: TestDatabase;
  beforeAll(async () => {
    database = await cloneDatabase();
  });
  afterAll(() => database.drop());

  it('thanks for a gift once and tells its contact once', async () => {
    const giftId = '6f0f7c1e-8d5c-4a52-9a8e-2f5f0d3c1b7a';
    const at = new Date('2027-05-03T09:30:00Z');
    const thanks = {
      ...sample.addresses,
      giftId,
      receipt: sample.receipt,
      toAddress: 'thea@post.example',
      at,
    };
    for (let round = 0; round < 2; round += 1)
      await database.db.transaction(async (trx) => {
        await queueThanks(trx, thanks);
        await queueDedicationLetter(trx, {
          giftId,
          kind: 'memory',
          honouredName: 'Walter Quillan',
          contactName: 'Ann Tolliver',
          contactEmail: 'ann@post.example',
          giverName: null,
          sumPence: null,
          campaignName: 'The Lampwoman',
          society: { ...sample.receipt },
          siteUrl: sample.addresses.siteUrl,
          at,
        });
      });
    const rows: unknown = await database
      .db('mail_outbox')
      .select('kind', 'to_address', 'subject_id')
      .orderBy('kind');
    expect(rows).toEqual([
      { kind: 'dedication-told', to_address: 'ann@post.example', subject_id: giftId },
      { kind: 'gift-thanks', to_address: 'thea@post.example', subject_id: giftId },
    ]);
  });
});
