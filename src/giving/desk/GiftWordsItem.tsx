// One piece of writing that came with a gift, and the verdict on it.
import { formatMoment } from '#shared/dates.ts';
import type { GiftWords, JudgeWords } from '#shared/giving/desk-schemas.ts';
import { WORDS_KIND_HEADS, wordsOfGift } from '#shared/giving/desk-words.ts';

type Props = {
  giftNumber: number;
  words: GiftWords;
  isNext: boolean;
  isBusy: boolean;
  onDecide: (verdict: JudgeWords['verdict']) => void;
};

const WITHHELD = 'Withheld with the name: the treasurer reads these words.';
const NEVER_SHOWN =
  'Read at the desk and then by the people who build her. A message is never shown to the public.';
const MAY_BE_SHOWN = 'May be shown to the public once passed.';

function familyWords(words: GiftWords): string | null {
  if (!words.hasContact) return null;
  const named = [words.contactName, words.contactEmail].filter(Boolean).join(', ');
  return `Told once the words are passed, ${words.mayTellSum ? 'with' : 'without'} the sum: ${named || 'one family contact'}.`;
}

function Verdict({ words }: { words: GiftWords }) {
  if (words.verdict === null) return <span className="w due">to be read</span>;
  const isPassed = words.verdict === 'passed';
  return (
    <>
      <span className={isPassed ? 'stamp wee done' : 'stamp wee bad'}>
        {isPassed ? 'Passed' : 'Held back'}
      </span>{' '}
      <span className="small ash">
        {words.readBy}
        {words.readAt && `, ${formatMoment(new Date(words.readAt))}`}
      </span>
    </>
  );
}

export function GiftWordsItem({ giftNumber, words, isNext, isBusy, onDecide }: Props) {
  const name = `the ${wordsOfGift(words.kind, giftNumber)}`;
  const family = familyWords(words);
  return (
    <li>
      <p className="ash">{WORDS_KIND_HEADS[words.kind]}</p>
      {words.words === null ? <p>{WITHHELD}</p> : <blockquote className="said">{words.words}</blockquote>}
      <p className="small ash">{words.kind === 'message' ? NEVER_SHOWN : MAY_BE_SHOWN}</p>
      {family && <p className="small ash">{family}</p>}
      <p>
        <Verdict words={words} />
      </p>
      {words.mayJudge && (
        <p className="acts">
          <button
            type="button"
            className={isNext ? 'act first' : 'act'}
            disabled={isBusy}
            onClick={() => onDecide('passed')}
          >
            Pass<span className="vh"> {name}</span>
          </button>
          <button type="button" className="act" disabled={isBusy} onClick={() => onDecide('held')}>
            Hold back<span className="vh"> {name}</span>
          </button>
        </p>
      )}
    </li>
  );
}
