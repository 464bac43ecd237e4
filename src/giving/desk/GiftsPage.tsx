// The ledger of gifts: a filter that lives in the address bar, days with their sums, and the list as CSV.
import { useState } from 'react';
import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { Link, useSearchParams } from 'react-router-dom';
import type { GiftFilter, GiftList } from '#shared/giving/desk-schemas.ts';
import { countGifts } from '#shared/giving/desk-words.ts';
import { formatPence } from '#shared/money.ts';
import { useApi } from '#src/lib/use-api.ts';
import { AskAgain } from '#src/ui/AskAgain.tsx';
import { WaitingRows } from '#src/ui/WaitingRows.tsx';
import { giftListQuery, giftsCsvPath } from './gift-desk-queries.ts';
import { isPlain, readFilter, toSearch } from './gift-filter.ts';
import { GiftFilterForm } from './GiftFilterForm.tsx';
import { GiftsEmpty } from './GiftsEmpty.tsx';
import { GiftsMargin } from './GiftsMargin.tsx';
import { GiftTable } from './GiftTable.tsx';

const sumWords = ({ total }: GiftList): string =>
  `${countGifts(total.count)}, ${formatPence(total.sumPence)}; Gift Aid ${formatPence(total.giftAidPence)}, reckoned gift by gift.`;

function Pages({ filter, list }: { filter: GiftFilter; list: GiftList }) {
  if (filter.after === '' && list.nextAfter === null) return null;
  return (
    <nav className="after" aria-label="Pages of gifts">
      {filter.after !== '' && (
        <Link to={`/desk/gifts${toSearch({ ...filter, after: '' })}`}>Back to the first</Link>
      )}
      {filter.after !== '' && list.nextAfter !== null && ' · '}
      {list.nextAfter !== null && (
        <Link to={`/desk/gifts${toSearch({ ...filter, after: list.nextAfter })}`}>The next gifts</Link>
      )}
    </nav>
  );
}

export function GiftsPage() {
  const api = useApi();
  const [params] = useSearchParams();
  const { filter, fault } = readFilter(params);
  const [typedFault, setTypedFault] = useState<string | null>(null);
  const answer = useQuery({ ...giftListQuery(api, filter), placeholderData: keepPreviousData });
  const list = answer.data;
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
        <GiftFilterForm filter={filter} parts={list?.parts ?? []} onFault={setTypedFault} />
        {said !== null && (
          <p className="overdue" role="alert">
            {said}
          </p>
        )}
        <p className="ash sums" role="status">
          {list && list.total.count > 0 ? sumWords(list) : ''}
        </p>
        {answer.isPending && <WaitingRows words="The gifts are on their way." />}
        {answer.isError && (
          <AskAgain what="The gifts" error={answer.error} onAgain={() => void answer.refetch()} />
        )}
        {list && !answer.isError && list.total.count > 0 && (
          <>
            <GiftTable key={toSearch(filter)} list={list} sort={filter.sort} />
            <Pages filter={filter} list={list} />
          </>
        )}
        {list && !answer.isError && list.total.count === 0 && (
          <GiftsEmpty hasAnyGift={list.hasAnyGift && !isPlain(filter)} />
        )}
      </main>
      <GiftsMargin history={list?.history ?? []} />
    </>
  );
}
