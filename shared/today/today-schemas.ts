// What Today shows: one row for each thing that is owed, soonest first, each with one action.
import { z } from 'zod';
import { daySchema } from '#shared/dates.ts';
import { historyLineSchema, PAYMENT_KINDS, WORDS_KINDS } from '#shared/giving/desk-schemas.ts';

export const owedActionSchema = z.discriminatedUnion('kind', [
  /** Words that may be passed from Today itself with one press. */
  z.object({
    kind: z.literal('judge'),
    giftNumber: z.int(),
    wordsId: z.uuid(),
    wordsKind: z.enum(WORDS_KINDS),
    words: z.string(),
  }),
  z.object({ kind: z.literal('open'), label: z.string(), path: z.string() }),
  /** Nothing to open elsewhere: what is known unfolds in the row. */
  z.object({ kind: z.literal('look'), label: z.string() }),
  /** The same, and below it the treasurer's reason, with which the row is settled. */
  z.object({
    kind: z.literal('settle'),
    label: z.string(),
    paymentKind: z.enum(PAYMENT_KINDS),
    paymentId: z.string(),
  }),
]);
export type OwedAction = z.infer<typeof owedActionSchema>;

export const owedRowSchema = z.object({
  id: z.string(),
  due: z.enum(['late', 'today']),
  dueDay: daySchema,
  what: z.string(),
  owedTo: z.string(),
  since: z.iso.datetime(),
  waitedDays: z.int(),
  waited: z.string(),
  detail: z.array(z.string()),
  action: owedActionSchema,
});
export type OwedRow = z.infer<typeof owedRowSchema>;

export const todaySchema = z.object({
  day: daySchema,
  /** False: nothing of gifts is told, so an empty list says nothing about them. */
  mayReadGifts: z.boolean(),
  rows: z.array(owedRowSchema),
  /** Newest first: what was done to gifts since yesterday. */
  history: z.array(historyLineSchema),
});
export type Today = z.infer<typeof todaySchema>;
