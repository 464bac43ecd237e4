// The row that had the cursor has left the list: the next row gets it, or what is said of the last one.
import { useEffect, useRef, type FocusEvent } from 'react';

const controlOf = (id: string): HTMLElement | null =>
  document.querySelector<HTMLElement>(`[data-owed="${CSS.escape(id)}"] .do :is(a, button)`);

export function useRowThatLeft(ids: readonly string[]) {
  const shown = useRef(ids);
  const lastFocused = useRef<string | undefined>(undefined);
  useEffect(() => {
    const before = shown.current;
    shown.current = ids;
    const left = lastFocused.current;
    if (left === undefined || ids.includes(left)) return;
    lastFocused.current = undefined;
    // Whoever has gone on to something else is left there.
    if (document.activeElement !== document.body && document.activeElement !== null) return;
    const nextId = before.slice(before.indexOf(left)).find((id) => ids.includes(id)) ?? ids.at(-1);
    const next = nextId === undefined ? document.getElementById('told') : controlOf(nextId);
    (next ?? document.getElementById('sheet'))?.focus();
  }, [ids]);
  const onFocus = (event: FocusEvent<HTMLElement>): void => {
    lastFocused.current = event.target.closest<HTMLElement>('[data-owed]')?.dataset.owed;
  };
  return { onFocus };
}
