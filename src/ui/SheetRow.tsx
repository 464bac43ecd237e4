// One numbered row of a ruled sheet: its heading, the answers, and a note in the margin.
import type { ReactNode } from 'react';

type Props = { number: number; heading: string; note?: ReactNode; children: ReactNode };

export function SheetRow({ number, heading, note, children }: Props) {
  return (
    <div className="row">
      <h2 className="h">
        <span className="no">{number}</span> {heading}
      </h2>
      <div className="fields">{children}</div>
      {note ? <p className="note">{note}</p> : null}
    </div>
  );
}
