// The reach: how high the money builds, with the properties that must hold for every figure and every sum.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { computeReach, goalFault, isFull, needOf, type ReachPart } from '#shared/campaign/reach-rules.ts';
import { add, NOTHING, pence, type Pence } from '#shared/money.ts';
import { LAMPWOMAN_PARTS } from '#seeds/brackenhythe.ts';

const part = (
  slug: string,
  cost: number,
  bottomMm: number | null,
  topMm: number | null,
  more: Partial<ReachPart> = {},
): ReachPart => ({
  slug,
  costPence: pence(cost),
  inKindPence: NOTHING,
  meantPence: NOTHING,
  bottomMm,
  topMm,
  ...more,
});

const lampwoman = (meant: Record<string, number> = {}): ReachPart[] =>
  LAMPWOMAN_PARTS.map((one) =>
    part(one.slug, one.costPence, one.bottomMm, one.topMm, { meantPence: pence(meant[one.slug] ?? 0) }),
  );

/** Any figure: parts of any height in any order, costs without height among them, shares in kind, money meant. */
const figures = fc
  .array(
    fc.record({
      cost: fc.integer({ min: 1, max: 2_000_000 }),
      inKindShare: fc.oneof(
        { weight: 4, arbitrary: fc.constant(0) },
        { weight: 1, arbitrary: fc.double({ min: 0, max: 1, noNaN: true }) },
      ),
      meant: fc.oneof(
        { weight: 3, arbitrary: fc.constant(0) },
        { weight: 1, arbitrary: fc.integer({ min: 0, max: 2_500_000 }) },
      ),
      heights: fc.option(fc.tuple(fc.integer({ min: 0, max: 8_000 }), fc.integer({ min: 1, max: 1_500 })), {
        nil: null,
        freq: 4,
      }),
    }),
    { minLength: 1, maxLength: 12 },
  )
  .filter((parts) => parts.some((one) => one.heights !== null))
  .map((parts) =>
    parts.map((one, index): ReachPart =>
      part(
        `p${index}`,
        one.cost,
        one.heights?.[0] ?? null,
        one.heights ? one.heights[0] + one.heights[1] : null,
        {
          inKindPence: pence(Math.floor(one.cost * one.inKindShare)),
          meantPence: pence(one.meant),
        },
      ),
    ),
  );
const sums = fc.integer({ min: 0, max: 30_000_000 }).map(pence);
const topOf = (parts: readonly ReachPart[]) => Math.max(...parts.map((one) => one.topMm ?? 0));
const needsOf = (parts: readonly ReachPart[]): Pence => add(...parts.map(needOf));
const givenOf = (parts: readonly ReachPart[], free: Pence): Pence =>
  add(free, ...parts.map((one) => one.meantPence));

describe('the Lampwoman', () => {
  test('£41,280 with £680 of it meant for higher parts stands at 4.951 m and waits for the forearm', () => {
    const reach = computeReach(
      lampwoman({ 'right-forearm': 14_500, 'head-and-scarf': 31_000, panes: 22_500 }),
      pence(4_060_000),
    );
    expect(reach).toMatchObject({
      heightMm: 4_950,
      part: 'right-forearm',
      waitingPence: 22_500,
      surplusPence: 0,
    });
    expect(reach.heightMm + 1).toBeGreaterThan(4_920 + (940 * 455) / 13_800);
    expect(reach.fraction).toBeCloseTo(145 / 4_100);
    expect(reach.parts.filter((one) => one.isPaid)).toHaveLength(9);
  });

  test('rungs are the parts that raise the top; head and panes join the rung before them', () => {
    const { rungs } = computeReach(lampwoman(), NOTHING);
    expect(rungs.map((rung) => rung.topMm)).toEqual([
      500, 1_050, 2_100, 3_160, 3_400, 4_100, 4_250, 4_450, 4_920, 5_860, 7_200,
    ]);
    expect(rungs.at(-2)?.slugs).toEqual(['right-forearm', 'head-and-scarf']);
    expect(rungs.at(-1)?.slugs).toEqual(['lantern-frame', 'panes']);
  });
});

