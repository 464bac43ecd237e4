// What needs putting right, said once above the form and linked to each answer; it takes the focus.
import { useEffect, useRef, type MouseEvent } from 'react';
import type { FieldFaults } from '#shared/errors.ts';
import { goToAnswer } from './go-to-answer.ts';

const COUNTS = ['No', 'One', 'Two', 'Three', 'Four', 'Five', 'Six', 'Seven', 'Eight', 'Nine', 'Ten'];

/** “Two answers need putting right”, for the heading and the title of the page. */
export function faultsHeading(count: number): string {
  const words = COUNTS[count] ?? String(count);
  return count === 1 ? `${words} answer needs putting right` : `${words} answers need putting right`;
}

function followLink(event: MouseEvent<HTMLAnchorElement>, id: string): void {
  // Following the link itself would make a new step in the browser's history for each answer.
  if (goToAnswer(id)) event.preventDefault();
}

const lowerFirst = (words: string) => words.charAt(0).toLowerCase() + words.slice(1);

type Props<F extends string> = { faults: FieldFaults; labels: Record<F, string> };

export function ErrorSummary<F extends string>({ faults, labels }: Props<F>) {
  const box = useRef<HTMLDivElement>(null);
  const inOrder = Object.keys(labels).filter((field) => field in faults);
  const unknown = Object.keys(faults).filter((field) => !inOrder.includes(field));
  useEffect(() => box.current?.focus(), [faults]);
  const named: Record<string, string> = labels;
  return (
    <div className="faults" role="alert" tabIndex={-1} autoFocus aria-labelledby="faults-heading" ref={box}>
      <h2 id="faults-heading">{faultsHeading(inOrder.length + unknown.length)}</h2>
      <ul>
        {inOrder.map((field) => (
          <li key={field}>
            <a href={`#${field}`} onClick={(event) => followLink(event, field)}>
              {named[field]}: {lowerFirst(faults[field] ?? '')}
            </a>
          </li>
        ))}
        {unknown.map((field) => (
          <li key={field}>{faults[field]}</li>
        ))}
      </ul>
    </div>
  );
}
