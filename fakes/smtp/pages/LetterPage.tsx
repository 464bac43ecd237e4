// One letter: as it looks, as plain text, and every header that it carried.
import type { KeptLetter } from '../letter-store.ts';
import { formatMoment } from '#shared/dates.ts';
import { Sheet } from './Sheet.tsx';

export type LetterPageProps = {
  letter: KeptLetter;
  plain: string;
  hasHtml: boolean;
  headers: readonly string[];
};

const ADDRESS = /(https?:\/\/[^\s<>"')]+)/;

/** Addresses in the text can be followed, as in any mail reader. */
function Plain({ text }: { text: string }) {
  return (
    <pre className="plain-text">
      {text.split(ADDRESS).map((piece, index) =>
        index % 2 === 1 ? (
          <a key={`${index}-${piece}`} href={piece}>
            {piece}
          </a>
        ) : (
          piece
        ),
      )}
    </pre>
  );
}

function Envelope({ letter }: Pick<LetterPageProps, 'letter'>) {
  const rows = [
    ['From', letter.fromText],
    ['To', letter.toText],
    ['Envelope', `${letter.envelopeFrom} to ${letter.envelopeTo.join(', ')}`],
    ['Came', formatMoment(new Date(letter.receivedAt))],
  ];
  return (
    <dl className="envelope">
      {rows.map(([name, words]) => (
        <div key={name}>
          <dt>{name}</dt>
          <dd>{words}</dd>
        </div>
      ))}
    </dl>
  );
}

export function LetterPage({ letter, plain, hasHtml, headers }: LetterPageProps) {
  const subject = letter.subject || 'Without a subject';
  return (
    <Sheet title={subject}>
      <p className="back">
        <a href="/">All letters</a>
      </p>
      <h1>{subject}</h1>
      <Envelope letter={letter} />
      {hasHtml && (
        <section aria-labelledby="as-seen">
          <h2 id="as-seen">As it looks</h2>
          <iframe
            title={`The letter “${subject}” as it looks`}
            src={`/letters/${letter.id}/html`}
            sandbox="allow-popups allow-popups-to-escape-sandbox"
          />
        </section>
      )}
      <section aria-labelledby="as-text">
        <h2 id="as-text">As plain text</h2>
        <Plain text={plain} />
      </section>
      <section aria-labelledby="headers">
        <h2 id="headers">Headers</h2>
        <pre>{headers.join('\n')}</pre>
        <p>
          <a href={`/letters/${letter.id}/source`}>The whole letter as it came</a>
        </p>
      </section>
    </Sheet>
  );
}
