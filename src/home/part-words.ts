// How a part is told of in words: its state, its height, what is asked for it.
import type { Campaign, Part, PartState } from '#shared/campaign/campaign-schemas.ts';
import { formatPence } from '#shared/money.ts';

export const STATE_WORDS: Record<PartState, string> = {
  placed: 'In place',
  making: 'Being made',
  paid: 'Paid',
  planned: 'Not yet paid',
};

/** 4.95 m; 7.2 m: at most two decimals, and none that are noughts. */
export const formatMetres = (mm: number): string => `${Number((mm / 1000).toFixed(2))}`;

const oneDecimal = (mm: number): string => (Math.floor(mm / 100 + 0.5) / 10).toFixed(1);

/** 6.0 to 6.7 m, or null for a cost without height. */
export const heightRange = ({ bottomMm, topMm }: Pick<Part, 'bottomMm' | 'topMm'>): string | null =>
  bottomMm === null || topMm === null ? null : `${oneDecimal(bottomMm)} to ${oneDecimal(topMm)} m`;

/** Half way up a part; a cost without height stands on the ground. */
export const middleMm = ({ bottomMm, topMm }: Pick<Part, 'bottomMm' | 'topMm'>): number =>
  ((bottomMm ?? 0) + (topMm ?? 0)) / 2;

/** Inside a sentence: "the 24 panes", "the lantern frame". */
export function inSentence(name: string): string {
  const bare = name.replace(/^the\s+/i, '');
  // A name of two capitals in a row is an abbreviation and keeps its letters.
  const lower = /^[A-Z][A-Z]/.test(bare) ? bare : bare.charAt(0).toLowerCase() + bare.slice(1);
  return `the ${lower}`;
}

export const isOpen = (part: Pick<Part, 'stillNeededPence'>): boolean => part.stillNeededPence > 0;

export const partLabel = (part: Part): string =>
  `${part.name}, ${formatPence(part.costPence)}. ${STATE_WORDS[part.state]}.`;

export const findPart = (campaign: Campaign, slug: string | null | undefined): Part | undefined =>
  slug ? campaign.parts.find((part) => part.slug === slug) : undefined;
