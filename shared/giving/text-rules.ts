// What may stand in a line that a giver wrote: addresses, postcodes, names, and signs nobody can see.

/** Signs that a database cannot keep or that nobody can see; they are dropped, never complained about. */
const UNKEEPABLE = /[\0\u00ad\u200b\u2060\ufeff]|\p{Surrogate}/gu;
const TURNS_READING = '\\u202a-\\u202e\\u2066-\\u2069';
const HIDDEN_IN_LINE = new RegExp(`[\\p{Cc}\\u2028\\u2029${TURNS_READING}]`, 'u');
/** A message may have lines; it may not turn the reading direction of what follows it. */
const HIDDEN_IN_MESSAGE = new RegExp(`(?![\\n\\r\\t])\\p{Cc}|[${TURNS_READING}]`, 'u');
/** One mark of a plain address: no space, no hidden sign, nothing that mail programs read as a list or a name. */
const EMAIL_MARK = '[^\\s@,;:<>()[\\]\\\\"\\p{Cc}\\p{Cf}]';
const EMAIL = new RegExp(`^${EMAIL_MARK}+@(?!\\.)${EMAIL_MARK}+$`, 'u');
const DOTTED = /@[^.]+(?:\.[^.]+)+$/;
const POSTCODE = /^[A-Z]{1,2}\d[A-Z\d]?\d[A-Z]{2}$/;
const TITLE = /^(?:(?:mr|mrs|ms|miss|mx|dr|prof|professor|sir|dame|lady|lord|rev|revd|reverend)\.?\s+)+/i;
const NOT_HOME = /^\s*(?:p\.?\s*o\.?\s*box\b|c\/o\b|care of\b)/i;

export const keepable = (text: string): string => text.replace(UNKEEPABLE, '');
export const hasHiddenSigns = (line: string): boolean => HIDDEN_IN_LINE.test(line);
export const hasHiddenSignsInMessage = (words: string): boolean => HIDDEN_IN_MESSAGE.test(words);

const graphemes = new Intl.Segmenter('en-GB', { granularity: 'grapheme' });
/** Letters as a reader counts them: an accent belongs to its letter. */
export const countLetters = (words: string): number => [...graphemes.segment(words.trim())].length;

/** What is wrong with an address for mail, in words that say what to do; null when it is fine. */
export function emailFault(address: string): string | null {
  if (address.length > 254) return 'This address is too long. Write one of at most 254 letters.';
  if (!address.includes('@')) return 'There is no @ in this address. Write it like name@post.example.';
  return EMAIL.test(address) && DOTTED.test(address)
    ? null
    : 'Write one address only, like name@post.example.';
}

/** A UK postcode in capitals with its one space, or null. An O written for the nought is met kindly. */
export function tidyPostcode(text: string): string | null {
  const bare = text
    .normalize('NFKC')
    .toUpperCase()
    .replaceAll(/[^A-Z0-9]/g, '')
    .replace(/O(?=[A-Z]{2}$)/, '0');
  return POSTCODE.test(bare) ? `${bare.slice(0, -3)} ${bare.slice(-3)}` : null;
}

/** A declaration needs a first name or an initial beside the surname; a title is neither. */
export const isWholeName = (name: string): boolean => /\S[\s.]+\S/.test(name.replace(TITLE, ''));

/** A box or somebody else's care is no home address. */
export const isHomeAddress = (firstLine: string): boolean => !NOT_HOME.test(firstLine);
