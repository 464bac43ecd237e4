// The giver's pages as they are without script: whole, truthful, and with every answer kept.
import { JSDOM } from 'jsdom';
import { describe, expect, test } from 'vitest';
import type { GiveOutcome, GiveSheet } from '#shared/giving/give-schemas.ts';
import { pence } from '#shared/money.ts';
import { CHECK, draw, PAID, problem, RECEIPT, SHEET, type Drawn } from './give-pages.ts';

const sheet = (more: Partial<GiveSheet> = {}) => ({
  'GET /api/gifts/sheet': { status: 200, body: { ...SHEET, ...more } },
});
const check = { 'GET /api/gifts/check': { status: 200, body: CHECK } };
const outcome = (more: Partial<GiveOutcome>) => ({
  'GET /api/gifts/one/outcome': { status: 200, body: { ...PAID, ...more } },
});
const look = ({ html }: Drawn) => {
  const { document } = new JSDOM(html).window;
  const text = (selector: string) => document.querySelector(selector)?.textContent?.trim() ?? null;
  const input = (id: string) => document.querySelector<HTMLInputElement>(`#${id}`);
  return { document, text, input, all: document.body.textContent ?? '' };
};

describe('the sheet', () => {
  test('is one form that posts to its own address, with nothing ticked for the giver', async () => {
    const page = await draw('/give', sheet());
    const { document, input } = look(page);
    expect(page.status).toBe(200);
    expect(page.title).toBe('Give to the Lampwoman. The Society');
    const form = document.querySelector('form');
    expect([form?.getAttribute('method'), form?.getAttribute('action')]).toEqual(['post', '/give']);
    expect(document.querySelectorAll('form .row')).toHaveLength(7);
    expect(document.querySelectorAll('input[type=checkbox][checked]')).toHaveLength(0);
    expect(input('amount-20')?.checked).toBe(true);
    expect(input('email')?.autocomplete).toBe('email');
    expect(page.html).not.toMatch(/ style=/);
  });

  test('names every input, and no id stands twice', async () => {
    const { document } = look(await draw('/give', sheet()));
    const ids = [...document.querySelectorAll('[id]')].map(({ id }) => id);
    expect(new Set(ids).size).toBe(ids.length);
    for (const input of document.querySelectorAll<HTMLInputElement>(
      'form input:not([type=hidden]), form textarea',
    ))
      expect(input.labels?.length || input.getAttribute('aria-label'), input.name).toBeTruthy();
  });

  test('passes on what the way here asked for; a sum that was written goes before one that was chosen', async () => {
    const { asked } = await draw('/give?towards=panes&amount=20&other=35', sheet());
    expect(asked.map(({ path }) => path)).toContain('/api/gifts/sheet?towards=panes&amount=other&other=35');
  });

  test('says that a part is paid for now, and chooses the whole figure in sight', async () => {
    const { input, text } = look(await draw('/give', sheet({ answers: { towards: 'footing' } })));
    expect(text('.told')).toContain('paid for now');
    expect(input('towards')?.checked).toBe(true);
  });

  test('leaves the declaration out whole while Gift Aid is not offered', async () => {
    const { document, all } = look(await draw('/give', sheet({ giftAid: null })));
    expect(document.querySelector('#declare')).toBeNull();
    expect(all).not.toContain('Gift Aid');
  });

  test('says what the wording says of choosing a part', async () => {
    expect((await draw('/give', sheet())).html).toContain('a wish within the one appeal');
    expect((await draw('/give', sheet({ partChoice: 'fund' }))).html).toContain('spent on that part alone');
  });
});

