// How a gift is shared between the part its giver chose and the whole figure.
import { least, NOTHING, subtract, type Pence } from '#shared/money.ts';

export type Split = { meantPence: Pence; freePence: Pence };

/**
 * A gift to a part gives it at most what it still needs; the rest is free money for the next part in
 * building order. A gift to the whole figure is all free.
 */
export function splitGift(giftPence: Pence, partStillNeedsPence: Pence | null): Split {
  const meantPence = partStillNeedsPence === null ? NOTHING : least(giftPence, partStillNeedsPence);
  return { meantPence, freePence: subtract(giftPence, meantPence) };
}
