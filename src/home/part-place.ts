// Where a part or a cost stands in the order of building, and how its state is stamped.
import type { Part, PartState } from '#shared/campaign/campaign-schemas.ts';
import type { StampTone } from '#src/ui/Stamp.tsx';
import { inSentence, STATE_WORDS } from './part-words.ts';

export const STATE_TONES: Record<PartState, StampTone> = {
  placed: 'done',
  making: 'plain',
  paid: 'plain',
  planned: 'wait',
};

/** A cost without height is never "in place": it is done. */
export function stateWord(part: Pick<Part, 'state' | 'topMm'>): string {
  if (part.topMm !== null) return STATE_WORDS[part.state];
  if (part.state === 'placed') return 'Done';
  return part.state === 'making' ? 'Under way' : STATE_WORDS[part.state];
}

export const hasHeight = (part: Part): boolean => part.topMm !== null;

/** For a cost without height: the part after which it falls due. */
export function placeOf(parts: readonly Part[], cost: Pick<Part, 'slug'>): string {
  const index = parts.findIndex((part) => part.slug === cost.slug);
  const before = parts.slice(0, index).findLast(hasHeight);
  return before ? `after ${inSentence(before.name)}` : 'before anything is built';
}

export type LedgerOrder = { above: Part[]; below: Part[]; costs: Part[] };

/**
 * From the top down, as she stands: what is above the lamp rule waits for money, what is below is paid for.
 * @param current the part being paid for now, or null when all is paid
 */
export function orderForLedger(parts: readonly Part[], current: string | null): LedgerOrder {
  const reached = current === null ? parts.length : parts.findIndex((part) => part.slug === current);
  const fromTop = (some: readonly Part[]): Part[] => some.filter(hasHeight).reverse();
  return {
    above: fromTop(parts.slice(reached)),
    below: fromTop(parts.slice(0, reached)),
    costs: parts.filter((part) => !hasHeight(part)),
  };
}
