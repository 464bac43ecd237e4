// Money: whole pence, shares that sum to the whole, rounding by name.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { add, applyRate, formatLedger, formatPence, pence, share } from '#shared/money.ts';
import { sumInWords } from '#shared/sum-words.ts';

test('a number that is not whole pence is refused', () => {
  expect(() => pence(0.5)).toThrow(RangeError);
  expect(() => pence(Number.NaN)).toThrow(RangeError);
  expect(() => pence(2 ** 53)).toThrow(RangeError);
});

test('sums are written as people read them', () => {
  expect([0, 5, 100, 123_450, 4_128_000].map((sum) => formatPence(pence(sum)))).toEqual([
    '£0',
    '£0.05',
    '£1',
    '£1,234.50',
    '£41,280',
  ]);
  expect(formatLedger(pence(123_400))).toBe('1,234.00');
});

test('sums are said in words', () => {
  expect(sumInWords(pence(123_450))).toBe('one thousand two hundred and thirty-four pounds and fifty pence');
  expect(sumInWords(pence(9_999_999))).toBe(
    'ninety-nine thousand nine hundred and ninety-nine pounds and ninety-nine pence',
  );
  expect(sumInWords(pence(2_000_000))).toBe('twenty thousand pounds');
  expect(sumInWords(pence(101))).toBe('one pound and one penny');
  expect(sumInWords(pence(50))).toBe('fifty pence');
});

describe('shares', () => {
  test('sum to the whole and differ from the exact share by less than a penny', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 1e9 }),
        fc.array(fc.integer({ min: 0, max: 1e6 }), { minLength: 1, maxLength: 9 }),
        (total, weights) => {
          const sum = weights.reduce((a, b) => a + b, 0);
          fc.pre(sum > 0);
          const shares = share(pence(total), weights);
          expect(add(...shares)).toBe(total);
          shares.forEach((one, index) =>
            expect(Math.abs(one - (total * (weights[index] ?? 0)) / sum)).toBeLessThan(1),
          );
        },
      ),
    );
  });

  test('the case that rounding each share loses a penny on', () => {
    expect(share(pence(1), [598, 598])).toEqual([1, 0]);
  });
});

test('a rate is applied to the nearest penny, half a penny up', () => {
  expect(applyRate(pence(2_000), { per: 25, of: 100 })).toBe(500);
  expect(applyRate(pence(2), { per: 25, of: 100 })).toBe(1);
  expect(applyRate(pence(1), { per: 25, of: 100 })).toBe(0);
});