describe('pressing the button of the sheet', () => {
  const typed = { name: 'Thea Quillan', email: 'thea.post.example', wall: 'wall', wallWords: '<b>Thea</b>' };

  test('sends every answer and goes on to the check', async () => {
    const page = await draw('/give', { 'PUT /api/gifts/draft': { status: 200, body: {} } }, typed);
    expect([page.status, page.location]).toEqual([303, '/give/check']);
    expect(page.asked).toContainEqual({ method: 'PUT', path: '/api/gifts/draft', body: typed });
  });

  test('with faults leads to the sheet that names them, so that the browser’s back works', async () => {
    const refused = problem(400, 'invalid', { fields: { email: 'There is no @ in this address.' } });
    const page = await draw('/give', { ...sheet(), 'PUT /api/gifts/draft': refused }, typed);
    expect([page.status, page.location]).toEqual([303, '/give?unfinished=1']);
  });

  test('the sheet that names them counts them in words, links them and keeps every answer', async () => {
    const page = await draw(
      '/give?unfinished=1',
      sheet({ answers: { ...typed, declare: 'on', address1: '9' } }),
    );
    const { document, text, input } = look(page);
    expect(page.title).toBe('Three answers need putting right. Give to the Lampwoman. The Society');
    expect(text('.faults h2')).toBe('Three answers need putting right');
    const links = [...document.querySelectorAll('.faults a')].map((link) => link.getAttribute('href'));
    expect(links).toEqual(['#email', '#town', '#postcode']);
    for (const link of links) expect(document.querySelector(link ?? '')).not.toBeNull();
    expect(input('email')?.value).toBe('thea.post.example');
    expect(input('email')?.getAttribute('aria-invalid')).toBe('true');
    expect(input('email')?.getAttribute('aria-describedby')).toBe('email-hint email-fault');
    expect(input('wallWords')?.value).toBe('<b>Thea</b>');
    expect(input('declare')?.checked).toBe(true);
    expect(document.querySelector('.faults[autofocus][role=alert]')).not.toBeNull();
  });

  test('while the server is at fault draws the sheet with what was sent', async () => {
    const broken = { ...sheet(), 'PUT /api/gifts/draft': problem(500, 'internal') };
    const page = await draw('/give', broken, typed);
    const { text, input } = look(page);
    expect(page.status).toBe(500);
    expect(text('.faults h2')).toContain('everything you wrote is still here');
    expect(input('wallWords')?.value).toBe('<b>Thea</b>');
  });
});

describe('the check', () => {
  test('says every answer back with a way to change it, and the total', async () => {
    const page = await draw('/give/check', check);
    const { document, text, all } = look(page);
    for (const words of [
      '£60, once',
      'Walter Quillan',
      'Ann Quillan, ann@post.example. Without the sum.',
      '“Thea Quillan, for Walter”',
      'Dear Mrs Quillan',
      '9 Ropewalk, Brackenhythe, BK4 7HY',
      'By post. Not by e-mail. Not by telephone or text.',
      'You gave £60 from here a moment ago.',
      'What a shortfall means.',
      'What a surplus means.',
    ])
      expect(all).toContain(words);
    expect(all).toContain('Change Gift Aid');
    expect(text('.sums')).toBe(
      'What you pay and what it is worthYou pay today£60Gift Aid for her£15Worth to the Lampwoman£75',
    );
    expect(text('.end button')).toBe('Pay £60');
    const sheetPage = look(await draw('/give', sheet({ answers: CHECK.answers })));
    for (const link of document.querySelectorAll('.ch a')) {
      const id = link.getAttribute('href')?.replace('/give#', '') ?? '';
      expect(sheetPage.input(id), id).not.toBeNull();
    }
  });

  test.each([
    ['no-draft', '/give?again=1'],
    ['incomplete', '/give?unfinished=1'],
  ])('with %s leads back to the sheet', async (reason, location) => {
    const page = await draw('/give/check', { 'GET /api/gifts/check': problem(409, 'conflict', { reason }) });
    expect(page.location).toBe(location);
  });

  test('paying leads to the card page', async () => {
    const url = 'https://cards.example/session';
    const page = await draw(
      '/give/check',
      { 'POST /api/gifts/checkout': { status: 200, body: { url } } },
      {},
    );
    expect([page.status, page.location]).toEqual([303, url]);
  });

  test.each([
    [problem(422, 'refused', { reason: 'part-full' }), '/give?unfinished=1'],
    [problem(409, 'conflict', { reason: 'no-draft' }), '/give?again=1'],
    [problem(502, 'upstream'), '/give/check?trouble=away'],
    [problem(429, 'too-many'), '/give/check?trouble=too-many'],
  ])('a press that cannot be taken leads to the page that says why', async (refused, location) => {
    const page = await draw('/give/check', { ...check, 'POST /api/gifts/checkout': refused }, {});
    expect(page.location).toBe(location);
  });

  test('says that the card service is away, that nothing was taken, and offers to try again', async () => {
    const page = await draw('/give/check?trouble=away', check);
    expect(page.title).toContain('The card service did not answer. Nothing was taken.');
    expect(look(page).text('.faults button')).toBe('Try again');
  });
});

