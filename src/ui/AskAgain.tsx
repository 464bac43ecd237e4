// Said in place of a list that did not come, with the way to ask once more.
import { toPageFault } from '#src/lib/page-fault.ts';

type Props = { what: string; error: unknown; onAgain: () => void };

const WHY = {
  'no-answer': 'The connection was lost on the way. Look to it and try again.',
  refused: 'The desk will not open this for your roles.',
  'not-found': 'There is nothing at this address.',
  fault: 'The fault is ours, and it is written in our log. Try again in a minute.',
} as const;

export function AskAgain({ what, error, onAgain }: Props) {
  const fault = toPageFault(error);
  return (
    <div className="again" role="alert">
      <h2>{what} did not come</h2>
      <p>{fault.detail ?? WHY[fault.kind]}</p>
      {fault.requestId !== null && (
        <p className="small ash">
          Number of this request: <b>{fault.requestId}</b>
        </p>
      )}
      {fault.kind !== 'not-found' && fault.kind !== 'refused' && (
        <p className="acts">
          <button type="button" className="act" onClick={onAgain}>
            Try again
          </button>
        </p>
      )}
    </div>
  );
}
