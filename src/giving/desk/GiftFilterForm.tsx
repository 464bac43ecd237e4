// The filter as one sentence. It asks only when “Show” is pressed: no choice sends anything by itself.
import type { SubmitEvent } from 'react';
import { useNavigate } from 'react-router-dom';
import type { GiftFilter, GiftList } from '#shared/giving/desk-schemas.ts';
import { FilterChoice } from './FilterChoice.tsx';
import { readFilter, toSearch } from './gift-filter.ts';

type Props = { filter: GiftFilter; parts: GiftList['parts']; onFault: (fault: string) => void };

const TOWARDS = [
  ['any', 'any part or the whole'],
  ['whole', 'the whole figure'],
] as const;
const THANKS = [
  ['any', 'thanked or not'],
  ['not-yet-thanked', 'not yet thanked'],
  ['thanked', 'thanked'],
] as const;
const WORDS = [
  ['any', 'with any words or none'],
  ['unread', 'with words to read'],
] as const;
const ORDERS = [
  ['newest', 'newest day first'],
  ['oldest', 'oldest day first'],
  ['largest', 'largest first'],
] as const;

const HALF_A_DAY = 'Write each day whole, or leave it empty.';

function typedIn(form: HTMLFormElement): URLSearchParams {
  const typed = new URLSearchParams();
  for (const [key, value] of new FormData(form)) if (typeof value === 'string') typed.set(key, value);
  return typed;
}

export function GiftFilterForm({ filter, parts, onFault }: Props) {
  const navigate = useNavigate();
  const show = (event: SubmitEvent<HTMLFormElement>): void => {
    event.preventDefault();
    // The browser gives out a half-written day as none at all.
    if (event.currentTarget.querySelector('input:invalid')) return onFault(HALF_A_DAY);
    const { filter: asked, fault } = readFilter(typedIn(event.currentTarget));
    if (fault !== null) return onFault(fault);
    void navigate({ search: toSearch({ ...asked, after: '' }) });
  };
  const towards = [...TOWARDS, ...parts.map(({ slug, name }) => [slug, name] as const)];
  // Keyed by what is shown, so that the browser's back also turns the sentence back.
  const key = `${toSearch(filter)} ${parts.length}`;
  return (
    <form className="ask" onSubmit={show} key={key} aria-label="Which gifts to show" noValidate>
      <p>
        Gifts to <FilterChoice name="towards" label="Part" value={filter.towards} options={towards} />{' '}
        <label>
          since <input type="date" name="from" defaultValue={filter.from} />
        </label>{' '}
        <label>
          until <input type="date" name="to" defaultValue={filter.to} />
          <span aria-hidden="true">,</span>
        </label>{' '}
        <FilterChoice name="thanks" label="Thanks" value={filter.thanks} options={THANKS} stop="," />{' '}
        <FilterChoice name="words" label="Words" value={filter.words} options={WORDS} stop="," />{' '}
        <FilterChoice name="sort" label="Order" value={filter.sort} options={ORDERS} stop="." />{' '}
        <button className="act" type="submit">
          Show
        </button>
      </p>
    </form>
  );
}
