// What a giver is asked on the one sheet, checked the same way in the browser and on the server.
import { z } from 'zod';
import { penceSchema } from '#shared/money.ts';
import { formatPence, MOST_CARD_PENCE, type Pence } from '#shared/money.ts';
import { readSum } from '#shared/sum-text.ts';

export const GIFT_CHOICES = ['5', '20', '60', 'other'] as const;
export const DEDICATIONS = ['none', 'memory', 'honour'] as const;
/** Where a giver's name may be seen. */
export const NAME_CHOICES = ['wall', 'not-public', 'treasurer-only'] as const;
export const WALL_LETTERS = 40;

const line = (most: number, words: string) =>
  z.string().trim().max(most, `${words} Use at most ${most} letters.`);
const tick = z.enum(['on', '']).default('');

/** Every field of the sheet as a form sends it: text. A tick box sends `on` or nothing. */
export const giveFormSchema = z.strictObject({
  amount: z.enum(GIFT_CHOICES, 'Choose £5, £20, £60 or write another sum.').default('20'),
  other: line(30, 'Write the sum in pounds.').default(''),
  towards: z.string().trim().max(80).default('whole'),
  dedication: z.enum(DEDICATIONS, 'Choose in memory, in honour, or neither.').default('none'),
  dedicationName: line(120, 'Write the name.').default(''),
  contactName: line(120, 'Write the name.').default(''),
  contactEmail: line(254, 'Write the address.').default(''),
  contactSum: tick,
  wall: z.enum(NAME_CHOICES, 'Choose who may see your name.').default('not-public'),
  wallWords: line(WALL_LETTERS, 'Make the words shorter.').default(''),
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
  message: line(600, 'Make the message shorter.').default(''),
});
export type GiveForm = z.input<typeof giveFormSchema>;
export type GiveFormFilled = z.output<typeof giveFormSchema>;
export type GiveField = keyof GiveFormFilled;
export const GIVE_FIELDS: readonly GiveField[] = giveFormSchema.keyof().options;

