// One thing that is owed: due, what and to whom, how long it has waited, and the one thing to do.
import { useState, type ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { formatDay, weekdayOf } from '#shared/dates.ts';
import type { OwedRow } from '#shared/today/today-schemas.ts';
import { JudgeButtons } from './JudgeButtons.tsx';
import { Tally } from './Tally.tsx';

type Props = { row: OwedRow; isNext: boolean; dayHead: ReactNode };

const shortDay = (day: string): string =>
  `${weekdayOf(day).slice(0, 3)} ${formatDay(day).replace(/ \d+$/, '')}`;

export function OwedLine({ row, isNext, dayHead }: Props) {
  const [isOpen, setOpen] = useState(false);
  const look = isNext ? 'act first' : 'act';
  return (
    <tr role="row">
      {dayHead}
      <td role="cell" className={row.due === 'late' ? 'due late' : 'due'}>
        {row.due === 'late' ? shortDay(row.dueDay) : 'today'}
      </td>
      <td role="cell" className="what">
        {row.what} <span className="to">owed to {row.owedTo}</span>
        {row.action.kind === 'look' && isOpen && (
          <ul className="more" id={`more-${row.id}`}>
            {row.detail.map((line) => (
              <li key={line}>{line}</li>
            ))}
          </ul>
        )}
      </td>
      <td role="cell" className="waited">
        {row.waited}
        <Tally days={row.waitedDays} />
      </td>
      <td role="cell" className="do">
        {row.action.kind === 'judge' && <JudgeButtons action={row.action} isNext={isNext} />}
        {row.action.kind === 'open' && (
          <Link className={look} to={row.action.path}>
            {row.action.label}
            <span className="vh">: {row.what}</span>
          </Link>
        )}
        {row.action.kind === 'look' && (
          <button
            type="button"
            className={look}
            aria-expanded={isOpen}
            aria-controls={isOpen ? `more-${row.id}` : undefined}
            onClick={() => setOpen(!isOpen)}
          >
            {isOpen ? 'Fold it up' : row.action.label}
            <span className="vh">: {row.what}</span>
          </button>
        )}
      </td>
    </tr>
  );
}
