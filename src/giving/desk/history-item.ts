// A line of the audit trail as the margin shows it, with the way to its gift.
import type { HistoryLine } from '#shared/giving/desk-schemas.ts';

export const toHistoryItem = ({ at, words, giftNumber }: HistoryLine) => ({
  at,
  words,
  link: giftNumber === null ? null : { path: `/desk/gifts/${giftNumber}`, label: `Gift ${giftNumber}` },
});
