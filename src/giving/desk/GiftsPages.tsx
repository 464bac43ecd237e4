// From one page of the list to the next; the address holds the place.
import { Link } from 'react-router-dom';
import type { GiftFilter } from '#shared/giving/desk-schemas.ts';
import { toSearch } from './gift-filter.ts';

type Props = { filter: GiftFilter; nextAfter: string | null };

export function GiftsPages({ filter, nextAfter }: Props) {
  const isFirst = filter.after === '';
  if (isFirst && nextAfter === null) return null;
  return (
    <nav className="after" aria-label="Pages of gifts">
      {!isFirst && <Link to={`/desk/gifts${toSearch({ ...filter, after: '' })}`}>Back to the first</Link>}
      {!isFirst && nextAfter !== null && ' · '}
      {nextAfter !== null && (
        <Link to={`/desk/gifts${toSearch({ ...filter, after: nextAfter })}`}>The next gifts</Link>
      )}
    </nav>
  );
}
