// After a page is turned in the browser: its title is told, and focus stands on its heading.
import { useEffect, useLayoutEffect, useRef } from 'react';
import { useLocation, useMatches } from 'react-router-dom';
import { readHandle, titleOf } from '#src/lib/route-handle.ts';

function focusHeading(): void {
  const main = document.querySelector('main');
  const target = main?.querySelector<HTMLElement>('h1') ?? main;
  if (!target) return;
  target.tabIndex = -1;
  target.focus({ preventScroll: true });
}

export function usePageTurn(societyName: string): void {
  const { pathname, hash } = useLocation();
  const matches = useMatches();
  const title = titleOf(matches, societyName);
  const place = readHandle(matches.at(-1)?.handle).place ?? pathname;
  const shown = useRef(place);

  // Before the effects of the page below, so that a page that failed has the last word on its title.
  useLayoutEffect(() => {
    document.title = title;
  }, [title, pathname]);
  useEffect(() => {
    if (shown.current === place) return;
    shown.current = place;
    if (!hash) focusHeading();
  }, [place, hash]);
}
