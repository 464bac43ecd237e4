// In place of gifts that are not for this person, or of a gift that is not there: why, and the way back.
import { useEffect, useRef, type ReactNode } from 'react';
import { Link } from 'react-router-dom';

type Props = { title: string; children: ReactNode; wayBack?: ReactNode };

export function GiftRefusal({ title, children, wayBack }: Props) {
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => {
    document.title = title;
    heading.current?.focus({ preventScroll: true });
  }, [title]);
  return (
    <main className="sheet" id="sheet" tabIndex={-1}>
      <div className="title">
        <h1 ref={heading} tabIndex={-1}>
          {title}
        </h1>
      </div>
      <div className="again">
        {children}
        <p className="acts">
          {wayBack}
          <Link className="act" to="/desk">
            Back to Today
          </Link>
        </p>
      </div>
    </main>
  );
}