describe('how it ended', () => {
  const done = (more: Partial<GiveOutcome>) => draw('/give/done?gift=one', outcome(more));

  test('paid: thanks, what it builds, Gift Aid and the receipt', async () => {
    const page = await done({});
    expect(page.title).toBe('Thank you. The Society');
    for (const words of [
      'Your gift of £60 to the Lampwoman',
      'Head and scarf',
      '£15',
      'href="/receipts/abc"',
    ])
      expect(page.html).toContain(words);
  });

  test('split: both halves and why', async () => {
    const shares = [
      { name: 'Head and scarf', amountPence: pence(4000), isMeant: true },
      { name: 'Lantern frame', amountPence: pence(2000), isMeant: false },
    ];
    const { all } = look(await done({ shares, splitNote: 'The head was filled.' }));
    for (const words of ['£40: Head and scarf, as you asked', '£20: Lantern frame', 'The head was filled.'])
      expect(all).toContain(words);
  });

  test('in memory: reads rightly and asks for nothing', async () => {
    const { document, text } = look(await done({ inMemory: true }));
    expect(text('.lead')).toContain('in memory');
    const main = document.querySelector('main');
    expect(main?.querySelector('form, button, a[href^="/give"]')).toBeNull();
  });

  test('not known yet: says so, says what comes next, and looks again only when asked', async () => {
    const page = await done({ outcome: 'confirming', shares: [], receiptPath: null, receiptNumber: null });
    expect(look(page).text('h1')).toBe('Your gift is being confirmed');
    expect(page.html).toContain('href="/give/done?gift=one"');
    expect(page.html).not.toMatch(/http-equiv|Thank you/i);
  });

  test('not paid: nothing was taken, and the way to try again', async () => {
    const page = await done({ outcome: 'not-paid', shares: [], receiptPath: null, receiptNumber: null });
    expect(page.html).toContain('Nothing was taken.');
    expect(page.html).toContain('href="/give/check"');
    expect(page.html).not.toContain('Thank you');
  });

  test('a gift nobody knows of is not found', async () => {
    expect((await draw('/give/done?gift=other', {})).status).toBe(404);
    expect((await draw('/give/done', {})).status).toBe(404);
  });
});

test('a receipt is whole on one page, with the declaration as recorded and the file beside it', async () => {
  const page = await draw('/receipts/abc', { 'GET /api/receipts/abc': { status: 200, body: RECEIPT } });
  for (const words of [
    'Receipt 000613',
    '1 December 2026',
    'Walter Quillan',
    'The words that were declared.',
    'Declared by Thea Quillan, 9 Ropewalk, Brackenhythe, BK4 7HY, on 1 December 2026.',
    'Registered charity 0000000 (invented).',
    'Tell us first.',
    'href="/receipts/abc.pdf"',
  ])
    expect(page.html).toContain(words);
  expect((await draw('/receipts/none', {})).status).toBe(404);
});
