// The ledger of gifts: a filter that lives in the address bar, days with their sums, and the list as CSV.
import { useState } from 'react';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useLocation, useSearchParams } from 'react-router-dom';
import { useApi } from '#src/lib/use-api.ts';
import { giftListQuery, giftsCsvPath } from './gift-desk-queries.ts';
import { readFilter, toSearch } from './gift-filter.ts';
import { GiftFilterFault } from './GiftFilterFault.tsx';
import { GiftFilterForm } from './GiftFilterForm.tsx';
import { isForbidden } from './gift-refusals.ts';
import { NotForYourRoles } from './NotForYourRoles.tsx';
import { GiftsMargin } from './GiftsMargin.tsx';
import { GiftsSheet } from './GiftsSheet.tsx';
import { useResultFocus } from './use-result-focus.ts';

export function GiftsPage() {
  const api = useApi();
  const [params] = useSearchParams();
  const { key } = useLocation();
  const { filter, fault } = readFilter(params);
  // A fault belongs to the page it was typed on: whoever goes on or back has left it behind.
  const [typed, setTyped] = useState({ words: '', on: '', tries: 0 });
  const said = typed.on === key ? typed.words : fault;
  const answer = useQuery({ ...giftListQuery(api, filter), placeholderData: keepPreviousData });
  useResultFocus(
    toSearch({ ...filter, after: '' }),
    filter.after,
    said === null && !answer.isPending && !answer.isPlaceholderData,
  );
  if (isForbidden(answer.error)) return <NotForYourRoles />;
  return (
    <>
      <main className="sheet" id="sheet" tabIndex={-1}>
        <div className="title">
          <h1>Gifts</h1>
          <p>Every gift, day by day</p>
          {said === null && (
            <p className="right">
              <a href={giftsCsvPath(filter)} download>
                CSV<span className="vh"> of these gifts</span>
              </a>
            </p>
          )}
        </div>
        <GiftFilterForm
          filter={filter}
          parts={answer.data?.parts ?? []}
          onFault={(words) => setTyped({ words, on: key, tries: typed.tries + 1 })}
        />
        {said === null ? (
          <GiftsSheet filter={filter} answer={answer} />
        ) : (
          <GiftFilterFault words={said} tries={typed.tries} />
        )}
      </main>
      <GiftsMargin history={answer.data?.history ?? []} />
    </>
  );
}