describe('money finds its place', () => {
  test('money meant for a part goes there first, then free money fills from the ground', () => {
    const parts = [part('low', 100, 0, 10), part('high', 100, 10, 20, { meantPence: pence(60) })];
    expect(computeReach(parts, pence(30)).parts.map((one) => one.givenPence)).toEqual([30, 60]);
    expect(computeReach(parts, pence(120)).parts.map((one) => one.givenPence)).toEqual([100, 80]);
  });

  test('money meant beyond a need flows on as free money', () => {
    const parts = [part('low', 100, 0, 10, { meantPence: pence(150) }), part('high', 100, 10, 20)];
    expect(computeReach(parts, NOTHING).parts.map((one) => one.givenPence)).toEqual([100, 50]);
  });

  test('a share in kind lowers the need and counts as covered, without raising what was given', () => {
    const parts = [part('low', 100, 0, 100, { inKindPence: pence(40) }), part('high', 100, 100, 200)];
    const reach = computeReach(parts, pence(60));
    expect(reach.parts[0]).toMatchObject({ needPence: 60, givenPence: 60, isPaid: true });
    expect(reach.heightMm).toBe(100);
    expect(computeReach(parts, NOTHING).heightMm).toBe(40);
  });

  test('a cost without height joins the rung before it, or the first when none is before', () => {
    const before = computeReach([part('insurance', 50, null, null), part('low', 50, 0, 100)], pence(75));
    expect(before.rungs).toEqual([
      { topMm: 100, slugs: ['insurance', 'low'], costPence: 100, coveredPence: 75 },
    ]);
    expect(before.heightMm).toBe(75);
    const after = computeReach(
      [part('low', 50, 0, 100), part('lifting', 50, null, null), part('high', 100, 100, 200)],
      pence(60),
    );
    expect(after.heightMm).toBe(60);
  });

  test('a part is full when meant and free money together cover its need', () => {
    const parts = [part('low', 100, 0, 10), part('high', 100, 10, 20, { meantPence: pence(70) })];
    expect(isFull(computeReach(parts, pence(129)), 'high')).toBe(false);
    expect(isFull(computeReach(parts, pence(130)), 'high')).toBe(true);
    expect(isFull(computeReach(parts, NOTHING), 'no such part')).toBe(true);
  });

  test('a goal that is not the sum of the costs is found out to the penny', () => {
    expect(goalFault(pence(8_400_000), lampwoman())).toBe(0);
    expect(goalFault(pence(8_400_001), lampwoman())).toBe(-1);
  });
});

describe('for every figure and sum', () => {
  test('the height never falls as free money rises, nor as money meant for any part rises', () => {
    fc.assert(
      fc.property(figures, sums, sums, fc.nat(), (parts, free, more, which) => {
        const before = computeReach(parts, free).heightMm;
        const richer = parts.map((one, index) =>
          index === which % parts.length ? { ...one, meantPence: add(one.meantPence, more) } : one,
        );
        expect(computeReach(parts, add(free, more)).heightMm).toBeGreaterThanOrEqual(before);
        expect(computeReach(richer, free).heightMm).toBeGreaterThanOrEqual(before);
      }),
    );
  });

  test('no part takes more than its need, and parts sum to the lesser of given and needs', () => {
    fc.assert(
      fc.property(figures, sums, (parts, free) => {
        const reach = computeReach(parts, free);
        const given = givenOf(parts, free);
        for (const one of reach.parts) expect(one.givenPence).toBeLessThanOrEqual(one.needPence);
        expect(add(...reach.parts.map((one) => one.givenPence))).toBe(Math.min(given, needsOf(parts)));
        expect(reach.surplusPence).toBe(Math.max(0, given - needsOf(parts)));
        for (const one of reach.parts) expect(Number.isSafeInteger(one.givenPence)).toBe(true);
      }),
    );
  });

  test('the full height is reached exactly when every need is met', () => {
    fc.assert(
      fc.property(figures, sums, (parts, free) => {
        const reach = computeReach(parts, free);
        expect(reach.heightMm === topOf(parts)).toBe(reach.parts.every((one) => one.isPaid));
        expect(reach.part === null).toBe(reach.parts.every((one) => one.isPaid));
      }),
    );
  });

  test('nothing given and nothing in kind is no height at all', () => {
    fc.assert(
      fc.property(figures, (parts) => {
        const bare = parts.map((one) => ({ ...one, inKindPence: NOTHING, meantPence: NOTHING }));
        expect(computeReach(bare, NOTHING).heightMm).toBe(0);
      }),
    );
  });

  test('free money that just covers the rungs up to one reaches exactly its top; a penny less does not', () => {
    fc.assert(
      fc.property(figures, fc.nat(), (parts, which) => {
        const bare = parts.map((one) => ({ ...one, inKindPence: NOTHING, meantPence: NOTHING }));
        // Only whole runs of parts in building order are filled by free money alone.
        const rungs = computeReach(bare, NOTHING).rungs;
        const upTo = which % rungs.length;
        const needed = add(...rungs.slice(0, upTo + 1).map((rung) => rung.costPence));
        expect(computeReach(bare, needed).heightMm).toBe(rungs[upTo]?.topMm);
        expect(computeReach(bare, pence(needed - 1)).heightMm).toBeLessThan(rungs[upTo]?.topMm ?? 0);
      }),
    );
  });
});
