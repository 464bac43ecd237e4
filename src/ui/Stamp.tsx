// A state as a rubber stamp: a ruled box a little off square, always with the word.
import type { ReactNode } from 'react';

export type StampTone = 'plain' | 'done' | 'wait' | 'late';

type Props = { tone?: StampTone; mark?: ReactNode; children: ReactNode };

export function Stamp({ tone = 'plain', mark, children }: Props) {
  return (
    <span className={tone === 'plain' ? 'stamp' : `stamp ${tone}`}>
      {mark}
      {children}
    </span>
  );
}
