// What a giver is asked on the one sheet, checked the same way in the browser and on the server.
import { z } from 'zod';
import { formatPence, MOST_CARD_PENCE, NOTHING, penceSchema, type Pence } from '#shared/money.ts';
import { readSum, type SumReading } from '#shared/sum-text.ts';
import {
  countLetters,
  emailFault,
  hasHiddenSigns,
  hasHiddenSignsInMessage,
  isHomeAddress,
  isWholeName,
  keepable,
  tidyPostcode,
} from './text-rules.ts';

export { emailFault, tidyPostcode } from './text-rules.ts';

export const GIFT_CHOICES = ['5', '20', '60', 'other'] as const;
export const DEDICATIONS = ['none', 'memory', 'honour'] as const;
/** Where a giver's name may be seen. */
export const NAME_CHOICES = ['wall', 'not-public', 'treasurer-only'] as const;
export const WALL_LETTERS = 40;
export const MESSAGE_LETTERS = 600;

const text = () => z.string().overwrite(keepable).trim();
const line = (most: number, words: string) => text().max(most, `${words} Use at most ${most} letters.`);
const tick = z.enum(['on', '']).default('');

/** Every field of the sheet as a form sends it: text. A tick box sends `on` or nothing. */
export const giveFormSchema = z.strictObject({
  amount: z.enum(GIFT_CHOICES, 'Choose £5, £20, £60 or write another sum.').default('20'),
  other: line(30, 'Write the sum in pounds, in figures.').default(''),
  towards: text().max(80, 'Choose from the list what your gift is for.').default('whole'),
  dedication: z.enum(DEDICATIONS, 'Choose “In memory of”, “In honour of” or “Neither”.').default('none'),
  dedicationName: line(120, 'Write the name.').default(''),
  contactName: line(120, 'Write the name.').default(''),
  contactEmail: line(254, 'Write the address.').default(''),
  contactSum: tick,
  wall: z.enum(NAME_CHOICES, 'Choose who may see your name.').default('not-public'),
  // Its letters are counted as a reader counts them, in checkWords; this bound is for the machine.
  wallWords: line(WALL_LETTERS * 5, 'Make the words shorter.').default(''),
  name: line(200, 'Write your name.').default(''),
  greeting: line(120, 'Write how we should greet you.').default(''),
  email: line(254, 'Write your address.').default(''),
  address1: line(120, 'Write the line.').default(''),
  address2: line(120, 'Write the line.').default(''),
  town: line(80, 'Write the town.').default(''),
  postcode: line(12, 'Write the postcode.').default(''),
  country: z.enum(['GB', 'other']).default('GB'),
  phone: line(30, 'Write the number.').default(''),
  declare: tick,
  byEmail: tick,
  byPost: tick,
  byPhone: tick,
  /** The versions of declaration and consent that stood on the sheet, as `declaration.consent`; never typed. */
  shownWordings: line(20, 'Load the page again.').default(''),
  message: line(MESSAGE_LETTERS, 'Make the message shorter.').default(''),
});
export type GiveForm = z.input<typeof giveFormSchema>;
export type GiveFormFilled = z.output<typeof giveFormSchema>;
export type GiveField = keyof GiveFormFilled;
export const GIVE_FIELDS: readonly GiveField[] = giveFormSchema.keyof().options;

/** Answers as they were typed, right or wrong; a field left empty is left out. */
export const giveAnswersSchema = z.partialRecord(giveFormSchema.keyof(), z.string());
export type GiveAnswers = z.infer<typeof giveAnswersSchema>;
const MOST_KEPT_LETTERS = 2000;

/** Whatever can be kept of what was sent, so that a wrong answer comes back to be put right. */
export function keptAnswers(input: unknown): GiveAnswers {
  const sent = z.record(z.string(), z.unknown()).safeParse(input);
  const kept: GiveAnswers = {};
  if (!sent.success) return kept;
  for (const field of GIVE_FIELDS) {
    const value = sent.data[field];
    if (typeof value === 'string' && value !== '') kept[field] = keepable(value.slice(0, MOST_KEPT_LETTERS));
  }
  return kept;
}

export type SumBounds = { leastPence: Pence; mostPence?: Pence };

