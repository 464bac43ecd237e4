// The one thing to do about what is owed: judge words at once, open its page, or see what is known and settle it.
import { Link } from 'react-router-dom';
import type { OwedRow } from '#shared/today/today-schemas.ts';
import { JudgeButtons } from './JudgeButtons.tsx';

type Props = { row: OwedRow; isNext: boolean; isOpen: boolean; onLook: () => void };

export function OwedDo({ row: { id, what, action }, isNext, isOpen, onLook }: Props) {
  const look = isNext ? 'act first' : 'act';
  const about = <span className="vh">: {what}</span>;
  switch (action.kind) {
    case 'judge':
      return <JudgeButtons action={action} isNext={isNext} />;
    case 'open':
      return (
        <Link className={look} to={action.path}>
          {action.label}
          {about}
        </Link>
      );
    case 'look':
    case 'settle':
      return (
        <button
          type="button"
          className={look}
          aria-expanded={isOpen}
          aria-controls={isOpen ? `more-${id}` : undefined}
          onClick={onLook}
        >
          {isOpen ? 'Fold it up' : action.label}
          {about}
        </button>
      );
  }
}
