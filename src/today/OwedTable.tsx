// What is owed as one ruled list by day: late first, then today.
import type { ReactNode } from 'react';
import { dayOfMonth, formatDay, monthOf, weekdayOf, type Day } from '#shared/dates.ts';
import type { OwedRow } from '#shared/today/today-schemas.ts';
import { HeadRow } from '#src/ui/HeadRow.tsx';
import { OwedLine } from './OwedLine.tsx';
import { useRowThatLeft } from './use-row-that-left.ts';

type Props = { day: Day; rows: readonly OwedRow[] };

const HEADS = [
  { label: 'Day', isHidden: true },
  { label: 'Due' },
  { label: 'What, and who it is owed to' },
  { label: 'Has waited' },
  { label: 'Do', className: 'do' },
];

function TodayName({ day }: { day: Day }) {
  return (
    <>
      <span className="dnum" aria-hidden="true">
        {dayOfMonth(day)}
      </span>
      <span className="dname" aria-hidden="true">
        {weekdayOf(day)}
        <span className="mo">{monthOf(day)}</span>
      </span>
      <span className="vh">
        {weekdayOf(day)} {formatDay(day)}
      </span>
    </>
  );
}

type GroupProps = {
  className: string;
  name: ReactNode;
  rows: readonly OwedRow[];
  nextId: string | undefined;
};

function OwedGroup({ className, name, rows, nextId }: GroupProps) {
  const head = (
    <th role="rowheader" className="dayhead" scope="rowgroup" rowSpan={Math.max(1, rows.length)}>
      {name}
    </th>
  );
  return (
    <tbody role="rowgroup" className={className}>
      {rows.map((row, index) => (
        <OwedLine key={row.id} row={row} isNext={row.id === nextId} dayHead={index === 0 && head} />
      ))}
      {rows.length === 0 && (
        <tr role="row">
          {head}
          <td role="cell" className="none" colSpan={4}>
            Nothing is due.
          </td>
        </tr>
      )}
    </tbody>
  );
}

export function OwedTable({ day, rows }: Props) {
  const late = rows.filter((row) => row.due === 'late');
  const today = rows.filter((row) => row.due === 'today');
  const nextId = rows[0]?.id;
  const { onFocus } = useRowThatLeft([...late, ...today].map((row) => row.id));
  return (
    <table role="table" className="ruled daylist" onFocus={onFocus}>
      <caption className="vh">What is owed, by day</caption>
      <HeadRow heads={HEADS} />
      {late.length > 0 && (
        <OwedGroup
          className="day late"
          name={<span className="dnum word">Late</span>}
          rows={late}
          nextId={nextId}
        />
      )}
      <OwedGroup className="day today" name={<TodayName day={day} />} rows={today} nextId={nextId} />
    </table>
  );
}
