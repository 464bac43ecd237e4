// Why the filter could not be asked. It takes the focus, and stands where the list would.
import { useEffect, useRef } from 'react';

export type FilterFault = { words: string };

export function GiftFilterFault({ fault }: { fault: FilterFault }) {
  const said = useRef<HTMLParagraphElement>(null);
  // Each try makes a fault of its own, so that a second one of the same words is told again.
  useEffect(() => said.current?.focus(), [fault]);
  return (
    <p className="overdue" role="alert" ref={said} tabIndex={-1}>
      {fault.words} Until then no gifts are shown.
    </p>
  );
}
