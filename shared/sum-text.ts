// Reads a sum as people write it. What can be read two ways is asked about, never guessed.
import { pence, type Pence } from './money.ts';

export type SumReading =
  | { kind: 'sum'; pence: Pence }
  | { kind: 'two-ways'; readings: readonly [Pence, Pence] }
  | { kind: 'empty' }
  | { kind: 'unreadable' };

const FULL_WIDTH_ZERO = 0xff10;

function tidy(text: string): string {
  return text
    .replace(/[\uff10-\uff19]/g, (digit) => String(digit.charCodeAt(0) - FULL_WIDTH_ZERO))
    .replace(/[\u00a0\u2000-\u200b\u202f\ufeff]/g, ' ')
    .replace(/[\u2019\u02bc\u00b4`]/g, "'")
    .trim()
    .toLowerCase();
}

const fromDigits = (pounds: string, fraction = ''): Pence =>
  pence(Number(pounds || '0') * 100 + Number(fraction.padEnd(2, '0')));

/** The number alone, without sign of currency: digits with points, commas, spaces or apostrophes. */
function readNumber(text: string): SumReading {
  const plain = text.replace(/(?<=\d)[' ](?=\d{3}(?!\d))/g, '');
  let found = /^(\d{1,9})(?:\.(\d{1,2})?)?$/.exec(plain) ?? /^()\.(\d{1,2})$/.exec(plain);
  if (found) return { kind: 'sum', pence: fromDigits(found[1] ?? '', found[2]) };
  found = /^(\d{1,3}(?:,\d{3}){2,}|\d{1,3}(?:,\d{3})+(?=\.\d{2}$))(?:\.(\d{2}))?$/.exec(plain);
  if (found) return { kind: 'sum', pence: fromDigits((found[1] ?? '').replaceAll(',', ''), found[2]) };
  // 1.234,50: the comma can only be the pence.
  found = /^(\d{1,3}(?:\.\d{3})+),(\d{2})$/.exec(plain);
  if (found) return { kind: 'sum', pence: fromDigits((found[1] ?? '').replaceAll('.', ''), found[2]) };
  // 1,000 is a thousand to everyone who writes pounds.
  found = /^(\d{1,3}),(\d{3})$/.exec(plain);
  if (found && found[1] !== '0') return { kind: 'sum', pence: fromDigits(`${found[1]}${found[2]}`) };
  // 25,00 or 25,5: pence after a comma, or a slip for 2,500?
  found = /^(\d{1,5}),(\d{1,2})$/.exec(plain);
  if (found) return twoWays(fromDigits(found[1] ?? '', found[2]), fromDigits(`${found[1]}${found[2]}`));
  // 1.000: one pound, or a thousand?
  found = /^(\d{1,3})\.(\d{3})$/.exec(plain);
  if (found) {
    if (!/0$/.test(found[2] ?? '')) return { kind: 'unreadable' };
    return twoWays(
      fromDigits(found[1] ?? '', (found[2] ?? '').slice(0, 2)),
      fromDigits(`${found[1]}${found[2]}`),
    );
  }
  return { kind: 'unreadable' };
}

function twoWays(one: Pence, other: Pence): SumReading {
  return one === other ? { kind: 'sum', pence: one } : { kind: 'two-ways', readings: [one, other] };
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
    .replace(/\/?-$/, '')
    .replace(/\.-?$/, (end) => (end === '.' ? '' : ''));
  return readNumber(bare.trim());
}
