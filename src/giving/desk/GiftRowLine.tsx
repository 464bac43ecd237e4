// One gift in the ledger list; its giver's name opens the gift.
import { Link } from 'react-router-dom';
import { formatDay } from '#shared/dates.ts';
import type { GiftRow } from '#shared/giving/desk-schemas.ts';
import { DEDICATION_WORDS } from '#shared/giving/desk-words.ts';
import { formatLedger, NOTHING } from '#shared/money.ts';
import { ThanksMark } from './ThanksMark.tsx';

type Props = { row: GiftRow; showsDay: boolean; isReached: boolean };

export function GiftRowLine({ row, showsDay, isReached }: Props) {
  const how = [row.how, `for ${row.towards}`, row.dedication && DEDICATION_WORDS[row.dedication]];
  return (
    <tr role="row">
      <td role="cell" className="no">
        {row.number}
      </td>
      <th role="rowheader" scope="row" className="who1">
        <Link to={`/desk/gifts/${row.number}`} data-row={row.number} tabIndex={isReached ? 0 : -1}>
          {row.giver}
        </Link>
        {row.isWithheld && <span className="only"> for the treasurer only</span>}
      </th>
      <td role="cell" className="how">
        {how.filter(Boolean).join(', ')}
        {showsDay && <span className="on">{formatDay(row.day)}</span>}
      </td>
      <td role="cell" className="num" data-l="sum £">
        {formatLedger(row.sumPence)}
      </td>
      <td role="cell" className="num aid" data-l="Gift Aid £">
        {row.giftAidPence === NOTHING ? '' : formatLedger(row.giftAidPence)}
      </td>
      <td role="cell" className="s" data-l="thanks">
        <ThanksMark state={row.thanks} />
      </td>
      <td role="cell" className="s" data-l="words">
        {row.unreadWords > 0 && <span className="w due">{row.unreadWords} to read</span>}
      </td>
    </tr>
  );
}
