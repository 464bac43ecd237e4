// Which sums beside the staff can be read: labels that would touch one another are left to the screen reader.
import type { Campaign } from '#shared/campaign/campaign-schemas.ts';

/** 16 px of a full window's figure, and 16 px of a phone's, in millimetres of her height. */
const APART_WIDE_MM = 170;
const APART_NARROW_MM = 300;
/** The lamp tag is taller than a label. */
const APART_FROM_TAG_MM = { wide: 210, narrow: 340 };

export type RungLabel = Campaign['reach']['rungs'][number] & {
  /** `narrow`: hidden on a narrow figure. `always`: hidden on every figure. */
  crowded: 'never' | 'narrow' | 'always';
  isTop: boolean;
};

type Rungs = Campaign['reach']['rungs'];

function readable(rungs: Rungs, tagMm: number, apartMm: number, apartFromTagMm: number): Set<number> {
  const topMm = rungs.at(-1)?.topMm ?? 0;
  const shown = new Set<number>();
  if (Math.abs(topMm - tagMm) >= apartFromTagMm) shown.add(topMm);
  let lastMm = -Infinity;
  for (const { topMm: mm } of rungs) {
    const isClear = mm - lastMm >= apartMm && topMm - mm >= apartMm && Math.abs(mm - tagMm) >= apartFromTagMm;
    if (!isClear) continue;
    shown.add(mm);
    lastMm = mm;
  }
  return shown;
}

export function labelRungs(rungs: Rungs, tagMm: number): RungLabel[] {
  const wide = readable(rungs, tagMm, APART_WIDE_MM, APART_FROM_TAG_MM.wide);
  const narrow = readable(rungs, tagMm, APART_NARROW_MM, APART_FROM_TAG_MM.narrow);
  return rungs.map((rung, index) => ({
    ...rung,
    crowded: !wide.has(rung.topMm) ? 'always' : narrow.has(rung.topMm) ? 'never' : 'narrow',
    isTop: index === rungs.length - 1,
  }));
}
