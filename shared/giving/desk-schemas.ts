// What the desk asks of gifts and is told: the filter in the address bar, the ledger list, one gift's chain.
import { z } from 'zod';
import { daySchema } from '#shared/dates.ts';
import { MAIL_STATES } from '#shared/mail-states.ts';
import { penceSchema } from '#shared/money.ts';

export const GIFT_SORTS = ['newest', 'oldest', 'largest'] as const;
export const THANKS_FILTERS = ['any', 'not-yet-thanked', 'thanked'] as const;
export const WORDS_FILTERS = ['any', 'unread'] as const;
export const ANY_PART = 'any';
export const WHOLE_FIGURE = 'whole';

const dayOrNone = z.union([daySchema, z.literal('')], 'Write the day like 2027-05-03.').default('');

/** Every part stands in the address bar, so that a list can be kept, sent and come back to. */
export const giftFilterSchema = z
  .strictObject({
    /** A part's slug, `whole`, or `any`. */
    towards: z.string().trim().min(1).max(80).default(ANY_PART),
    from: dayOrNone,
    to: dayOrNone,
    thanks: z.enum(THANKS_FILTERS, 'Choose any, thanked or not yet thanked.').default('any'),
    words: z.enum(WORDS_FILTERS, 'Choose any or unread.').default('any'),
    sort: z.enum(GIFT_SORTS, 'Choose newest, oldest or largest.').default('newest'),
    /** The number of the last gift of the page before. */
    after: z
      .string()
      .regex(/^\d{0,9}$/, 'Write the number of a gift, or leave it out.')
      .default(''),
  })
  .refine((filter) => filter.from === '' || filter.to === '' || filter.from <= filter.to, {
    path: ['to'],
    message: 'The last day is before the first. Write a later one.',
  });
export type GiftFilter = z.output<typeof giftFilterSchema>;
export type GiftFilterInput = z.input<typeof giftFilterSchema>;

/** How far the thank-you of a gift has come; only `thanked` is done. */
export const THANKS_STATES = [
  'thanked',
  'on-its-way',
  'trying-again',
  'failed',
  'uncertain',
  'held-back',
  'left',
  'not-written',
] as const;
export const thanksStateSchema = z.enum(THANKS_STATES);
export type ThanksState = z.infer<typeof thanksStateSchema>;

export const giftRowSchema = z.object({
  number: z.int(),
  receivedAt: z.iso.datetime(),
  day: daySchema,
  /** “name withheld” to all but the treasurer when the giver asked for that. */
  giver: z.string(),
  isWithheld: z.boolean(),
  how: z.enum(['card']),
  towards: z.string(),
  dedication: z.union([z.enum(['memory', 'honour']), z.null()]),
  sumPence: penceSchema,
  giftAidPence: penceSchema,
  thanks: thanksStateSchema,
  unreadWords: z.int(),
});
export type GiftRow = z.infer<typeof giftRowSchema>;

export const giftSumsSchema = z.object({ count: z.int(), sumPence: penceSchema, giftAidPence: penceSchema });
export type GiftSums = z.infer<typeof giftSumsSchema>;

/** One London day, with the sums of the whole day under the filter even when a page cuts it. */
export const giftDaySchema = z.object({
  /** Null when the list is not in the order of days. */
  day: z.union([daySchema, z.null()]),
  rows: z.array(giftRowSchema),
  sums: giftSumsSchema,
  isContinued: z.boolean(),
  goesOn: z.boolean(),
});
export type GiftDay = z.infer<typeof giftDaySchema>;

export const historyLineSchema = z.object({
  at: z.iso.datetime(),
  words: z.string(),
  giftNumber: z.union([z.int(), z.null()]),
});
export type HistoryLine = z.infer<typeof historyLineSchema>;

export const giftListSchema = z.object({
  days: z.array(giftDaySchema),
  total: giftSumsSchema,
  /** Whether the society has any gift at all, so that an empty list can say which kind of empty it is. */
  hasAnyGift: z.boolean(),
  nextAfter: z.union([z.string(), z.null()]),
  parts: z.array(z.object({ slug: z.string(), name: z.string() })),
  /** Newest first: what was lately done to gifts. */
  history: z.array(historyLineSchema),
});
export type GiftList = z.infer<typeof giftListSchema>;

export const STEP_KINDS = ['seen', 'payment', 'gift', 'books', 'words', 'mail'] as const;
export const giftStepSchema = z.object({
  at: z.iso.datetime(),
  kind: z.enum(STEP_KINDS),
  words: z.string(),
  detail: z.array(z.string()),
  isFault: z.boolean(),
});
export type GiftStep = z.infer<typeof giftStepSchema>;

