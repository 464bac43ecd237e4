// Says aloud what became of the words that were just judged, when their row is gone already.
import { useMutationState } from '@tanstack/react-query';
import { z } from 'zod';
import { VERDICTS } from '#shared/giving/desk-schemas.ts';
import type { OwedRow } from '#shared/today/today-schemas.ts';
import { JUDGE_WORDS } from '#src/giving/desk/gift-desk-queries.ts';

const judgedSchema = z.object({ wordsId: z.string(), verdict: z.enum(VERDICTS) });

export function VerdictTold({ rows }: { rows: readonly OwedRow[] }) {
  const judged = useMutationState({
    filters: { mutationKey: JUDGE_WORDS, status: 'success' },
    select: ({ state }) => judgedSchema.safeParse(state.variables).data,
  });
  const last = judged.at(-1);
  // A row that was just judged may stand in the list for a moment more.
  const left = rows.filter(
    ({ action }) => action.kind === 'judge' && judged.every((one) => one?.wordsId !== action.wordsId),
  ).length;
  return (
    <p className="vh" role="status" id="told" tabIndex={-1}>
      {last &&
        `${last.verdict === 'passed' ? 'Passed' : 'Held back'}. ${left === 0 ? 'Nothing is' : left} left to read.`}
    </p>
  );
}
