// Keeps the draft on the server whenever the sheet is put away with something new in it: tab left, page closed.
import { useCallback, useEffect, useRef } from 'react';
import { keptAnswers } from '#shared/giving/give-schemas.ts';
import type { FormTexts } from './give-form-data.ts';
import { keepDraftQuietly } from './give-queries.ts';

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
    document.addEventListener('visibilitychange', onHiding);
    window.addEventListener('pagehide', keepWhatIsNew);
    return () => {
      document.removeEventListener('visibilitychange', onHiding);
      window.removeEventListener('pagehide', keepWhatIsNew);
      keepWhatIsNew();
    };
  }, [readTexts, markKept]);
  return markKept;
}
