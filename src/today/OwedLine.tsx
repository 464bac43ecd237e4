// One thing that is owed: due, what and to whom, how long it has waited, and the one thing to do.
import { useState, type ReactNode } from 'react';
import { formatDay, weekdayOf, type Day } from '#shared/dates.ts';
import type { OwedRow } from '#shared/today/today-schemas.ts';
import { OwedDo } from './OwedDo.tsx';
import { SettlePayment } from './SettlePayment.tsx';
import { Tally } from './Tally.tsx';

type Props = { row: OwedRow; isNext: boolean; dayHead: ReactNode };

/** Thu 29 April */
const shortDay = (day: Day): string => `${weekdayOf(day).slice(0, 3)} ${formatDay(day).replace(/ \d+$/, '')}`;

export function OwedLine({ row, isNext, dayHead }: Props) {
  const [isOpen, setOpen] = useState(false);
  const isLate = row.due === 'late';
  return (
    <tr role="row" data-owed={row.id}>
      {dayHead}
      <td role="cell" className={isLate ? 'due late' : 'due'}>
        {isLate ? shortDay(row.dueDay) : 'today'}
      </td>
      <td role="cell" className="what">
        {row.what} <span className="to">owed to {row.owedTo}</span>
        {isOpen && (
          <div className="more" id={`more-${row.id}`}>
            <ul>
              {row.detail.map((line) => (
                <li key={line}>{line}</li>
              ))}
            </ul>
            {row.action.kind === 'settle' && <SettlePayment action={row.action} />}
          </div>
        )}
      </td>
      <td role="cell" className="waited">
        {row.waited}
        <Tally days={row.waitedDays} />
      </td>
      <td role="cell" className="do">
        <OwedDo row={row} isNext={isNext} isOpen={isOpen} onLook={() => setOpen(!isOpen)} />
      </td>
    </tr>
  );
}
