// What happened to a thing, newest first, as it stands in the margin.
import { Link } from 'react-router-dom';
import { formatMoment } from '#shared/dates.ts';

type HistoryItem = { at: string; words: string; link?: { path: string; label: string } | null };
type Props = { items: readonly HistoryItem[] };

export function HistoryList({ items }: Props) {
  if (items.length === 0) return <p className="note">Nothing yet.</p>;
  return (
    <ol className="hist">
      {items.map((item, index) => (
        // Lines of one moment may read alike; they never move, so their place names them.
        <li key={`${item.at}-${index}`}>
          <time dateTime={item.at}>{formatMoment(new Date(item.at))}</time>
          {item.link && (
            <>
              <Link to={item.link.path}>{item.link.label}</Link>:{' '}
            </>
          )}
          {item.words}
        </li>
      ))}
    </ol>
  );
}
