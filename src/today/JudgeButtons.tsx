// Words passed from Today with one press; or held back, which keeps them from everybody.
import { useQueryClient } from '@tanstack/react-query';
import type { OwedAction } from '#shared/today/today-schemas.ts';
import { wordsOfGift } from '#shared/giving/desk-words.ts';
import { useJudgeWords } from '#src/giving/desk/gift-desk-queries.ts';
import { TODAY } from './today-queries.ts';

type Props = { action: Extract<OwedAction, { kind: 'judge' }>; isNext: boolean };

export function JudgeButtons({ action, isNext }: Props) {
  const queryClient = useQueryClient();
  const judge = useJudgeWords();
  const name = `the ${wordsOfGift(action.wordsKind, action.giftNumber)}`;
  const decide = (verdict: 'passed' | 'held') => () => {
    if (judge.isPending) return;
    judge.mutate(
      { giftNumber: action.giftNumber, wordsId: action.wordsId, verdict },
      { onSettled: () => void queryClient.invalidateQueries({ queryKey: TODAY }) },
    );
  };
  return (
    <>
      <button
        type="button"
        className={isNext ? 'act first' : 'act'}
        aria-disabled={judge.isPending}
        onClick={decide('passed')}
      >
        Pass<span className="vh"> {name}</span>
      </button>{' '}
      <button type="button" className="act word" aria-disabled={judge.isPending} onClick={decide('held')}>
        hold back<span className="vh"> {name}</span>
      </button>
      {judge.isError && (
        <span className="overdue small" role="alert">
          Not kept. {judge.error.message}
        </span>
      )}
    </>
  );
}