/** The words that ask for a better sum; null when the reading can be taken. */
function sumFault(reading: SumReading, bounds: SumBounds): string | null {
  const most = bounds.mostPence ?? MOST_CARD_PENCE;
  switch (reading.kind) {
    case 'empty':
      return 'Write how much you would like to give, in pounds.';
    case 'unreadable':
      return 'We cannot read this as a sum. Write it like 25 or 25.50.';
    case 'two-ways': {
      const [one, other] = reading.readings;
      return `Do you mean ${formatPence(one)} or ${formatPence(other)}? Write it like ${(one / 100).toFixed(2)} or ${(other / 100).toFixed(2)}.`;
    }
    case 'sum':
      if (reading.pence < bounds.leastPence)
        return `The least we can take by card is ${formatPence(bounds.leastPence)}. Write a larger sum.`;
      if (reading.pence > most)
        return `The most we can take by card is ${formatPence(most)}. For more, please telephone us.`;
      return null;
  }
}

/** The sum chosen or written, or the words that ask for a better one. */
export function chosenSum(
  form: Pick<GiveFormFilled, 'amount' | 'other'>,
  bounds: SumBounds,
): { pence: Pence } | { fault: string } {
  const written = readSum(form.other);
  const reading = form.amount === 'other' ? written : readSum(form.amount);
  if (form.amount !== 'other' && written.kind !== 'empty') {
    const isSame = written.kind === 'sum' && reading.kind === 'sum' && written.pence === reading.pence;
    // Without script a written sum does not choose itself. Which of the two is meant is not ours to say.
    if (!isSame)
      return {
        fault: `You chose £${form.amount} and also wrote “${form.other}”. Choose Other to give what you wrote, or clear it.`,
      };
  }
  const fault = sumFault(reading, bounds);
  if (fault !== null) return { fault };
  return { pence: reading.kind === 'sum' ? reading.pence : NOTHING };
}

type Context = z.RefinementCtx<GiveFormFilled>;
const ask = (ctx: Context, field: GiveField, words: string) =>
  ctx.addIssue({ code: 'custom', path: [field], message: words });

function checkAddress(form: GiveFormFilled, ctx: Context): void {
  const isDeclared = form.declare === 'on';
  const isUk = form.country === 'GB';
  if (isUk && form.postcode && !tidyPostcode(form.postcode))
    ask(
      ctx,
      'postcode',
      'We cannot read this as a UK postcode. Write it like BK4 7HY, or tick that you live outside the UK.',
    );
  if (isDeclared && !isHomeAddress(form.address1))
    ask(ctx, 'address1', 'A declaration needs your home address. A box or another’s care will not do.');
  if (!isDeclared && form.byPost !== 'on') return;
  const why = isDeclared ? 'A declaration needs your home address.' : 'We need it to write to you by post.';
  if (!form.address1) ask(ctx, 'address1', `Write the first line of your address. ${why}`);
  if (!form.town) ask(ctx, 'town', `Write the town. ${why}`);
  if (isUk && !form.postcode)
    ask(
      ctx,
      'postcode',
      isDeclared
        ? 'Write your postcode. The tax office refuses a declaration without one.'
        : `Write your postcode. ${why}`,
    );
}

function checkDetails(form: GiveFormFilled, ctx: Context): void {
  if (!form.name) ask(ctx, 'name', 'Write your full name.');
  else if (form.declare === 'on' && !isWholeName(form.name))
    ask(ctx, 'name', 'A declaration needs your first name or initial and your surname.');
  const emailWords = form.email
    ? emailFault(form.email)
    : 'Write your e-mail address. The receipt goes there.';
  if (emailWords) ask(ctx, 'email', emailWords);
  checkAddress(form, ctx);
  if (form.byPhone === 'on' && !/(?:\d\D*){6}/.test(form.phone))
    ask(ctx, 'phone', 'Write your telephone number, or untick the telephone below.');
}

function checkDedication(form: GiveFormFilled, ctx: Context): void {
  if (form.dedication === 'none') return;
  if (!form.dedicationName) ask(ctx, 'dedicationName', 'Write the name, or choose “Neither”.');
  const emailWords = form.contactEmail ? emailFault(form.contactEmail) : null;
  if (emailWords) ask(ctx, 'contactEmail', emailWords);
  if (form.contactEmail && !form.contactName)
    ask(ctx, 'contactName', 'Write whom we should tell, or leave out their e-mail.');
  if (form.contactName && !form.contactEmail)
    ask(ctx, 'contactEmail', 'Write where we should tell them, or leave out their name.');
}

