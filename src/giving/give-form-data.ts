// The sheet as a form sends it, and the answers with which it is drawn.
import { GIVE_FIELDS, keptAnswers, type GiveAnswers, type GiveField } from '#shared/giving/give-schemas.ts';

/** Every field as text; a choice not made and a box not ticked are empty. */
export type FormTexts = Record<GiveField, string>;

const EMPTY: FormTexts = {
  amount: '20',
  other: '',
  towards: 'whole',
  dedication: 'none',
  dedicationName: '',
  contactName: '',
  contactEmail: '',
  contactSum: '',
  wall: 'not-public',
  wallWords: '',
  name: '',
  greeting: '',
  email: '',
  address1: '',
  address2: '',
  town: '',
  postcode: '',
  country: '',
  phone: '',
  declare: '',
  byEmail: '',
  byPost: '',
  byPhone: '',
  shownWordings: '',
  message: '',
};

export const readForm = (form: FormData): GiveAnswers => keptAnswers(Object.fromEntries(form));

/** With what the sheet begins. A part that is no longer open gives way to the whole figure, and the row says so. */
export function startTexts(answers: GiveAnswers, openParts: readonly { slug: string }[]): FormTexts {
  const texts = { ...EMPTY, ...answers };
  const isOpen = openParts.some((part) => part.slug === texts.towards);
  return {
    ...texts,
    towards: isOpen ? texts.towards : 'whole',
    // The box says “outside the UK”, so that the usual answer is the unticked one.
    country: texts.country === 'other' ? 'other' : '',
  };
}

/** What stands in a form already on the page, typed perhaps before the script arrived. */
export function typedBefore(formId: string): FormTexts | undefined {
  if (typeof document === 'undefined') return undefined;
  const form = document.getElementById(formId);
  if (!(form instanceof HTMLFormElement)) return undefined;
  const typed = keptAnswers(Object.fromEntries(new FormData(form)));
  const texts = { ...EMPTY };
  for (const field of GIVE_FIELDS) texts[field] = typed[field] ?? '';
  return texts;
}
