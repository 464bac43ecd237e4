// What the filter found: its sums in a line, then the ledger; or why there is none.
import type { UseQueryResult } from '@tanstack/react-query';
import type { GiftFilter, GiftList } from '#shared/giving/desk-schemas.ts';
import { countGifts } from '#shared/giving/desk-words.ts';
import { formatPence } from '#shared/money.ts';
import { AskAgain } from '#src/ui/AskAgain.tsx';
import { WaitingRows } from '#src/ui/WaitingRows.tsx';
import { isPlain, toSearch } from './gift-filter.ts';
import { GiftsEmpty } from './GiftsEmpty.tsx';
import { GiftsPages } from './GiftsPages.tsx';
import { GiftTable } from './GiftTable.tsx';

type Props = { filter: GiftFilter; answer: UseQueryResult<GiftList> };

const sumWords = ({ total }: GiftList): string =>
  `${countGifts(total.count)}, ${formatPence(total.sumPence)}; Gift Aid ${formatPence(total.giftAidPence)}, reckoned gift by gift.`;

export function GiftsSheet({ filter, answer }: Props) {
  if (answer.isPending) return <WaitingRows words="The gifts are on their way." />;
  if (answer.isError)
    return <AskAgain what="The gifts" error={answer.error} onAgain={() => void answer.refetch()} />;
  const list = answer.data;
  if (list.total.count === 0) return <GiftsEmpty hasAnyGift={list.hasAnyGift && !isPlain(filter)} />;
  return (
    <>
      <p className="ash sumline" role="status" data-result tabIndex={-1}>
        {sumWords(list)}
      </p>
      <GiftTable key={toSearch(filter)} list={list} sort={filter.sort} />
      <GiftsPages filter={filter} nextAfter={list.nextAfter} />
    </>
  );
}
