// After “Show” the focus stands on what was found; after a turn of the page, on its first row.
import { useEffect, useRef } from 'react';

const FIRST_ROW = '.giftlist a[data-row]';
const RESULT = '#sheet [data-result]';

/** `asked` and `after`: the filter that is asked for and the place within it; `isThere`: its answer has come. */
export function useResultFocus(asked: string, after: string, isThere: boolean): void {
  const shown = useRef({ asked, after });
  useEffect(() => {
    const before = shown.current;
    if (!isThere || (before.asked === asked && before.after === after)) return;
    shown.current = { asked, after };
    const place = before.asked === asked ? FIRST_ROW : RESULT;
    (document.querySelector<HTMLElement>(place) ?? document.getElementById('sheet'))?.focus();
  }, [asked, after, isThere]);
}
