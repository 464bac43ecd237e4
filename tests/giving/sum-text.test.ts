// Sums as people write them: met kindly, asked about when they can be read two ways, never guessed.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { formatLedger, MOST_CARD_PENCE, pence } from '#shared/money.ts';
import { readSum, type SumReading } from '#shared/sum-text.ts';

const sum = (value: number): SumReading => ({ kind: 'sum', pence: pence(value) });
const twoWays = (one: number, other: number): SumReading => ({
  kind: 'two-ways',
  readings: [pence(one), pence(other)],
});

describe('sums that everybody reads alike', () => {
  test.each([
    ['20', 2000],
    [' 20 ', 2000],
    ['20.5', 2050],
    ['20.50', 2050],
    ['20.', 2000],
    ['.50', 50],
    ['0.30', 30],
    ['007', 700],
    ['£20', 2000],
    ['£ 20', 2000],
    ['20 £', 2000],
    ['￡２０', 2000],
    ['２０．５０', 2050],
    ['GBP 20', 2000],
    ['20gbp', 2000],
    ['20 pounds', 2000],
    ['20 Quid', 2000],
    ['20 pounds sterling', 2000],
    ['20/-', 2000],
    ['20.-', 2000],
    ['20,-', 2000],
    ['50p', 50],
    ['250 pence', 250],
    ['1,000', 100_000],
    ['1,000.5', 100_050],
    ['1,234,567.80', 123_456_780],
    ['1 000', 100_000],
    ['1\u202f234.50', 123_450],
    ["1'000", 100_000],
    ['1’000', 100_000],
    ['1.234,50', 123_450],
    ['\u200b25', 2500],
  ])('%s', (text, value) => {
    expect(readSum(text)).toEqual(sum(value));
  });
});

test.each([
  ['25,00', twoWays(2500, 250_000)],
  ['25,5', twoWays(2550, 25_500)],
  ['1\u00a0000,50', twoWays(100_050, 10_005_000)],
  ['1.000', twoWays(100, 100_000)],
  ['20.000', twoWays(2000, 2_000_000)],
  ['1.230', twoWays(123, 123_000)],
])('%s can be read two ways', (text, reading) => {
  expect(readSum(text)).toEqual(reading);
});

test.each(['', '   ', '\u00a0', '\u200b'])('%j is no sum yet', (text) => {
  expect(readSum(text)).toEqual({ kind: 'empty' });
});

test.each([
  '-20',
  '−20',
  '+20',
  '(20)',
  '-',
  '£',
  '.',
  '1e3',
  '0x14',
  'twenty',
  '$20',
  '20€',
  '20 20',
  '20.125',
  '0,500',
  '1.2.3',
  '1,00,000',
  '12,3456',
  '20²',
  '½',
  'Infinity',
  'NaN',
  '9999999999',
  '£20p',
])('%s cannot be read', (text) => {
  expect(readSum(text)).toEqual({ kind: 'unreadable' });
});

const payable = fc.integer({ min: 1, max: MOST_CARD_PENCE }).map(pence);

test('every sum that can be paid is read back from every way we write it', () => {
  fc.assert(
    fc.property(payable, fc.constantFrom('', '£', 'GBP '), (value, sign) => {
      const plain = (value / 100).toFixed(2);
      expect(readSum(`${sign}${plain}`)).toEqual(sum(value));
      expect(readSum(`${sign}${formatLedger(value)}`)).toEqual(sum(value));
      if (value % 100 === 0) expect(readSum(`${sign}${value / 100}`)).toEqual(sum(value));
    }),
  );
});

test('whatever is written gives a whole sum of pence, a question or a refusal, and never throws', () => {
  const scribble = fc.string({ unit: fc.constantFrom(...'0123456789.,’ £p-kx\u00a0'.split('')) });
  fc.assert(
    fc.property(fc.oneof(scribble, fc.string()), (text) => {
      const reading = readSum(text);
      const sums =
        reading.kind === 'sum' ? [reading.pence] : reading.kind === 'two-ways' ? reading.readings : [];
      for (const one of sums) expect(Number.isSafeInteger(one) && one >= 0).toBe(true);
      if (reading.kind === 'two-ways') expect(reading.readings[0]).not.toBe(reading.readings[1]);
    }),
  );
});
