// Keeps the draft on the server when writing pauses, and whenever the sheet is put away with something new in it.
import { useCallback, useEffect, useRef } from 'react';
import { keptAnswers } from '#shared/giving/give-schemas.ts';
import type { FormTexts } from './give-form-data.ts';
import { keepDraftQuietly } from './give-queries.ts';

const PAUSE_MS = 3_000;

/** @returns what to call when the sheet was sent in the ordinary way, so that it is not sent once more. */
export function useQuietKeeping(readTexts: () => FormTexts): () => void {
  const lastKept = useRef<string | undefined>(undefined);
  const markKept = useCallback(() => {
    lastKept.current = JSON.stringify(keptAnswers(readTexts()));
  }, [readTexts]);
  useEffect(() => {
    if (lastKept.current === undefined) markKept();
    const keepWhatIsNew = () => {
      const answers = keptAnswers(readTexts());
      const now = JSON.stringify(answers);
      if (now === lastKept.current) return;
      lastKept.current = now;
      keepDraftQuietly(answers);
    };
    const onHiding = () => {
      if (document.visibilityState === 'hidden') keepWhatIsNew();
    };
    let pause: number | undefined;
    const onWriting = () => {
      window.clearTimeout(pause);
      pause = window.setTimeout(keepWhatIsNew, PAUSE_MS);
    };
    document.addEventListener('input', onWriting);
    document.addEventListener('visibilitychange', onHiding);
    // A page fetched anew is asked for before this one is hidden: what was typed must be there by then.
    window.addEventListener('beforeunload', keepWhatIsNew);
    window.addEventListener('pagehide', keepWhatIsNew);
    return () => {
      window.clearTimeout(pause);
      document.removeEventListener('input', onWriting);
      document.removeEventListener('visibilitychange', onHiding);
      window.removeEventListener('beforeunload', keepWhatIsNew);
      window.removeEventListener('pagehide', keepWhatIsNew);
      keepWhatIsNew();
    };
  }, [readTexts, markKept]);
  return markKept;
}
