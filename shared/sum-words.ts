// A sum said in words, so that a slip of the finger is heard before it is paid.
import { ToWords } from 'to-words/en-GB';
import { pence, type Pence } from './money.ts';

const words = new ToWords({ converterOptions: { useAnd: true } });
const TENS_AND_UNITS =
  /\b(twenty|thirty|forty|fifty|sixty|seventy|eighty|ninety) (one|two|three|four|five|six|seven|eight|nine)\b/g;
const inWords = (count: number): string =>
  words.convert(count).toLowerCase().replace(TENS_AND_UNITS, '$1-$2');

/** £1,234.50 is “one thousand two hundred and thirty-four pounds and fifty pence”. */
export function sumInWords(sum: Pence): string {
  const pounds = Math.floor(sum / 100);
  const rest = pence(sum % 100);
  const poundWords = `${inWords(pounds)} ${pounds === 1 ? 'pound' : 'pounds'}`;
  const penceWords = `${inWords(rest)} ${rest === 1 ? 'penny' : 'pence'}`;
  if (rest === 0) return poundWords;
  return pounds === 0 ? penceWords : `${poundWords} and ${penceWords}`;
}
