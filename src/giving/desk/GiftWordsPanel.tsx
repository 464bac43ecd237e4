// What the giver wrote, to be read by a person before anybody else sees it: pass it, or hold it back.
import { useRef } from 'react';
import type { GiftWords } from '#shared/giving/desk-schemas.ts';
import { useJudgeWords } from './gift-desk-queries.ts';
import { GiftWordsItem } from './GiftWordsItem.tsx';

type Props = { giftNumber: number; words: readonly GiftWords[] };

export function GiftWordsPanel({ giftNumber, words }: Props) {
  const judge = useJudgeWords();
  const heading = useRef<HTMLHeadingElement>(null);
  if (words.length === 0) return null;
  const nextId = words.find((one) => one.mayJudge)?.id;
  return (
    <section className="sec" aria-labelledby="words">
      <h2 id="words" ref={heading} tabIndex={-1}>
        Words from the giver
      </h2>
      <ul className="owed">
        {words.map((one) => (
          <GiftWordsItem
            key={one.id}
            giftNumber={giftNumber}
            words={one}
            isNext={one.id === nextId}
            isBusy={judge.isPending}
            onDecide={(verdict) =>
              judge.mutate(
                { giftNumber, wordsId: one.id, verdict },
                // The pressed button is gone by then.
                { onSettled: () => heading.current?.focus() },
              )
            }
          />
        ))}
      </ul>
      <p className="overdue" role="alert">
        {judge.isError && `This was not kept. ${judge.error.message}`}
      </p>
      <p className="vh" role="status">
        {judge.isSuccess && (judge.variables.verdict === 'passed' ? 'Passed.' : 'Held back.')}
      </p>
    </section>
  );
}
