// The ledger of gifts: a filter that lives in the address bar, days with their sums, and the list as CSV.
import { useState } from 'react';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { useApi } from '#src/lib/use-api.ts';
import { giftListQuery, giftsCsvPath } from './gift-desk-queries.ts';
import { readFilter } from './gift-filter.ts';
import { GiftFilterForm } from './GiftFilterForm.tsx';
import { GiftsMargin } from './GiftsMargin.tsx';
import { GiftsSheet } from './GiftsSheet.tsx';

export function GiftsPage() {
  const api = useApi();
  const [params] = useSearchParams();
  const { filter, fault } = readFilter(params);
  const [typedFault, setTypedFault] = useState<string | null>(null);
  const answer = useQuery({ ...giftListQuery(api, filter), placeholderData: keepPreviousData });
  const said = typedFault ?? fault;
  return (
    <>
      <main className="sheet" id="sheet" tabIndex={-1}>
        <div className="title">
          <h1>Gifts</h1>
          <p>Every gift, day by day</p>
          <p className="right">
            <a href={giftsCsvPath(filter)} download>
              CSV<span className="vh"> of these gifts</span>
            </a>
          </p>
        </div>
        <GiftFilterForm filter={filter} parts={answer.data?.parts ?? []} onFault={setTypedFault} />
        {said !== null && (
          <p className="overdue" role="alert">
            {said}
          </p>
        )}
        <GiftsSheet filter={filter} answer={answer} />
      </main>
      <GiftsMargin history={answer.data?.history ?? []} />
    </>
  );
}
