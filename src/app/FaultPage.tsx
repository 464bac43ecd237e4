// What a reader is told when nothing stands at an address, or something went wrong.
import { useEffect } from 'react';
import { useRouteError } from 'react-router-dom';
import { toPageFault, type PageFault } from '#src/lib/page-fault.ts';
import { paths } from './paths.ts';

const WORDS: Record<PageFault['kind'], { title: string; text: string }> = {
  'not-found': {
    title: 'Nothing stands here',
    text: 'There is no page at this address. It may have been typed with a slip, or the page may have moved.',
  },
  'no-answer': {
    title: 'No answer came',
    text: 'The connection was lost on the way. Nothing was half done. Look to your connection and try again.',
  },
  refused: { title: 'This cannot be opened', text: 'The site will not open this page as it was asked for.' },
  fault: {
    title: 'Something went wrong here',
    text: 'The fault is ours, not yours, and it is written in our log. Nothing was half done. Try again in a minute.',
  },
};

export const faultTitle = (error: unknown): string => WORDS[toPageFault(error).kind].title;

export function FaultPage() {
  const fault = toPageFault(useRouteError());
  const words = WORDS[fault.kind];
  useEffect(() => {
    document.title = words.title;
  }, [words.title]);
  return (
    <main id="main" className="prose">
      <h1>{words.title}</h1>
      <p className="lead">{fault.detail ?? words.text}</p>
      {fault.requestId !== null && (
        <p className="sans small">
          If you write to us about it, give this number: <b>{fault.requestId}</b>
        </p>
      )}
      <p>
        {fault.kind === 'no-answer' || fault.kind === 'fault' ? (
          <>
            <a href="">Try again</a>, or <a href={paths.home}>go to the figure</a>.
          </>
        ) : (
          <a href={paths.home}>Go to the figure</a>
        )}
      </p>
    </main>
  );
}
