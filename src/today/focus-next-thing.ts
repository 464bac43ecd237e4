// The row that had the cursor has left the list: the next thing to do gets it, or the page when all is done.

export function focusNextThing(): void {
  if (document.activeElement !== document.body && document.activeElement !== null) return;
  const next = document.querySelector<HTMLElement>('.daylist .do :is(a, button)');
  (next ?? document.getElementById('sheet'))?.focus();
}
