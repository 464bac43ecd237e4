// How a thank-you stands: stamped once it is done, in plain words while it waits.
import type { ThanksState } from '#shared/giving/desk-schemas.ts';
import { THANKS_WORDS } from '#shared/giving/desk-words.ts';

const OWED: readonly ThanksState[] = ['failed', 'uncertain', 'not-written'];

export function ThanksMark({ state }: { state: ThanksState }) {
  if (state === 'thanked') return <span className="stamp wee done">{THANKS_WORDS.thanked}</span>;
  return <span className={OWED.includes(state) ? 'w due' : 'w'}>{THANKS_WORDS[state]}</span>;
}
