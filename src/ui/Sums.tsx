// A short table of sums; the one that counts is double-ruled.
import { formatPence, type Pence } from '#shared/money.ts';

export type SumLine = { words: string; sumPence: Pence; isTotal?: boolean };

type Props = { caption: string; lines: readonly SumLine[] };

export function Sums({ caption, lines }: Props) {
  return (
    <table className="sums">
      <caption className="visually-hidden">{caption}</caption>
      <tbody>
        {lines.map(({ words, sumPence, isTotal }) => (
          <tr key={words} className={isTotal ? 'total' : undefined}>
            <th scope="row">{words}</th>
            <td>{formatPence(sumPence)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
