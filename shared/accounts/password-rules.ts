// What a new password must be: long enough, and nothing that is tried first. No rules of composition.
import { z } from 'zod';
import { COMMON_STEMS } from './common-passwords.ts';

export const MIN_PASSWORD_LENGTH = 8;
export const ADVISED_PASSWORD_LENGTH = 15;
/** Hashing is dear on purpose; a longer text would let a stranger buy our time cheaply. */
export const MAX_PASSWORD_LENGTH = 1024;

const TRIMMINGS = /^[\d\W_]+|[\d\W_]+$/g;
const DISGUISES: Readonly<Record<string, string>> = {
  '0': 'o',
  '1': 'l',
  '3': 'e',
  '4': 'a',
  '5': 's',
  '7': 't',
  '@': 'a',
  $: 's',
  '!': 'i',
};
const undisguise = (word: string): string =>
  [...word].map((character) => DISGUISES[character] ?? character).join('');

const hasOneCharacter = (word: string): boolean => new Set(word).size <= 2;
const isRun = (word: string): boolean =>
  ['01234567890123456789', '98765432109876543210', 'abcdefghijklmnopqrstuvwxyz'].some((run) =>
    run.includes(word),
  );

/** Whether a guesser tries it early: a common word, with figures or signs hung on it or put for letters. */
export function isCommonPassword(password: string): boolean {
  const word = password.normalize('NFKC').toLowerCase();
  const bare = word.replaceAll(TRIMMINGS, '');
  const guesses = [word, bare, undisguise(word), undisguise(bare), undisguise(word.replace(/[\d\W_]+$/, ''))];
  return hasOneCharacter(word) || isRun(word) || guesses.some((guess) => COMMON_STEMS.has(guess));
}

const lengthOf = (password: string): number => [...password].length;

export const newPasswordSchema = z
  .string('Write a new password.')
  .max(MAX_PASSWORD_LENGTH, `Use at most ${MAX_PASSWORD_LENGTH} characters.`)
  .refine(
    (password) => lengthOf(password) >= MIN_PASSWORD_LENGTH,
    `Use at least ${MIN_PASSWORD_LENGTH} characters; ${ADVISED_PASSWORD_LENGTH} or more is better.`,
  )
  .refine(
    (password) => !isCommonPassword(password),
    'That is one of the first passwords a guesser tries. Choose another; four words that do not belong together are good.',
  );

/** One's own name or address is no secret to those who know it. */
export function repeatsPerson(password: string, person: { name: string; email: string }): boolean {
  const word = password.toLowerCase();
  const bare = word.replaceAll(TRIMMINGS, '');
  const email = person.email.toLowerCase();
  const names = person.name.toLowerCase().split(/\s+/);
  return [email, email.split('@')[0] ?? '', names.join(''), names.join(' '), ...names]
    .filter((part) => part.length >= 4)
    .some((part) => part === word || part === bare);
}
