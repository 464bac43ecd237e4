// Whoever comes through the door stands at the heading of the first page: the form that was sent is gone.
import { useEffect, useRef } from 'react';
import { NavigationType, useLocation, useNavigationType } from 'react-router-dom';

export function useArrivalFocus(): void {
  const arrivedBy = useNavigationType();
  const { hash } = useLocation();
  const hasArrived = useRef(false);
  useEffect(() => {
    if (hasArrived.current) return;
    hasArrived.current = true;
    // A page that was loaded by its address begins at the top, and a named place is gone to by its page.
    if (arrivedBy === NavigationType.Pop || hash !== '') return;
    const heading = document.querySelector<HTMLElement>('main h1');
    if (!heading) return;
    heading.tabIndex = -1;
    heading.focus({ preventScroll: true });
  }, [arrivedBy, hash]);
}