export const WORDS_KINDS = ['wall-name', 'memory', 'honour', 'message'] as const;
export type WordsKind = (typeof WORDS_KINDS)[number];
export const VERDICTS = ['passed', 'held'] as const;
export const giftWordsSchema = z.object({
  id: z.uuid(),
  kind: z.enum(WORDS_KINDS),
  /** Null where reading them could name a giver whose name is withheld. */
  words: z.union([z.string(), z.null()]),
  contactName: z.union([z.string(), z.null()]),
  contactEmail: z.union([z.string(), z.null()]),
  hasContact: z.boolean(),
  mayTellSum: z.boolean(),
  writtenAt: z.iso.datetime(),
  readAt: z.union([z.iso.datetime(), z.null()]),
  readBy: z.union([z.string(), z.null()]),
  verdict: z.union([z.enum(VERDICTS), z.null()]),
  mayJudge: z.boolean(),
});
export type GiftWords = z.infer<typeof giftWordsSchema>;

export const giftMailSchema = z.object({
  id: z.uuid(),
  kind: z.string(),
  state: z.enum(MAIL_STATES),
  createdAt: z.iso.datetime(),
  sentAt: z.union([z.iso.datetime(), z.null()]),
  tries: z.int(),
  toName: z.string(),
  /** Address, subject, text and the server's answer are null where they could name a withheld giver. */
  toAddress: z.union([z.string(), z.null()]),
  subject: z.union([z.string(), z.null()]),
  plain: z.union([z.string(), z.null()]),
  answer: z.union([z.string(), z.null()]),
  settledBy: z.union([z.string(), z.null()]),
  maySettle: z.boolean(),
});
export type GiftMail = z.infer<typeof giftMailSchema>;

export const giftEntrySchema = z.object({
  id: z.uuid(),
  kind: z.string(),
  day: daySchema,
  recordedAt: z.iso.datetime(),
  /** Debit positive, credit negative. */
  lines: z.array(z.object({ account: z.string(), fund: z.string(), amountPence: penceSchema })),
});
export type GiftEntry = z.infer<typeof giftEntrySchema>;

export const giftChainSchema = z.object({
  number: z.int(),
  day: daySchema,
  receivedAt: z.iso.datetime(),
  sumPence: penceSchema,
  giftAidPence: penceSchema,
  isWithheld: z.boolean(),
  nameShown: z.enum(['wall', 'not-public', 'treasurer-only']),
  giver: z.object({
    name: z.string(),
    number: z.union([z.int(), z.null()]),
    greeting: z.union([z.string(), z.null()]),
    email: z.union([z.string(), z.null()]),
    phone: z.union([z.string(), z.null()]),
    address: z.union([z.string(), z.null()]),
  }),
  towards: z.string(),
  shares: z.array(
    z.object({ name: z.string(), fund: z.string(), amountPence: penceSchema, isMeant: z.boolean() }),
  ),
  appeal: z.object({
    version: z.int(),
    purpose: z.string(),
    onShortfall: z.string(),
    onSurplus: z.string(),
    partChoice: z.enum(['wish', 'fund']),
  }),
  declaration: z.union([
    z.object({
      version: z.int(),
      wording: z.string(),
      name: z.string(),
      address: z.union([z.string(), z.null()]),
      covers: z.enum(['past-present-future', 'this-gift']),
      givenAt: z.iso.datetime(),
      cancelledAt: z.union([z.iso.datetime(), z.null()]),
    }),
    z.null(),
  ]),
  consents: z.array(
    z.object({
      channel: z.enum(['email', 'post', 'phone']),
      isGiven: z.boolean(),
      version: z.int(),
      wording: z.string(),
    }),
  ),
  payment: z.object({
    sessionId: z.string(),
    paymentIntentId: z.string(),
    chargeId: z.union([z.string(), z.null()]),
    balanceTransactionId: z.union([z.string(), z.null()]),
    feePence: z.union([penceSchema, z.null()]),
    feePostedAt: z.union([z.iso.datetime(), z.null()]),
  }),
  entries: z.array(giftEntrySchema),
  words: z.array(giftWordsSchema),
  mails: z.array(giftMailSchema),
  /** Oldest first: everything that happened, in words. */
  steps: z.array(giftStepSchema),
  /** Newest first: the audit trail of this gift. */
  history: z.array(historyLineSchema),
});
export type GiftChain = z.infer<typeof giftChainSchema>;

export const judgeWordsSchema = z.strictObject({
  verdict: z.enum(VERDICTS, 'Choose to pass the words or to hold them back.'),
});
export type JudgeWords = z.infer<typeof judgeWordsSchema>;

export const SETTLE_DECISIONS = ['send-again', 'leave'] as const;
export const settleMailSchema = z.strictObject({
  decision: z.enum(SETTLE_DECISIONS, 'Choose to send it again or to leave it.'),
});
export type SettleMail = z.infer<typeof settleMailSchema>;

/** What of a payment stands still until the treasurer has looked: a payment that does not agree, a refused event. */
export const PAYMENT_KINDS = ['intent', 'event'] as const;
export type PaymentKind = (typeof PAYMENT_KINDS)[number];
export const MOST_REASON_LETTERS = 500;
export const settlePaymentSchema = z.strictObject({
  reason: z
    .string('Write how it was put right.')
    .trim()
    .min(1, 'Write how it was put right.')
    .max(MOST_REASON_LETTERS, `Write at most ${MOST_REASON_LETTERS} letters.`),
});
export type SettlePayment = z.infer<typeof settlePaymentSchema>;

export const doneSchema = z.object({});