function checkWords(form: GiveFormFilled, ctx: Context): void {
  checkDedication(form, ctx);
  if (form.wall === 'wall' && !form.wallWords)
    ask(ctx, 'wallWords', 'Write the words for the wall, or leave your name off.');
  const letters = countLetters(form.wallWords);
  if (form.wall === 'wall' && letters > WALL_LETTERS)
    ask(ctx, 'wallWords', `These are ${letters} letters. The wall has room for ${WALL_LETTERS}.`);
  for (const field of GIVE_FIELDS) {
    const isHidden = field === 'message' ? hasHiddenSignsInMessage : hasHiddenSigns;
    if (isHidden(form[field])) ask(ctx, field, 'Take out the line breaks or hidden signs here.');
  }
}

/** The whole sheet. The least sum is the society's setting; a closed part is refused by the server. */
export const giveRequestSchema = (bounds: SumBounds) =>
  giveFormSchema.superRefine((form, ctx) => {
    const sum = chosenSum(form, bounds);
    if ('fault' in sum)
      ask(ctx, form.amount === 'other' || form.other !== '' ? 'other' : 'amount', sum.fault);
    checkWords(form, ctx);
    checkDetails(form, ctx);
  });

/** What the sheet needs to be drawn, with whatever was typed before. */
export const giveSheetSchema = z.object({
  campaignName: z.string(),
  pronoun: z.string(),
  leastPence: penceSchema,
  stillNeededPence: penceSchema,
  openParts: z.array(z.object({ slug: z.string(), name: z.string(), stillNeededPence: penceSchema })),
  /** What common sums buy, in the campaign's own words. */
  whatSumsBuy: z.string(),
  partChoice: z.enum(['wish', 'fund']),
  giftAid: z.union([z.object({ wording: z.string(), notice: z.string() }), z.null()]),
  consentWording: z.string(),
  answers: giveAnswersSchema,
});
export type GiveSheet = z.infer<typeof giveSheetSchema>;

/** Every answer once more, before anything is taken. */
export const giveCheckSchema = z.object({
  campaignName: z.string(),
  pronoun: z.string(),
  sumPence: penceSchema,
  giftAidPence: penceSchema,
  isDeclared: z.boolean(),
  /** False when the sheet had no declaration to tick; then nothing is said of Gift Aid. */
  giftAidOffered: z.boolean(),
  towards: z.object({
    slug: z.union([z.string(), z.null()]),
    name: z.string(),
    stillNeededPence: penceSchema,
  }),
  answers: z.object(giveFormSchema.shape),
  /** Said back in words: an unusually large sum, or a gift just like one made a moment ago. */
  saidBack: z.array(z.string()),
  appealVersion: z.int(),
  onShortfall: z.string(),
  onSurplus: z.string(),
});
export type GiveCheck = z.infer<typeof giveCheckSchema>;

/** Paying agrees to the appeal as the check page told it; another version by now is shown first. */
export const checkoutRequestSchema = z.strictObject({ appealVersion: z.int().positive() });
export const checkoutSchema = z.object({ url: z.url() });

export const GIFT_OUTCOMES = ['paid', 'confirming', 'not-paid'] as const;
export const giveOutcomeSchema = z.object({
  outcome: z.enum(GIFT_OUTCOMES),
  campaignName: z.string(),
  pronoun: z.string(),
  sumPence: penceSchema,
  giftAidPence: penceSchema,
  shares: z.array(z.object({ name: z.string(), amountPence: penceSchema, isMeant: z.boolean() })),
  /** Why it was split, when it was. */
  splitNote: z.union([z.string(), z.null()]),
  email: z.union([z.string(), z.null()]),
  receiptNumber: z.union([z.string(), z.null()]),
  receiptPath: z.union([z.string(), z.null()]),
  inMemory: z.boolean(),
});
export type GiveOutcome = z.infer<typeof giveOutcomeSchema>;

/** A receipt as page, mail and PDF tell it. */
export const receiptSchema = z.object({
  number: z.string(),
  givenOn: z.string(),
  campaignName: z.string(),
  name: z.string(),
  greeting: z.string(),
  sumPence: penceSchema,
  shares: z.array(z.object({ name: z.string(), amountPence: penceSchema, isMeant: z.boolean() })),
  splitNote: z.union([z.string(), z.null()]),
  dedication: z.union([z.object({ kind: z.enum(['memory', 'honour']), name: z.string() }), z.null()]),
  wallWords: z.union([z.string(), z.null()]),
  declaration: z.union([
    z.object({
      wording: z.string(),
      name: z.string(),
      address: z.string(),
      givenOn: z.string(),
      giftAidPence: penceSchema,
    }),
    z.null(),
  ]),
  societyName: z.string(),
  societyAddress: z.string(),
  registrationStatement: z.string(),
  contact: z.string(),
  complaints: z.string(),
});
export type Receipt = z.infer<typeof receiptSchema>;