const EMAIL =
  /^[^\s@,;:<>()[\]\\"\u0000-\u001f\u007f]+@[^\s@,;:<>()[\]\\"\u0000-\u001f\u007f.]+(\.[^\s@,;:<>()[\]\\"\u0000-\u001f\u007f.]+)+$/;
const POSTCODE = /^[A-Z]{1,2}\d[A-Z\d]?\d[A-Z]{2}$/;
const CONTROL = /[\u0000-\u001f\u007f\u2028\u2029\u202a-\u202e\u2066-\u2069]/;

/** What is wrong with an address for mail, in words that say what to do; null when it is fine. */
export function emailFault(address: string): string | null {
  if (address.length > 254) return 'This address is too long. Write one of at most 254 letters.';
  if (!address.includes('@')) return 'There is no @ in this address. Write it like name@post.example.';
  return EMAIL.test(address) ? null : 'Write one address only, like name@post.example.';
}

/** A UK postcode in capitals with its one space, or null. */
export function tidyPostcode(text: string): string | null {
  const bare = text.toUpperCase().replaceAll(/[^A-Z0-9]/g, '');
  return POSTCODE.test(bare) ? `${bare.slice(0, -3)} ${bare.slice(-3)}` : null;
}

export type SumBounds = { leastPence: Pence; mostPence?: Pence };

/** The sum chosen or written, or the words that ask for a better one. */
export function chosenSum(
  form: Pick<GiveFormFilled, 'amount' | 'other'>,
  bounds: SumBounds,
): { pence: Pence } | { fault: string } {
  const most = bounds.mostPence ?? MOST_CARD_PENCE;
  const reading = readSum(form.amount === 'other' ? form.other : form.amount);
  switch (reading.kind) {
    case 'empty':
      return { fault: 'Write how much you would like to give, in pounds.' };
    case 'unreadable':
      return { fault: 'We cannot read this as a sum. Write it like 25 or 25.50.' };
    case 'two-ways': {
      const [one, other] = reading.readings;
      return {
        fault: `Do you mean ${formatPence(one)} or ${formatPence(other)}? Write it like ${(one / 100).toFixed(2)} or ${(other / 100).toFixed(2)}.`,
      };
    }
    case 'sum':
      if (reading.pence < bounds.leastPence)
        return {
          fault: `The least we can take by card is ${formatPence(bounds.leastPence)}. Write a larger sum.`,
        };
      if (reading.pence > most)
        return {
          fault: `The most we can take by card is ${formatPence(most)}. For more, please telephone us.`,
        };
      return { pence: reading.pence };
  }
}

const require = (ctx: z.RefinementCtx<GiveFormFilled>, field: GiveField, words: string) =>
  ctx.addIssue({ code: 'custom', path: [field], message: words });

function checkDetails(form: GiveFormFilled, ctx: z.RefinementCtx<GiveFormFilled>): void {
  if (!form.name) require(ctx, 'name', 'Write your full name.');
  if (!form.email) require(ctx, 'email', 'Write your e-mail address. The receipt goes there.');
  else if (emailFault(form.email)) require(ctx, 'email', emailFault(form.email) ?? '');
  const wantsPost = form.byPost === 'on';
  if (form.declare === 'on' || wantsPost) {
    const why =
      form.declare === 'on'
        ? 'A declaration needs your home address.'
        : 'We need it to write to you by post.';
    if (!form.address1) require(ctx, 'address1', `Write the first line of your address. ${why}`);
    if (!form.town) require(ctx, 'town', `Write the town. ${why}`);
    if (form.country === 'GB' && !form.postcode)
      require(ctx, 'postcode', form.declare === 'on'
        ? 'Write your postcode. The tax office refuses a declaration without one.'
        : `Write your postcode. ${why}`);
  }
  if (form.country === 'GB' && form.postcode && !tidyPostcode(form.postcode))
    require(ctx, 'postcode', 'We cannot read this as a UK postcode. Write it like BK4 7HY, or choose that you live abroad.');
  if (form.declare === 'on' && form.name && !/\S\s+\S/.test(form.name))
    require(ctx, 'name', 'A declaration needs your first name or initial and your surname.');
  if (form.byPhone === 'on' && !/\d.*\d.*\d.*\d.*\d.*\d/.test(form.phone))
    require(ctx, 'phone', 'Write your telephone number, or untick the telephone below.');
}

function checkWords(form: GiveFormFilled, ctx: z.RefinementCtx<GiveFormFilled>): void {
  if (form.dedication !== 'none' && !form.dedicationName)
    require(ctx, 'dedicationName', 'Write the name, or choose neither.');
  if (form.dedication !== 'none' && form.contactEmail && emailFault(form.contactEmail))
    require(ctx, 'contactEmail', emailFault(form.contactEmail) ?? '');
  if (form.dedication !== 'none' && form.contactEmail && !form.contactName)
    require(ctx, 'contactName', 'Write whom we should tell.');
  if (form.dedication !== 'none' && form.contactName && !form.contactEmail)
    require(ctx, 'contactEmail', 'Write where we should tell them, or leave out their name.');
  if (form.wall === 'wall' && !form.wallWords)
    require(ctx, 'wallWords', 'Write the words for the wall, or leave your name off.');
  for (const field of GIVE_FIELDS)
    if (field !== 'message' && CONTROL.test(form[field]))
      require(ctx, field, 'Take out the line breaks or hidden signs here.');
}

/** The whole sheet. The least sum is the society's setting; a closed part is refused by the server. */
export const giveRequestSchema = (bounds: SumBounds) =>
  giveFormSchema.superRefine((form, ctx) => {
    const sum = chosenSum(form, bounds);
    if ('fault' in sum) require(ctx, form.amount === 'other' ? 'other' : 'amount', sum.fault);
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
  partChoice: z.enum(['wish', 'fund']),
  giftAid: z.union([z.object({ wording: z.string(), notice: z.string() }), z.null()]),
  consentWording: z.string(),
  answers: giveFormSchema.partial(),
});
export type GiveSheet = z.infer<typeof giveSheetSchema>;

/** Every answer once more, before anything is taken. */
export const giveCheckSchema = z.object({
  campaignName: z.string(),
  pronoun: z.string(),
  sumPence: penceSchema,
  giftAidPence: penceSchema,
  isDeclared: z.boolean(),
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
