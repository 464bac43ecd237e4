// The one module that knows money: whole pence in, whole pence out, shares that sum to the whole.
import { z } from 'zod';

/** Whole pence, a safe integer. 123450 is £1,234.50. */
export type Pence = number & { readonly __unit: 'pence' };

/** The zod schema of a sum in pence; the only place where a number becomes `Pence`. */
export const penceSchema = z.int().transform((value): Pence => value as Pence);

export function pence(value: number): Pence {
  if (!Number.isSafeInteger(value)) throw new RangeError(`${value} is not a whole number of pence`);
  return value as Pence;
}

export const NOTHING = pence(0);
/** The card service's own bounds for a payment in sterling. */
export const LEAST_CARD_PENCE = pence(30);
export const MOST_CARD_PENCE = pence(9_999_999);

export const add = (...sums: readonly Pence[]): Pence => pence(sums.reduce((total, one) => total + one, 0));
export const subtract = (from: Pence, what: Pence): Pence => pence(from - what);
export const least = (...sums: readonly Pence[]): Pence => pence(Math.min(...sums));
export const most = (...sums: readonly Pence[]): Pence => pence(Math.max(...sums));
export const negate = (sum: Pence): Pence => pence(0 - sum);

/**
 * Splits a sum by weights so that the shares add up to the whole: every share is rounded down and the
 * left-over pence go to the largest remainders, the earlier first.
 */
export function share(total: Pence, weights: readonly number[]): Pence[] {
  const whole = BigInt(total);
  const parts = weights.map((weight) => BigInt(weight));
  const sum = parts.reduce((a, b) => a + b, 0n);
  if (sum <= 0n || parts.some((part) => part < 0n)) throw new RangeError('shares need weights above nothing');
  const floors = parts.map((part) => (whole * part) / sum);
  let left = whole - floors.reduce((a, b) => a + b, 0n);
  const order = parts
    .map((part, index) => ({ index, remainder: (whole * part) % sum }))
    .sort((a, b) => (a.remainder === b.remainder ? a.index - b.index : a.remainder > b.remainder ? -1 : 1));
  for (const { index } of order) {
    if (left === 0n) break;
    floors[index] = (floors[index] ?? 0n) + 1n;
    left -= 1n;
  }
  return floors.map((one) => pence(Number(one)));
}

/** `per` for each `of`, to the nearest penny, half a penny up: 25 per 100 of £20 is £5. */
export function applyRate(sum: Pence, rate: { per: number; of: number }): Pence {
  if (sum < 0) throw new RangeError('a rate is applied to a sum, not to a debt');
  const twice = 2n * BigInt(sum) * BigInt(rate.per) + BigInt(rate.of);
  return pence(Number(twice / (2n * BigInt(rate.of))));
}

const wholePounds = new Intl.NumberFormat('en-GB', {
  style: 'currency',
  currency: 'GBP',
  minimumFractionDigits: 0,
  maximumFractionDigits: 0,
});
const poundsAndPence = new Intl.NumberFormat('en-GB', { style: 'currency', currency: 'GBP' });
const ledger = new Intl.NumberFormat('en-GB', { minimumFractionDigits: 2, maximumFractionDigits: 2 });

/** £1,234.50, and £1,234 when the pence are none. */
export function formatPence(sum: Pence): string {
  return sum % 100 === 0 ? wholePounds.format(sum / 100) : poundsAndPence.format(sum / 100);
}

/** 1,234.50 for a ruled column whose head names the currency. */
export const formatLedger = (sum: Pence): string => ledger.format(sum / 100);

/** 1234.50: a plain number, so that a spreadsheet can add it up. */
export const formatPlain = (sum: Pence): string => (sum / 100).toFixed(2);
