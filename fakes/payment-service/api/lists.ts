// Lists as the service answers them: newest first, by pages, each page starting from an id.
import { z } from 'zod';
import { invalid, unknownReference } from './api-errors.ts';
import { integer, text } from './form-encoding.ts';

export const pageFields = {
  limit: integer.optional(),
  starting_after: text().optional(),
  ending_before: text().optional(),
};
export const pageSchema = z.strictObject(pageFields);
type Page = z.infer<typeof pageSchema>;

export type ListAnswer<T> = { object: 'list'; url: string; has_more: boolean; data: T[] };

function limitOf(page: Page): number {
  const limit = page.limit ?? 10;
  if (limit < 1) throw invalid('This value must be greater than or equal to 1.', { param: 'limit' });
  if (limit > 100) throw invalid('This value must be less than or equal to 100.', { param: 'limit' });
  return limit;
}

/** `oldestFirst` is the order of making, which stays steady when the clock is moved back. */
export function toPage<T extends { id: string; object: string }>(
  oldestFirst: readonly T[],
  page: Page,
  url: string,
): ListAnswer<T> {
  const limit = limitOf(page);
  const rows = oldestFirst.toReversed();
  const placeOf = (id: string, param: string): number => {
    const place = rows.findIndex((row) => row.id === id);
    if (place < 0) throw unknownReference(url.slice('/v1/'.length), id, param);
    return place;
  };
  if (page.starting_after && page.ending_before)
    throw invalid('You may only provide one of the parameters: `starting_after`, `ending_before`.');
  if (page.ending_before) {
    const newer = rows.slice(0, placeOf(page.ending_before, 'ending_before'));
    return { object: 'list', url, has_more: newer.length > limit, data: newer.slice(-limit) };
  }
  const rest = page.starting_after ? rows.slice(placeOf(page.starting_after, 'starting_after') + 1) : rows;
  return { object: 'list', url, has_more: rest.length > limit, data: rest.slice(0, limit) };
}
