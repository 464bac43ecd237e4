// How high the money given so far would build, part by part in building order. Pure: no day, no database.
import { add, least, NOTHING, pence, subtract, type Pence } from '#shared/money.ts';

/** One priced piece in building order. A cost without height (lifting, insurance) has null heights. */
export type ReachPart = {
  slug: string;
  costPence: Pence;
  /** Met by a named firm in goods or work: the need falls, the money given does not rise. */
  inKindPence: Pence;
  /** Money whose givers chose this part. */
  meantPence: Pence;
  bottomMm: number | null;
  topMm: number | null;
};

export type PartReach = {
  slug: string;
  needPence: Pence;
  givenPence: Pence;
  stillNeededPence: Pence;
  isPaid: boolean;
};

export type Rung = { topMm: number; slugs: readonly string[]; costPence: Pence; coveredPence: Pence };

export type Reach = {
  /** Top of the unbroken run of covered rungs from the ground, plus the covered share of the next. */
  heightMm: number;
  /** The part being paid for now; null when all is paid. */
  part: string | null;
  /** How much of that part is paid or met in kind, 0 to 1. */
  fraction: number;
  parts: readonly PartReach[];
  rungs: readonly Rung[];
  /** Money that waits for parts above the rung being filled; it lifts the line when the line gets there. */
  waitingPence: Pence;
  /** Money beyond all needs. */
  surplusPence: Pence;
};

export const needOf = (part: Pick<ReachPart, 'costPence' | 'inKindPence'>): Pence =>
  subtract(part.costPence, least(part.inKindPence, part.costPence));

/** Each part takes money meant for it first; then free money fills the parts from the ground up. */
function pourMoney(parts: readonly ReachPart[], freePence: Pence): { given: Pence[]; surplusPence: Pence } {
  const meant = parts.map((part) => least(part.meantPence, needOf(part)));
  const beyondNeed = parts.map((part, index) => subtract(part.meantPence, meant[index] ?? NOTHING));
  let free = add(freePence, ...beyondNeed);
  const given = parts.map((part, index) => {
    const already = meant[index] ?? NOTHING;
    const more = least(free, subtract(needOf(part), already));
    free = subtract(free, more);
    return add(already, more);
  });
  return { given, surplusPence: free };
}

/** Groups parts into rungs: whatever adds no height joins the rung before it, or the first if none is before. */
function groupRungs(parts: readonly ReachPart[]): { topMm: number; indexes: number[] }[] {
  const rungs: { topMm: number; indexes: number[] }[] = [];
  let topMm = 0;
  const beforeFirst: number[] = [];
  parts.forEach((part, index) => {
    if (part.topMm !== null && part.topMm > topMm) {
      topMm = part.topMm;
      rungs.push({ topMm, indexes: rungs.length === 0 ? [...beforeFirst, index] : [index] });
    } else if (rungs.length === 0) beforeFirst.push(index);
    else rungs.at(-1)?.indexes.push(index);
  });
  return rungs;
}

function climb(rungs: readonly Rung[]): { heightMm: number; next: number } {
  let bottomMm = 0;
  for (const [index, rung] of rungs.entries()) {
    if (rung.coveredPence < rung.costPence) {
      // Rounded down, so that the top is reached by the last penny and not before.
      const risen = (BigInt(rung.topMm - bottomMm) * BigInt(rung.coveredPence)) / BigInt(rung.costPence);
      return { heightMm: bottomMm + Number(risen), next: index };
    }
    bottomMm = rung.topMm;
  }
  return { heightMm: bottomMm, next: rungs.length };
}

export function computeReach(parts: readonly ReachPart[], freePence: Pence): Reach {
  const { given, surplusPence } = pourMoney(parts, freePence);
  const reached = parts.map((part, index): PartReach => {
    const needPence = needOf(part);
    const givenPence = given[index] ?? NOTHING;
    const stillNeededPence = subtract(needPence, givenPence);
    return { slug: part.slug, needPence, givenPence, stillNeededPence, isPaid: stillNeededPence === 0 };
  });
  const groups = groupRungs(parts);
  const covered = parts.map((part, index) =>
    subtract(part.costPence, reached[index]?.stillNeededPence ?? NOTHING),
  );
  const rungs = groups.map(({ topMm, indexes }): Rung => ({
    topMm,
    slugs: indexes.map((index) => parts[index]?.slug ?? ''),
    costPence: add(...indexes.map((index) => parts[index]?.costPence ?? NOTHING)),
    coveredPence: add(...indexes.map((index) => covered[index] ?? NOTHING)),
  }));
  const { heightMm, next } = climb(rungs);
  const waiting = groups
    .slice(next + 1)
    .flatMap((group) => group.indexes.map((index) => given[index] ?? NOTHING));
  const currentIndex = reached.findIndex((part) => !part.isPaid);
  const current = parts[currentIndex];
  return {
    heightMm,
    part: current?.slug ?? null,
    fraction: current ? (covered[currentIndex] ?? 0) / current.costPence : 1,
    parts: reached,
    rungs,
    waitingPence: add(...waiting),
    surplusPence,
  };
}

/** A part is full, and no longer offered, when meant and free money together cover its need. */
export const isFull = (reach: Reach, slug: string): boolean =>
  reach.parts.find((part) => part.slug === slug)?.isPaid ?? true;

/** The goal of a published campaign is the sum of its costs, to the penny. */
export const goalFault = (goalPence: Pence, parts: readonly Pick<ReachPart, 'costPence'>[]): Pence =>
  pence(add(...parts.map((part) => part.costPence)) - goalPence);
