// Why the filter could not be asked. It takes the focus, and stands where the list would.
import { useEffect, useRef } from 'react';

/** `tries` grows with each “Show”, so that a second fault of the same words is told again. */
type Props = { words: string; tries: number };

export function GiftFilterFault({ words, tries }: Props) {
  const said = useRef<HTMLParagraphElement>(null);
  useEffect(() => said.current?.focus(), [words, tries]);
  return (
    <p className="overdue" role="alert" ref={said} tabIndex={-1}>
      {words} Until then no gifts are shown.
    </p>
  );
}
