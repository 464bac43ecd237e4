// The campaign as every screen and outside reader receives it.
import { z } from 'zod';
import { daySchema } from '#shared/dates.ts';
import { penceSchema } from '#shared/money.ts';

/** `planned` and `paid` follow from the money; `making` and `placed` are a person's word. */
export const PART_STATES = ['planned', 'paid', 'making', 'placed'] as const;
export const partStateSchema = z.enum(PART_STATES);
export type PartState = z.infer<typeof partStateSchema>;

export const partSchema = z.object({
  slug: z.string(),
  name: z.string(),
  costPence: penceSchema,
  givenPence: penceSchema,
  /** Cost less what is met in kind. */
  needPence: penceSchema,
  stillNeededPence: penceSchema,
  inKind: z.array(z.object({ firm: z.string(), amountPence: penceSchema })),
  state: partStateSchema,
  maker: z.union([z.string(), z.null()]),
  bottomMm: z.union([z.int(), z.null()]),
  topMm: z.union([z.int(), z.null()]),
});
export type Part = z.infer<typeof partSchema>;

export const STAGE_MARKS = ['footing', 'frame', 'carving', 'lifting', 'lighting'] as const;
export const stageSchema = z.object({
  slug: z.string(),
  name: z.string(),
  mark: z.enum(STAGE_MARKS),
  expectedOn: daySchema,
  doneOn: z.union([daySchema, z.null()]),
  remark: z.union([z.string(), z.null()]),
  /** Oldest first: the day it was, the day it became, and why. */
  changes: z.array(z.object({ fromDay: daySchema, toDay: daySchema, reason: z.string() })),
});
export type Stage = z.infer<typeof stageSchema>;

export const rungSchema = z.object({
  topMm: z.int(),
  slug: z.string(),
  name: z.string(),
  sumPence: penceSchema,
});

export const appealWordingSchema = z.object({
  id: z.uuid(),
  version: z.int(),
  purpose: z.string(),
  onShortfall: z.string(),
  onSurplus: z.string(),
  partChoice: z.enum(['wish', 'fund']),
});
export type AppealWording = z.infer<typeof appealWordingSchema>;

/** `parts` in building order; `rungs` from the ground with the sum that builds to each. */
export const campaignSchema = z.object({
  name: z.string(),
  pronoun: z.string(),
  lead: z.string(),
  place: z.string(),
  goalPence: penceSchema,
  givenPence: penceSchema,
  givers: z.int(),
  heightMm: z.int(),
  reach: z.object({
    heightMm: z.int(),
    part: z.union([z.string(), z.null()]),
    fraction: z.number(),
    waitingPence: penceSchema,
    rungs: z.array(rungSchema),
  }),
  /** Three sentences that describe the figure as it stands today. */
  description: z.array(z.string()),
  parts: z.array(partSchema),
  stages: z.array(stageSchema),
  wording: appealWordingSchema,
  /** Inner SVG of the elevation, 1 unit 10 mm, ground at y = 740, one group `part-SLUG` a part. */
  drawing: z.string(),
  giftAidOffered: z.boolean(),
});
export type Campaign = z.infer<typeof campaignSchema>;
