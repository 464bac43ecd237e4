// The desk's first page: what is owed to whom, soonest first. A row leaves when the thing is done.
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { formatDay, weekdayOf } from '#shared/dates.ts';
import type { Today } from '#shared/today/today-schemas.ts';
import { useApi } from '#src/lib/use-api.ts';
import { AskAgain } from '#src/ui/AskAgain.tsx';
import { HistoryList } from '#src/ui/HistoryList.tsx';
import { WaitingRows } from '#src/ui/WaitingRows.tsx';
import { Headpiece } from './Headpiece.tsx';
import { OwedTable } from './OwedTable.tsx';
import { todayQuery } from './today-queries.ts';
import { VerdictTold } from './VerdictTold.tsx';

function TodayMargin({ history }: { history: Today['history'] }) {
  const items = history.map(({ at, words, giftNumber }) => ({
    at,
    words,
    link: giftNumber === null ? null : { path: `/desk/gifts/${giftNumber}`, label: `Gift ${giftNumber}` },
  }));
  return (
    <aside className="margin" aria-label="History and notes">
      <h2>Since yesterday</h2>
      <HistoryList items={items} />
      <h2>How to read this</h2>
      <p className="note">
        Three strokes, three days waited; the fifth stroke crosses. Words from givers are read within three
        days, letters that came back are settled within one.
      </p>
      <p className="note">A row leaves the list when the thing is done, never because it was looked at.</p>
    </aside>
  );
}

export function TodayPage() {
  const answer = useQuery(todayQuery(useApi()));
  const today = answer.data;
  return (
    <>
      <main className="sheet" id="sheet" tabIndex={-1}>
        <div className="title">
          <h1>Today{today && `, ${weekdayOf(today.day)} ${formatDay(today.day)}`}</h1>
          <p>What is owed to whom, soonest first</p>
          <Headpiece />
        </div>
        {answer.isPending && <WaitingRows words="What is owed is being looked up." />}
        {answer.isError && !today && (
          <AskAgain what="What is owed" error={answer.error} onAgain={() => void answer.refetch()} />
        )}
        {today && <OwedTable day={today.day} rows={today.rows} />}
        <VerdictTold rows={today?.rows ?? []} />
        {today?.rows.length === 0 && !today.mayReadGifts && (
          <p className="after">Nothing here waits for you.</p>
        )}
        {today?.rows.length === 0 && today.mayReadGifts && (
          <p className="after">
            Every giver is thanked, every payment is in the books, and all words are read.{' '}
            <Link to="/desk/gifts">Look through the gifts</Link>.
          </p>
        )}
      </main>
      <TodayMargin history={today?.history ?? []} />
    </>
  );
}
