// In place of gifts that are not for this person, or of a gift that is not there: why, and the way back.
import { useEffect, useRef, type ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { toPageFault } from '#src/lib/page-fault.ts';

type Props = { title: string; children: ReactNode };

function Refusal({ title, children }: Props) {
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
      <div className="again">{children}</div>
    </main>
  );
}

const ToToday = (
  <Link className="act" to="/desk">
    Back to Today
  </Link>
);

export const isForbidden = (error: unknown): boolean => error !== null && toPageFault(error).status === 403;
export const isMissing = (error: unknown): boolean =>
  error !== null && toPageFault(error).kind === 'not-found';

export const NotForYourRoles = () => (
  <Refusal title="Not for your roles">
    <p>
      Gifts are read by the chair, the treasurer, the secretary and the examiner. The chair gives the roles.
    </p>
    <p className="acts">{ToToday}</p>
  </Refusal>
);

export const NoSuchGift = ({ number }: { number: string }) => (
  <Refusal title={`There is no gift ${number}`}>
    <p>The number may have been typed with a slip.</p>
    <p className="acts">
      <Link className="act" to="/desk/gifts">
        All gifts
      </Link>{' '}
      {ToToday}
    </p>
  </Refusal>
);
