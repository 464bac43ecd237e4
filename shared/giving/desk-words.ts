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

/** Each kind as it stands alone, above the words themselves. */
export const WORDS_KIND_HEADS: Record<WordsKind, string> = {
  'wall-name': 'Words for the wall',
  memory: 'Dedication, in memory of',
  honour: 'Dedication, in honour of',
  message: 'Message to the people who build her',
};

export const WORDS_KIND_NOUNS: Record<WordsKind, string> = {
  'wall-name': 'wall words',
  memory: 'dedication',
  honour: 'dedication',
  message: 'message',
};

/** “dedication of gift 641”, “message with gift 641” */
export const wordsOfGift = (kind: WordsKind, giftNumber: number): string =>
  `${WORDS_KIND_NOUNS[kind]} ${kind === 'message' ? 'with' : 'of'} gift ${giftNumber}`;

export const DEDICATION_WORDS = { memory: 'in memory', honour: 'in honour' } as const;

export const countGifts = (count: number): string => (count === 1 ? '1 gift' : `${count} gifts`);
