// The words of the sheet that stand in more than one place: what each answer is called, and how the figure is spoken of.
import { dayOf } from '#shared/dates.ts';
import { giftAidOn } from '#shared/declarations/gift-aid-rules.ts';
import type { GiveAnswers, GiveField } from '#shared/giving/give-schemas.ts';
import { add, formatPence, type Pence } from '#shared/money.ts';

/** In the order of the sheet; the summary of what needs putting right follows it. */
export const GIVE_LABELS: Record<GiveField, string> = {
  amount: 'How much',
  other: 'Other £',
  towards: 'Towards',
  dedication: 'In memory or in honour',
  dedicationName: 'Their name',
  contactName: 'Whom we should tell',
  contactEmail: 'Their e-mail',
  contactSum: 'Tell them how much I gave',
  wall: 'The givers’ wall',
  wallWords: 'Words on the wall',
  shownWordings: 'The words of this page',
  message: 'A message to the people who build her',
  name: 'Full name',
  greeting: 'How should we greet you?',
  email: 'E-mail',
  address1: 'Address',
  address2: 'Village or district',
  town: 'Town',
  postcode: 'Postcode',
  country: 'Outside the UK',
  phone: 'Telephone',
  declare: 'Gift Aid',
  byEmail: 'By e-mail',
  byPost: 'By post',
  byPhone: 'By telephone or text',
};

export const atStart = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

const SUBJECTS: Record<string, string> = { her: 'she', him: 'he', them: 'they', it: 'it' };
/** The pronoun that does something, from the one to which something is given. */
export const subjectOf = (pronoun: string): string => SUBJECTS[pronoun] ?? 'it';

/** £20 becomes £25, at the rate of today. */
export const worthWords = (sumPence: Pence): string =>
  `${formatPence(sumPence)} becomes ${formatPence(add(sumPence, giftAidOn(sumPence, dayOf(new Date()))))}`;

/** The home address on one line, as it was written. */
export const addressLine = (answers: GiveAnswers): string =>
  [answers.address1, answers.address2, answers.town, answers.postcode].filter(Boolean).join(', ');

/** Which letters were agreed to, said both ways so that nothing is left to be guessed. */
export function consentWords(answers: GiveAnswers): string {
  const channels = [
    [answers.byEmail, 'by e-mail'],
    [answers.byPost, 'by post'],
    [answers.byPhone, 'by telephone or text'],
  ] as const;
  const said = channels.map(([tick, words]) => (tick === 'on' ? `${atStart(words)}.` : `Not ${words}.`));
  return said.sort((one, other) => Number(one.startsWith('Not')) - Number(other.startsWith('Not'))).join(' ');
}
