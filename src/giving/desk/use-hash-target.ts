// A link to a place within a page that is still being asked for: once it is there, the place is gone to.
import { useEffect } from 'react';
import { useLocation } from 'react-router-dom';

export function useHashTarget(isThere: boolean): void {
  const { hash } = useLocation();
  useEffect(() => {
    if (!isThere || hash === '') return;
    const place = document.getElementById(decodeURIComponent(hash.slice(1)));
    if (!place) return;
    place.tabIndex = -1;
    place.scrollIntoView();
    place.focus({ preventScroll: true });
  }, [isThere, hash]);
}
