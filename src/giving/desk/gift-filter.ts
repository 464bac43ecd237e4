// The gifts' filter as it stands in the address bar: only what differs from the plain list is written there.
import { giftFilterSchema, type GiftFilter } from '#shared/giving/desk-schemas.ts';

export const PLAIN_FILTER: GiftFilter = giftFilterSchema.parse({});
const KEYS = ['towards', 'from', 'to', 'thanks', 'words', 'sort', 'after'] as const;

export const toSearch = (filter: GiftFilter): string => {
  const params = new URLSearchParams();
  for (const key of KEYS) if (filter[key] !== PLAIN_FILTER[key]) params.set(key, filter[key]);
  const search = params.toString();
  return search === '' ? '' : `?${search}`;
};

/** Of an address that cannot be read only the fault counts; the plain filter stands in its form. */
export function readFilter(params: URLSearchParams): { filter: GiftFilter; fault: string | null } {
  const typed = Object.fromEntries(KEYS.flatMap((key) => (params.has(key) ? [[key, params.get(key)]] : [])));
  const parsed = giftFilterSchema.safeParse(typed);
  if (parsed.success) return { filter: parsed.data, fault: null };
  return { filter: PLAIN_FILTER, fault: parsed.error.issues[0]?.message ?? null };
}

export const isPlain = (filter: GiftFilter): boolean =>
  toSearch({ ...filter, after: '', sort: 'newest' }) === '';
