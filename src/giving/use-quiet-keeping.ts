// Keeps the draft on the server when writing pauses, and whenever the sheet is put away with something new in it.
import { useCallback, useEffect, useRef } from 'react';
import { keptAnswers } from '#shared/giving/give-schemas.ts';
import type { FormTexts } from './give-form-data.ts';
import { keepDraftQuietly } from './give-queries.ts';

const PAUSE_MS = 3_000;

type QuietKeeping = {
  /** When the sheet was sent in the ordinary way, so that it is not sent once more. */
  markKept: () => void;
  /** When a press went no further than the page: loading it anew must find what was typed. */
  keepNow: () => void;
};

export function useQuietKeeping(readTexts: () => FormTexts): QuietKeeping {
  const lastKept = useRef<string | undefined>(undefined);
  const markKept = useCallback(() => {
    lastKept.current = JSON.stringify(keptAnswers(readTexts()));
  }, [readTexts]);
  const keepNow = useCallback(() => {
    const answers = keptAnswers(readTexts());
    const now = JSON.stringify(answers);
    if (now === lastKept.current) return;
    lastKept.current = now;
    keepDraftQuietly(answers);
  }, [readTexts]);
  useEffect(() => {
    if (lastKept.current === undefined) markKept();
    const onHiding = () => {
      if (document.visibilityState === 'hidden') keepNow();
    };
    let pause: number | undefined;
    const onWriting = () => {
      window.clearTimeout(pause);
      pause = window.setTimeout(keepNow, PAUSE_MS);
    };
    document.addEventListener('input', onWriting);
    document.addEventListener('visibilitychange', onHiding);
    // A page fetched anew is asked for before this one is hidden: what was typed must be there by then.
    window.addEventListener('beforeunload', keepNow);
    window.addEventListener('pagehide', keepNow);
    return () => {
      window.clearTimeout(pause);
      document.removeEventListener('input', onWriting);
      document.removeEventListener('visibilitychange', onHiding);
      window.removeEventListener('beforeunload', keepNow);
      window.removeEventListener('pagehide', keepNow);
      keepNow();
    };
  }, [markKept, keepNow]);
  return { markKept, keepNow };
}
