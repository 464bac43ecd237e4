// The ledger of gifts: a filter that lives in the address bar, days with their sums, and the list as CSV.
import { useMemo, useState } from 'react';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useLocation, useSearchParams } from 'react-router-dom';
import { useApi } from '#src/lib/use-api.ts';
import { giftListQuery, giftsCsvPath } from './gift-desk-queries.ts';
import { readFilter, toSearch } from './gift-filter.ts';
import { GiftFilterFault, type FilterFault } from './GiftFilterFault.tsx';
import { GiftFilterForm } from './GiftFilterForm.tsx';
import { isForbidden, NotForYourRoles } from './GiftRefusal.tsx';
import { GiftsMargin } from './GiftsMargin.tsx';
import { GiftsSheet } from './GiftsSheet.tsx';
import { useResultFocus } from './use-result-focus.ts';

export function GiftsPage() {
  const api = useApi();
  const [params] = useSearchParams();
  const { key } = useLocation();
  const { filter, fault } = readFilter(params);
  // A fault belongs to the page it was typed on: whoever goes on or back has left it behind.
  const [typed, setTyped] = useState<(FilterFault & { on: string }) | null>(null);
  const addressFault = useMemo(() => (fault === null ? null : { words: fault }), [fault]);
  const said = typed?.on === key ? typed : addressFault;
  const answer = useQuery({ ...giftListQuery(api, filter), placeholderData: keepPreviousData });
  useResultFocus(
    toSearch({ ...filter, after: '' }),
    filter.after,
    !answer.isPending && !answer.isPlaceholderData,
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
          onFault={(words) => setTyped({ words, on: key })}
        />
        {said === null ? <GiftsSheet filter={filter} answer={answer} /> : <GiftFilterFault fault={said} />}
      </main>
      <GiftsMargin history={answer.data?.history ?? []} />
    </>
  );
}
