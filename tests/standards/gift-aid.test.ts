// Declarations and the arithmetic of Gift Aid, against the published rules.
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { giftAidOn } from '#shared/declarations/gift-aid-rules.ts';
import { DECLARATION_NOTICE, declarationWording } from '#shared/declarations/statutory-wording.ts';
import { pence } from '#shared/money.ts';
import { findShared } from '#tests/support/shared-facts.ts';

const DAY = '2027-05-03';

// HMRC, Charities: detailed guidance notes, chapter 6, paragraph 6.1.3: tax is the gift × basic rate ÷ (100 − basic rate).
describe('25p in every pound at the basic rate of 20 per cent', () => {
  test.each([
    [100, 25],
    [2_000, 500],
    [6_000, 1_500],
    [10_000, 2_500],
    [1_234_56, 30_864],
  ])('%i pence bring %i', (gift, tax) => {
    expect(giftAidOn(pence(gift), DAY)).toBe(tax);
  });
});

const rowsSchema = z.array(
  z.looseObject({
    id: z.string(),
    topic: z.string(),
    inputs: z.looseObject({}),
    expected: z.looseObject({}),
    source_title: z.string(),
  }),
);
const file = findShared('facts/rules-examples.json');
const examples = file
  ? rowsSchema
      .parse(JSON.parse(readFileSync(file, 'utf8')))
      .filter((row) => row.topic === 'gift_aid_gross_up')
  : [];
const sumText = z.string().regex(/^\d+\.\d\d$/);
const toPence = (text: unknown) => pence(Math.round(Number(sumText.parse(text)) * 100));

describe.skipIf(examples.length === 0)('the worked examples that apply', () => {
  test.each(examples.map((row) => [row.id, row] as const))('%s', (_id, row) => {
    const gift = toPence(row.inputs.gift ?? row.inputs.gifts_total);
    expect(giftAidOn(gift, DAY)).toBe(toPence(row.expected.tax));
  });
});

// The Donations to Charity by Individuals (Appropriate Declarations) Regulations 2016, SI 2016/1195, and HMRC's
// guidance, chapter 3, section 3.6: what a declaration must contain.
describe('the declaration', () => {
  const words = declarationWording('Brackenhythe Heritage Society');
  test.each([
    ['names the charity', /Brackenhythe Heritage Society/],
    ['says that the gifts are to be Gift Aid', /Treat as Gift Aid donations/],
    [
      'identifies the gifts it covers: this one, the past four years, those to come',
      /this gift, any gift I made .* in the past four years, and any I make from now on/,
    ],
    ['says the giver pays UK Income Tax or Capital Gains Tax', /I pay UK Income Tax or Capital Gains Tax/],
    [
      'says the tax must cover what all charities claim',
      /all charities together claim as Gift Aid on my gifts in that year/,
    ],
    ['says who pays a difference', /I must pay the difference myself/],
    [
      'says it is the giver’s own money, not a collection’s or a company’s',
      /my own money.*not from a collection, a raffle or a company/,
    ],
  ])('%s', (_what, pattern) => {
    expect(words).toMatch(pattern);
  });
  test('is told beside what must be told to the society later', () => {
    expect(DECLARATION_NOTICE).toMatch(/stop this.*name or home address changes.*no longer pay enough tax/);
  });
});
