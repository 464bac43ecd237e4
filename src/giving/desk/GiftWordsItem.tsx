// One piece of writing that came with a gift, and the verdict on it.
import { formatMoment } from '#shared/dates.ts';
import type { GiftWords, JudgeWords } from '#shared/giving/desk-schemas.ts';
import { WORDS_KIND_WORDS } from '#shared/giving/desk-words.ts';

type Props = {
  words: GiftWords;
  isNext: boolean;
  isBusy: boolean;
  onDecide: (verdict: JudgeWords['verdict']) => void;
};

const WITHHELD = 'Withheld with the name: the treasurer reads these words.';

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

export function GiftWordsItem({ words, isNext, isBusy, onDecide }: Props) {
  const name = `the words ${WORDS_KIND_WORDS[words.kind]}`;
  const family = familyWords(words);
  return (
    <li>
      <p className="ash">{WORDS_KIND_WORDS[words.kind]}</p>
      {words.words === null ? <p>{WITHHELD}</p> : <blockquote className="said">{words.words}</blockquote>}
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
