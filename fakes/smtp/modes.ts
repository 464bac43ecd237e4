// How the stand-in behaves: it takes everything, or misbehaves in a way that a real mail server can.
import { z } from 'zod';

const refusalCode = z.int().min(400).max(599);

export const modeSchema = z.strictObject({
  /** Addresses refused before the letter, `*` for all: 550 for good, 452 for now. */
  refuse: z
    .array(z.strictObject({ address: z.string().min(1).max(254), code: refusalCode }))
    .max(1000)
    .default([]),
  /**
   * After the letter's text: `take` it; `answer` with `afterDataCode` and forget it; `drop` the line without
   * an answer and yet keep the letter (the sender cannot know); `drop-lost` the line and the letter.
   */
  afterData: z.enum(['take', 'answer', 'drop', 'drop-lost']).default('take'),
  afterDataCode: refusalCode.default(451),
  /** What `afterData` says holds for so many letters, then all are taken; null is without end. */
  times: z.union([z.int().min(1), z.null()]).default(null),
  /** Waited before the answer to a letter. */
  delayMs: z.int().min(0).max(120_000).default(0),
});
export type Mode = z.output<typeof modeSchema>;
export type ModeInput = z.input<typeof modeSchema>;

export const KIND_MODE: Mode = modeSchema.parse({});

/** The behaviours that the page offers as one choice. */
export const PAGE_CHOICES = {
  take: { label: 'Take every letter', mode: {} },
  hard: { label: 'Refuse every address for good (550)', mode: { refuse: [{ address: '*', code: 550 }] } },
  soft: { label: 'Refuse every address for now (452)', mode: { refuse: [{ address: '*', code: 452 }] } },
  later: { label: 'Say “try later” after each letter (451)', mode: { afterData: 'answer' } },
  drop: { label: 'Keep each letter, but drop the line before answering', mode: { afterData: 'drop' } },
  slow: { label: 'Take five seconds over each letter', mode: { delayMs: 5000 } },
} as const satisfies Record<string, { label: string; mode: ModeInput }>;
export const pageChoiceSchema = z.enum(Object.keys(PAGE_CHOICES) as [PageChoice, ...PageChoice[]]);
export type PageChoice = keyof typeof PAGE_CHOICES;

export type ModeHolder = {
  get(): Mode;
  set(mode: ModeInput): Mode;
  /** The code with which an address is refused now, if it is. */
  findRefusal(address: string): number | undefined;
  /** What happens to the letter that has just come in; counts down `times`. */
  nextAfterData(): Mode['afterData'];
};

export function holdMode(): ModeHolder {
  let mode = KIND_MODE;
  return {
    get: () => mode,
    set: (input) => (mode = modeSchema.parse(input)),
    findRefusal: (address) =>
      mode.refuse.find((one) => one.address === '*' || one.address.toLowerCase() === address.toLowerCase())
        ?.code,
    nextAfterData() {
      const { afterData, times } = mode;
      if (afterData === 'take' || times === null) return afterData;
      mode = times > 1 ? { ...mode, times: times - 1 } : { ...mode, afterData: 'take', times: null };
      return afterData;
    },
  };
}
