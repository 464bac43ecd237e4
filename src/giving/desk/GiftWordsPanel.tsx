// What the giver wrote, to be read by a person before anybody else sees it: pass it, or hold it back.
import type { GiftWords } from '#shared/giving/desk-schemas.ts';
import { WORDS_KIND_WORDS } from '#shared/giving/desk-words.ts';
import { formatMoment } from '#shared/dates.ts';
import { useJudgeWords } from './gift-desk-queries.ts';

type Props = { giftNumber: number; words: readonly GiftWords[] };

const WITHHELD = 'Withheld with the name: the treasurer reads these words.';

function familyWords(words: GiftWords): string | null {
  if (!words.hasContact) return null;
  const whom = words.contactName
    ? `${words.contactName}${words.contactEmail ? `, ${words.contactEmail}` : ''}`
    : 'One family contact';
  return `${whom}, is told once the words are passed, ${words.mayTellSum ? 'with' : 'without'} the sum.`;
}

function Verdict({ words }: { words: GiftWords }) {
  if (words.verdict === null) return <span className="w due">to be read</span>;
  return (
    <>
      <span className={words.verdict === 'passed' ? 'stamp wee done' : 'stamp wee bad'}>
        {words.verdict === 'passed' ? 'Passed' : 'Held back'}
      </span>{' '}
      <span className="small ash">
        {words.readBy}, {words.readAt && formatMoment(new Date(words.readAt))}
      </span>
    </>
  );
}

export function GiftWordsPanel({ giftNumber, words }: Props) {
  const judge = useJudgeWords();
  if (words.length === 0) return null;
  const next = words.find((one) => one.mayJudge)?.id;
  return (
    <section className="sec" aria-labelledby="words">
      <h2 id="words">Words from the giver</h2>
      <ul className="owed">
        {words.map((one) => {
          const name = `the words ${WORDS_KIND_WORDS[one.kind]}`;
          const decide = (verdict: 'passed' | 'held') => () =>
            judge.mutate({ giftNumber, wordsId: one.id, verdict });
          return (
            <li key={one.id}>
              <p className="kind ash">{WORDS_KIND_WORDS[one.kind]}</p>
              {one.words === null ? <p>{WITHHELD}</p> : <blockquote className="said">{one.words}</blockquote>}
              {familyWords(one) && <p className="small ash">{familyWords(one)}</p>}
              <p>
                <Verdict words={one} />
              </p>
              {one.mayJudge && (
                <p className="acts">
                  <button
                    type="button"
                    className={one.id === next ? 'act first' : 'act'}
                    onClick={decide('passed')}
                    disabled={judge.isPending}
                  >
                    Pass<span className="vh"> {name}</span>
                  </button>
                  <button type="button" className="act" onClick={decide('held')} disabled={judge.isPending}>
                    Hold back<span className="vh"> {name}</span>
                  </button>
                </p>
              )}
            </li>
          );
        })}
      </ul>
      <p className="overdue" role="alert">
        {judge.isError && `This was not kept. ${judge.error.message}`}
      </p>
      <p className="vh" role="status">
        {judge.isSuccess && (judge.variables.verdict === 'passed' ? 'Passed.' : 'Held back.')}
      </p>
    </section>
  );
}
