// One London day of gifts: its name, its rows, and its sums once the whole day has been shown.
import { formatDay, weekdayOf } from '#shared/dates.ts';
import type { GiftDay } from '#shared/giving/desk-schemas.ts';
import { countGifts } from '#shared/giving/desk-words.ts';
import { formatLedger } from '#shared/money.ts';
import { GiftRowLine } from './GiftRowLine.tsx';

type Props = { day: GiftDay; reached: string | undefined };

export function GiftDayRows({ day: { day, rows, sums, isContinued, goesOn }, reached }: Props) {
  const hasSums = day !== null && !goesOn && sums.count > 1;
  return (
    <tbody role="rowgroup">
      {day !== null && (
        <tr role="row" className="dayrule2">
          <th role="rowheader" scope="rowgroup" colSpan={7}>
            {weekdayOf(day)} {formatDay(day)}
            {isContinued && ', continued'}
          </th>
        </tr>
      )}
      {rows.map((row) => (
        <GiftRowLine
          key={row.number}
          row={row}
          showsDay={day === null}
          isReached={reached === String(row.number)}
        />
      ))}
      {hasSums && (
        <tr role="row" className="sub">
          <td role="cell" />
          <th role="rowheader" scope="row" colSpan={2}>
            {countGifts(sums.count)}
          </th>
          <td role="cell" className="num" data-l="sum £">
            {formatLedger(sums.sumPence)}
          </td>
          <td role="cell" className="num aid" data-l="Gift Aid £">
            {formatLedger(sums.giftAidPence)}
          </td>
          <td role="cell" colSpan={2} />
        </tr>
      )}
    </tbody>
  );
}
