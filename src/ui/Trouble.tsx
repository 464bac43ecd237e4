// A trouble that is nobody's answer: no connection, a service that is away. Said above the form, with the way on.
import { useEffect, useRef, type ReactNode } from 'react';

type Props = { heading: string; children?: ReactNode };

export function Trouble({ heading, children }: Props) {
  const box = useRef<HTMLDivElement>(null);
  useEffect(() => box.current?.focus(), [heading]);
  return (
    <div className="faults" role="alert" tabIndex={-1} autoFocus aria-labelledby="trouble-heading" ref={box}>
      <h2 id="trouble-heading">{heading}</h2>
      {children}
    </div>
  );
}
