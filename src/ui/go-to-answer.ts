// Takes the reader to an answer of a form: to what is chosen, where the answer is one of several.

/** Links to a question with choices name its first one; the reader is brought to the one that is chosen. */
function placeToAnswer(named: HTMLElement): HTMLElement {
  if (!(named instanceof HTMLInputElement) || named.type !== 'radio') return named;
  const all = named.form?.querySelectorAll<HTMLInputElement>('input[type="radio"]') ?? [];
  const chosen = [...all].find(({ name, checked }) => name === named.name && checked) ?? named;
  // The choice of another sum is answered by writing it.
  return chosen.closest('.other')?.querySelector<HTMLInputElement>('input[type="text"]') ?? chosen;
}

/** @returns whether there is such an answer. The style sheet leaves room above it for its label. */
export function goToAnswer(id: string): boolean {
  const named = document.getElementById(id);
  if (!named) return false;
  const answer = placeToAnswer(named);
  answer.focus({ preventScroll: true });
  const isChoice = named instanceof HTMLInputElement && named.type === 'radio';
  const row = isChoice ? named.closest('.row') : null;
  (row ?? answer).scrollIntoView({ block: 'start' });
  // The chosen one of a long list may stand below the view that begins with the heading.
  if (row) answer.scrollIntoView({ block: 'nearest' });
  return true;
}
