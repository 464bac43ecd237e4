// The giving pages drawn on the server, with an API in front of which each test puts its own answers.
import type { GiveCheck, GiveOutcome, GiveSheet, Receipt } from '#shared/giving/give-schemas.ts';
import { pence } from '#shared/money.ts';
import { giveFormSchema } from '#shared/giving/give-schemas.ts';
import { render } from '#src/entry-server.tsx';

export type Answer = { status: number; body: unknown };
export type Asked = { method: string; path: string; body?: unknown };

export const problem = (status: number, code: string, extra: object = {}): Answer => ({
  status,
  body: { type: 'about:blank', title: 'No', status, code, ...extra },
});

export const SHEET: GiveSheet = {
  campaignName: 'The Lampwoman',
  pronoun: 'her',
  leastPence: pence(30),
  stillNeededPence: pence(4_272_000),
  openParts: [
    { slug: 'head-and-scarf', name: 'Head and scarf', stillNeededPence: pence(939_000) },
    { slug: 'panes', name: 'The 24 panes', stillNeededPence: pence(1_417_500) },
  ],
  partChoice: 'wish',
  giftAid: { wording: 'The words that are declared.', notice: 'The notice beside them.' },
  consentWording: 'You may write to me.',
  whatSumsBuy: '£5 is one peg.',
  answers: {},
};

export const CHECK: GiveCheck = {
  campaignName: 'The Lampwoman',
  pronoun: 'her',
  sumPence: pence(6000),
  giftAidPence: pence(1500),
  isDeclared: true,
  giftAidOffered: true,
  towards: { slug: 'head-and-scarf', name: 'Head and scarf', stillNeededPence: pence(939_000) },
  answers: giveFormSchema.parse({
    amount: '60',
    towards: 'head-and-scarf',
    dedication: 'memory',
    dedicationName: 'Walter Quillan',
    contactName: 'Ann Quillan',
    contactEmail: 'ann@post.example',
    wall: 'wall',
    wallWords: 'Thea Quillan, for Walter',
    name: 'Thea Quillan',
    greeting: 'Mrs Quillan',
    email: 'thea.quillan@post.example',
    address1: '9 Ropewalk',
    town: 'Brackenhythe',
    postcode: 'BK4 7HY',
    declare: 'on',
    byPost: 'on',
    message: 'First line\nsecond line',
  }),
  saidBack: ['You gave £60 from here a moment ago.'],
  appealVersion: 1,
  onShortfall: 'What a shortfall means.',
  onSurplus: 'What a surplus means.',
};

export const PAID: GiveOutcome = {
  outcome: 'paid',
  campaignName: 'The Lampwoman',
  pronoun: 'her',
  sumPence: pence(6000),
  giftAidPence: pence(1500),
  shares: [{ name: 'Head and scarf', amountPence: pence(6000), isMeant: true }],
  splitNote: null,
  email: 'thea.quillan@post.example',
  receiptNumber: '000613',
  receiptPath: '/receipts/abc',
  inMemory: false,
};

export const RECEIPT: Receipt = {
  number: '000613',
  givenOn: '1 December 2026',
  campaignName: 'The Lampwoman',
  name: 'Thea Quillan',
  greeting: 'Mrs Quillan',
  sumPence: pence(6000),
  shares: PAID.shares,
  splitNote: null,
  dedication: { kind: 'memory', name: 'Walter Quillan' },
  wallWords: null,
  declaration: {
    wording: 'The words that were declared.',
    name: 'Thea Quillan',
    address: '9 Ropewalk, Brackenhythe, BK4 7HY',
    givenOn: '1 December 2026',
    giftAidPence: pence(1500),
  },
  societyName: 'Brackenhythe Heritage Society',
  societyAddress: 'Staithe House',
  registrationStatement: 'Registered charity 0000000 (invented).',
  contact: 'Write to us to change anything.',
  complaints: 'Tell us first.',
};

export type Drawn = {
  status: number;
  location: string | null;
  title: string;
  html: string;
  asked: readonly Asked[];
};

/** @param answers by method and path, the query left out */
export async function draw(
  path: string,
  answers: Record<string, Answer>,
  form?: Record<string, string>,
): Promise<Drawn> {
  const asked: Asked[] = [];
  const society = { name: 'The Society', addressLine: '', phone: '', email: '', charityNumber: '' };
  const all: Record<string, Answer> = {
    'GET /api/society': { status: 200, body: { ...society, registrationStatement: '', complaints: '' } },
    ...answers,
  };
  const request = new Request(`http://site.example${path}`, {
    ...(form && { method: 'POST', body: new URLSearchParams(form) }),
  });
  const page = await render(request, ({ method, path: asking, body }) => {
    asked.push({ method, path: asking, ...(body !== undefined && { body }) });
    const answer = all[`${method} ${asking.replace(/\?.*/, '')}`] ?? problem(404, 'not-found');
    return Promise.resolve({ status: answer.status, text: JSON.stringify(answer.body) });
  });
  if (page instanceof Response)
    return { status: page.status, location: page.headers.get('location'), title: '', html: '', asked };
  // React marks where one text ends and the next begins; a reader does not see it.
  const html = page.html.replaceAll('<!-- -->', '');
  const title = /<title>(.*)<\/title>/.exec(page.head)?.[1] ?? '';
  return { status: page.status, location: null, title, html, asked };
}
