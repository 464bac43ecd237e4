// The plain words in which the desk and its exports say how a gift stands.
import type { ThanksState, WordsKind } from './desk-schemas.ts';

/** What still waits is said plainly; only what is done is stamped. */
export const THANKS_WORDS: Record<ThanksState, string> = {
  thanked: 'thanked',
  'on-its-way': 'on its way',
  'trying-again': 'trying again',
  failed: 'came back',
  uncertain: 'perhaps sent',
  'held-back': 'not to be written to',
  left: 'left unsent',
  'not-written': 'not yet written',
};

export const WORDS_KIND_WORDS: Record<WordsKind, string> = {
  'wall-name': 'for the wall',
  memory: 'in memory of',
  honour: 'in honour of',
  message: 'message to the society',
};

export const DEDICATION_WORDS = { memory: 'in memory', honour: 'in honour' } as const;

export const countGifts = (count: number): string => (count === 1 ? '1 gift' : `${count} gifts`);
