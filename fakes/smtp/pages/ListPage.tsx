// The letters that came, newest first, a page at a time.
import { formatMoment } from '#shared/dates.ts';
import type { KeptLetter } from '../letter-store.ts';
import type { Mode, PageChoice } from '../modes.ts';
import { ModeForm } from './ModeForm.tsx';
import { Sheet } from './Sheet.tsx';

export type ListPageProps = {
  letters: readonly KeptLetter[];
  /** How many match in all. */
  found: number;
  words: string;
  page: number;
  pages: number;
  mode: Mode;
  choice: PageChoice | null;
};

const address = (words: string, page: number): string =>
  `/?${new URLSearchParams({ ...(words && { words }), page: String(page) }).toString()}`;

function Turning({ words, page, pages }: Pick<ListPageProps, 'words' | 'page' | 'pages'>) {
  if (pages < 2) return null;
  return (
    <nav className="turning" aria-label="Pages of letters">
      {page > 1 && (
        <a rel="prev" href={address(words, page - 1)}>
          Newer
        </a>
      )}
      <span>
        Page {page} of {pages}
      </span>
      {page < pages && (
        <a rel="next" href={address(words, page + 1)}>
          Older
        </a>
      )}
    </nav>
  );
}

const countWords = (found: number): string =>
  found === 0 ? 'No letters' : found === 1 ? 'One letter' : `${found} letters`;

function Letters({ letters, found }: Pick<ListPageProps, 'letters' | 'found'>) {
  return (
    <table>
      <caption>{countWords(found)}, newest first</caption>
      <thead>
        <tr>
          <th scope="col">Letter</th>
          <th scope="col">To</th>
          <th scope="col">Came</th>
        </tr>
      </thead>
      <tbody>
        {letters.map((letter) => (
          <tr key={letter.id}>
            <th scope="row">
              <a href={`/letters/${letter.id}`}>{letter.subject || 'Without a subject'}</a>
            </th>
            <td>{letter.envelopeTo.join(', ')}</td>
            <td className="when">{formatMoment(new Date(letter.receivedAt))}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

export function ListPage({ letters, found, words, page, pages, mode, choice }: ListPageProps) {
  return (
    <Sheet title={words ? `Letters with “${words}”` : 'Mail received'}>
      <h1>Mail received</h1>
      <form className="find" role="search" method="get" action="/">
        <label htmlFor="words">Find by address, name or subject</label>
        <div className="row">
          <input id="words" name="words" type="search" defaultValue={words} />
          <button className="plain">Find</button>
        </div>
      </form>
      {found > 0 ? (
        <Letters letters={letters} found={found} />
      ) : (
        <p className="empty">
          {words ? (
            <>
              No letter has these words. <a href="/">All letters</a>
            </>
          ) : (
            'No letter has come yet. Give a gift on the site, and the thank-you arrives here.'
          )}
        </p>
      )}
      <Turning words={words} page={page} pages={pages} />
      <ModeForm chosen={choice} mode={mode} />
    </Sheet>
  );
}
