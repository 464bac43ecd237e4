// The filter as one sentence. It asks only when “Show” is pressed: no choice sends anything by itself.
import type { SubmitEvent } from 'react';
import { useNavigate } from 'react-router-dom';
import type { GiftFilter, GiftList } from '#shared/giving/desk-schemas.ts';
import { readFilter, toSearch } from './gift-filter.ts';

type Props = { filter: GiftFilter; parts: GiftList['parts']; onFault: (fault: string | null) => void };

export function GiftFilterForm({ filter, parts, onFault }: Props) {
  const navigate = useNavigate();
  const show = (event: SubmitEvent<HTMLFormElement>): void => {
    event.preventDefault();
    const typed = new URLSearchParams();
    for (const [key, value] of new FormData(event.currentTarget))
      if (typeof value === 'string') typed.set(key, value);
    const read = readFilter(typed);
    onFault(read.fault);
    if (read.fault === null) void navigate({ search: toSearch({ ...read.filter, after: '' }) });
  };
  return (
    // Keyed by what is shown, so that the browser's back also turns the sentence back.
    <form className="ask" onSubmit={show} key={toSearch(filter)} aria-label="Which gifts to show" noValidate>
      <p>
        Gifts to{' '}
        <label>
          <span className="vh">Part</span>
          <select name="towards" defaultValue={filter.towards}>
            <option value="any">any part or the whole</option>
            <option value="whole">the whole figure</option>
            {parts.map(({ slug, name }) => (
              <option key={slug} value={slug}>
                {name}
              </option>
            ))}
          </select>
        </label>{' '}
        <label>
          since <input type="date" name="from" defaultValue={filter.from} />
        </label>{' '}
        <label>
          until <input type="date" name="to" defaultValue={filter.to} />
        </label>
        ,{' '}
        <label>
          <span className="vh">Thanks</span>
          <select name="thanks" defaultValue={filter.thanks}>
            <option value="any">thanked or not</option>
            <option value="not-yet-thanked">not yet thanked</option>
            <option value="thanked">thanked</option>
          </select>
        </label>
        ,{' '}
        <label>
          <span className="vh">Words</span>
          <select name="words" defaultValue={filter.words}>
            <option value="any">with any words or none</option>
            <option value="unread">with words to read</option>
          </select>
        </label>
        ,{' '}
        <label>
          <span className="vh">Order</span>
          <select name="sort" defaultValue={filter.sort}>
            <option value="newest">newest day first</option>
            <option value="oldest">oldest day first</option>
            <option value="largest">largest first</option>
          </select>
        </label>
        .{' '}
        <button className="act" type="submit">
          Show
        </button>
      </p>
    </form>
  );
}
