// Up and down go from row to row of a list; one row at a time can be reached by the tab key.
import { useState, type KeyboardEvent } from 'react';

const STEPS: Record<string, (at: number, last: number) => number> = {
  ArrowDown: (at, last) => Math.min(at + 1, last),
  ArrowUp: (at) => Math.max(at - 1, 0),
  Home: () => 0,
  End: (_at, last) => last,
};
const ROW_LINKS = 'a[data-row]';

/** `current` is the key of the row that the tab key reaches; the first one until the list is walked. */
export function useRowKeys(firstKey: string | undefined) {
  const [walked, setWalked] = useState<string>();
  const onKeyDown = (event: KeyboardEvent<HTMLTableElement>): void => {
    const step = STEPS[event.key];
    if (!step || event.ctrlKey || event.metaKey || event.altKey || event.shiftKey) return;
    const links = [...event.currentTarget.querySelectorAll<HTMLAnchorElement>(ROW_LINKS)];
    const at = links.findIndex((link) => link === document.activeElement);
    const next = at < 0 ? undefined : links[step(at, links.length - 1)];
    if (!next) return;
    event.preventDefault();
    next.focus();
    setWalked(next.dataset.row);
  };
  return { current: walked ?? firstKey, onKeyDown };
}
