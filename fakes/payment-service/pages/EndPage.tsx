// What the card page's address shows when there is nothing more to pay there.
import { Sheet } from './Sheet.tsx';

type Props = { heading: string; words: string; link?: { href: string; words: string } | undefined };

export function EndPage({ heading, words, link }: Props) {
  return (
    <Sheet title={heading}>
      <h1>{heading}</h1>
      <p>{words}</p>
      {link && (
        <p>
          <a href={link.href}>{link.words}</a>
        </p>
      )}
    </Sheet>
  );
}
