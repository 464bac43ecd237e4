// Reads a sum as people write it. What can be read two ways is asked about, never guessed.
import { pence, type Pence } from './money.ts';

export type SumReading =
  | { kind: 'sum'; pence: Pence }
  | { kind: 'two-ways'; readings: readonly [Pence, Pence] }
  | { kind: 'empty' }
  | { kind: 'unreadable' };

/** How far the full-width signs of an East Asian keyboard stand from the plain ones. */
const FULL_WIDTH_SHIFT = 0xfee0;

function tidy(text: string): string {
  return text
    .replace(/[\uff01-\uff5e]/g, (sign) => String.fromCharCode(sign.charCodeAt(0) - FULL_WIDTH_SHIFT))
    .replace(/\uffe1/g, '£')
    .replace(/[\u200b\u2060\ufeff]/g, '')
    .replace(/[\u00a0\u2000-\u200a\u202f]/g, ' ')
    .replace(/[\u2018\u2019\u02bc\u00b4`]/g, "'")
    .trim()
    .toLowerCase();
}

const fromDigits = (pounds: string, fraction = ''): Pence =>
  pence(Number(pounds || '0') * 100 + Number(fraction.padEnd(2, '0')));

const sum = (pounds: string, fraction?: string): SumReading => ({
  kind: 'sum',
  pence: fromDigits(pounds, fraction),
});

function twoWays(one: Pence, other: Pence): SumReading {
  return one === other ? { kind: 'sum', pence: one } : { kind: 'two-ways', readings: [one, other] };
}

/** What everybody reads alike: 25, 25.5, .50, 1,000, 1,234,567.80 and 1.234,50. */
function readPlain(text: string): SumReading | undefined {
  const plain = /^(\d{1,9})(?:\.(\d{1,2})?)?$/.exec(text) ?? /^()\.(\d{1,2})$/.exec(text);
  if (plain) return sum(plain[1] ?? '', plain[2]);
  const commas = /^([1-9]\d{0,2}(?:,\d{3}){1,2})(?:\.(\d{1,2})?)?$/.exec(text);
  if (commas) return sum((commas[1] ?? '').replaceAll(',', ''), commas[2]);
  // 1.234,50: the comma can only be the pence.
  const points = /^([1-9]\d{0,2}(?:\.\d{3}){1,2}),(\d{2})$/.exec(text);
  return points ? sum((points[1] ?? '').replaceAll('.', ''), points[2]) : undefined;
}

/** The number alone, without sign of currency: digits with points, commas, spaces or apostrophes. */
function readNumber(text: string): SumReading {
  const together = text.replace(/(?<=\d)[' ](?=\d{3}(?!\d))/g, '');
  const plain = readPlain(together);
  if (plain) return plain;
  // 25,00 or 25,5: pence after a comma, or a slip for 2,500?
  const comma = /^(\d{1,5}),(\d{1,2})$/.exec(together);
  if (comma)
    return twoWays(fromDigits(comma[1] ?? '', comma[2]), fromDigits(`${comma[1] ?? ''}${comma[2] ?? ''}`));
  // 1.000: one pound, or a thousand? Tenths of a penny are nobody's sum.
  const point = /^(\d{1,3})\.(\d{2})0$/.exec(together);
  if (point)
    return twoWays(fromDigits(point[1] ?? '', point[2]), fromDigits(`${point[1] ?? ''}${point[2] ?? ''}0`));
  return { kind: 'unreadable' };
}

/** Reads “£20”, “20 pounds”, “1,000.50”, “50p”, “20 gbp”. Signs, exponents and hexadecimal are unreadable. */
export function readSum(text: string): SumReading {
  const tidied = tidy(text);
  if (tidied === '') return { kind: 'empty' };
  const inPence = /^(\d{1,7})\s*(?:p|pence|pee)$/.exec(tidied);
  if (inPence) return { kind: 'sum', pence: pence(Number(inPence[1])) };
  const bare = tidied
    .replace(/^(?:£|gbp)\s*/, '')
    .replace(/\s*(?:£|gbp|pounds?|quid|sterling)(?:\s+sterling)?$/, '')
    .replace(/(?<=\d)(?:[.,/]?-|\.)$/, '');
  return readNumber(bare.trim());
}
