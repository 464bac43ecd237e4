// What is owed as one ruled list by day: late first, then today.
import { dayOfMonth, formatDay, monthOf, weekdayOf, type Day } from '#shared/dates.ts';
import type { OwedRow } from '#shared/today/today-schemas.ts';
import { OwedLine } from './OwedLine.tsx';

type Props = { day: Day; rows: readonly OwedRow[] };

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

export function OwedTable({ day, rows }: Props) {
  const late = rows.filter((row) => row.due === 'late');
  const today = rows.filter((row) => row.due === 'today');
  const nextId = rows[0]?.id;
  const groups = [
    { className: 'day late', name: <span className="dnum word">Late</span>, rows: late },
    { className: 'day today', name: <TodayName day={day} />, rows: today },
  ];
  return (
    <table role="table" className="ruled daylist">
      <caption className="vh">What is owed, by day</caption>
      <thead role="rowgroup">
        <tr role="row">
          <th role="columnheader" scope="col">
            <span className="vh">Day</span>
          </th>
          <th role="columnheader" scope="col">
            Due
          </th>
          <th role="columnheader" scope="col">
            What, and who it is owed to
          </th>
          <th role="columnheader" scope="col">
            Has waited
          </th>
          <th role="columnheader" scope="col" className="do">
            Do
          </th>
        </tr>
      </thead>
      {groups.map(({ className, name, rows: owed }) => {
        const head = (
          <th role="rowheader" className="dayhead" scope="rowgroup" rowSpan={Math.max(1, owed.length)}>
            {name}
          </th>
        );
        if (owed.length === 0 && className === 'day late') return null;
        return (
          <tbody role="rowgroup" className={className} key={className}>
            {owed.map((row, index) => (
              <OwedLine key={row.id} row={row} isNext={row.id === nextId} dayHead={index === 0 && head} />
            ))}
            {owed.length === 0 && (
              <tr role="row">
                {head}
                <td role="cell" className="none" colSpan={4}>
                  Nothing is due.
                </td>
              </tr>
            )}
          </tbody>
        );
      })}
    </table>
  );
}
