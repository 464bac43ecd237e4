// The ruled ledger of gifts, day by day, with the total of all that the filter shows.
import type { GiftFilter, GiftList } from '#shared/giving/desk-schemas.ts';
import { countGifts } from '#shared/giving/desk-words.ts';
import { formatLedger } from '#shared/money.ts';
import { HeadRow } from '#src/ui/HeadRow.tsx';
import { GiftDayRows } from './GiftDayRows.tsx';
import { useRowKeys } from './use-row-keys.ts';

type Props = { list: GiftList; sort: GiftFilter['sort'] };

const HEADS = [
  { label: 'No.' },
  { label: 'From whom' },
  { label: 'How and for what' },
  { label: 'Sum £', className: 'num' },
  { label: 'Gift Aid £', className: 'num' },
  { label: 'Thanks' },
  { label: 'Words' },
];

export function GiftTable({ list: { days, total }, sort }: Props) {
  const first = days[0]?.rows[0]?.number;
  const { current, onKeyDown } = useRowKeys(first === undefined ? undefined : String(first));
  return (
    <table role="table" className="ruled giftlist" onKeyDown={onKeyDown}>
      <caption className="vh">
        Gifts, {sort === 'largest' ? 'largest first' : `day by day, ${sort} first`}
      </caption>
      <HeadRow heads={HEADS} />
      {days.map((day) => (
        <GiftDayRows key={day.day ?? 'all'} day={day} reached={current} />
      ))}
      <tfoot role="rowgroup">
        <tr role="row">
          <td role="cell" />
          <th role="rowheader" scope="row" colSpan={2}>
            {countGifts(total.count)} in all
          </th>
          <td role="cell" className="num" data-l="sum £">
            {formatLedger(total.sumPence)}
          </td>
          <td role="cell" className="num aid" data-l="Gift Aid £">
            {formatLedger(total.giftAidPence)}
          </td>
          <td role="cell" colSpan={2} />
        </tr>
      </tfoot>
    </table>
  );
}
