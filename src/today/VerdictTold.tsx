// Says aloud what became of the words that were just judged, when their row is gone already.
import { useMutationState } from '@tanstack/react-query';
import { JUDGE_WORDS } from '#src/giving/desk/gift-desk-queries.ts';
import { judgeWordsSchema } from '#shared/giving/desk-schemas.ts';

export function VerdictTold() {
  const verdicts = useMutationState({
    filters: { mutationKey: JUDGE_WORDS, status: 'success' },
    select: ({ state }) => judgeWordsSchema.loose().safeParse(state.variables).data?.verdict,
  });
  const last = verdicts.at(-1);
  return (
    <p className="vh" role="status">
      {last === 'passed' && `Passed. ${verdicts.length} read.`}
      {last === 'held' && `Held back. ${verdicts.length} read.`}
    </p>
  );
}
