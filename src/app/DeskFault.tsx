// In place of a sheet that could not be drawn; the rail stays where it is.
import { useEffect } from 'react';
import { Link, useRouteError } from 'react-router-dom';
import { toPageFault, type PageFault } from '#src/lib/page-fault.ts';
import { faultTitle } from './FaultPage.tsx';
import { paths } from './paths.ts';

const WORDS: Record<PageFault['kind'], string> = {
  'not-found': 'There is no such room or page at the desk.',
  'no-answer': 'The connection was lost on the way. Nothing was half done.',
  refused: 'The desk will not open this page as it was asked for.',
  fault: 'The fault is ours, and it is written in our log. Nothing was half done.',
};

export function DeskFault() {
  const error = useRouteError();
  const fault = toPageFault(error);
  const title = faultTitle(error);
  useEffect(() => {
    document.title = title;
  }, [title]);
  return (
    <main className="sheet" id="sheet" tabIndex={-1}>
      <div className="title">
        <h1>{title}</h1>
      </div>
      <div className="again">
        <p>{fault.detail ?? WORDS[fault.kind]}</p>
        {fault.requestId !== null && (
          <p className="small ash">
            Number of this request: <b>{fault.requestId}</b>
          </p>
        )}
        <p className="acts">
          <Link className="act" to={paths.desk} reloadDocument>
            Go to Today
          </Link>
        </p>
      </div>
    </main>
  );
}
