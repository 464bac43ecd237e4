// One gift with its whole chain: giver, words, what happened step by step, books, letters and wordings.
import { useQuery } from '@tanstack/react-query';
import { Link, useParams } from 'react-router-dom';
import { formatDay, weekdayOf } from '#shared/dates.ts';
import type { GiftChain } from '#shared/giving/desk-schemas.ts';
import { formatPence } from '#shared/money.ts';
import { useApi } from '#src/lib/use-api.ts';
import { AskAgain } from '#src/ui/AskAgain.tsx';
import { WaitingRows } from '#src/ui/WaitingRows.tsx';
import { CardFacts } from './CardFacts.tsx';
import { giftChainQuery } from './gift-desk-queries.ts';
import { GiftBooks } from './GiftBooks.tsx';
import { GiftFacts } from './GiftFacts.tsx';
import { GiftLetters } from './GiftLetters.tsx';
import { GiftMargin } from './GiftMargin.tsx';
import { isForbidden, isMissing } from './gift-refusals.ts';
import { NoSuchGift } from './NoSuchGift.tsx';
import { NotForYourRoles } from './NotForYourRoles.tsx';
import { GiftSteps } from './GiftSteps.tsx';
import { GiftWordings } from './GiftWordings.tsx';
import { GiftWordsPanel } from './GiftWordsPanel.tsx';
import { useHashTarget } from './use-hash-target.ts';

function Chain({ gift }: { gift: GiftChain }) {
  return (
    <>
      <GiftFacts gift={gift} />
      <GiftWordsPanel giftNumber={gift.number} words={gift.words} />
      <GiftSteps steps={gift.steps} />
      <section className="sec" aria-labelledby="books">
        <h2 id="books">In the books</h2>
        <GiftBooks entries={gift.entries} />
        <CardFacts payment={gift.payment} />
      </section>
      <GiftLetters mails={gift.mails} />
      <GiftWordings gift={gift} />
    </>
  );
}

export function GiftPage() {
  const api = useApi();
  const { number = '' } = useParams();
  const answer = useQuery(giftChainQuery(api, number));
  const gift = answer.data;
  useHashTarget(gift !== undefined);
  if (isForbidden(answer.error)) return <NotForYourRoles />;
  if (isMissing(answer.error)) return <NoSuchGift number={number} />;
  return (
    <>
      <main className="sheet" id="sheet" tabIndex={-1}>
        <div className="title">
          <h1>Gift {number}</h1>
          {gift && (
            <p>
              {formatPence(gift.sumPence)} from {gift.giver.name}, {weekdayOf(gift.day)} {formatDay(gift.day)}
            </p>
          )}
          <p className="right">
            <Link to="/desk/gifts">All gifts</Link>
          </p>
        </div>
        {answer.isPending && <WaitingRows words="The gift is on its way." />}
        {answer.isError && !gift && (
          <AskAgain what="The gift" error={answer.error} onAgain={() => void answer.refetch()} />
        )}
        {gift && <Chain gift={gift} />}
      </main>
      <GiftMargin gift={gift} />
    </>
  );
}
