// Ruled lines where rows will stand, shown only when the answer is slow.
import { useDelayed } from './use-delayed.ts';

const ROWS = ['one', 'two', 'three', 'four', 'five', 'six'];

export function WaitingRows({ words }: { words: string }) {
  const isLong = useDelayed(true);
  if (!isLong) return null;
  return (
    <div className="waiting" role="status">
      <p className="vh">{words}</p>
      {ROWS.map((row) => (
        <div key={row} className="waiting-row" aria-hidden="true">
          <i />
          <i />
          <i />
        </div>
      ))}
    </div>
  );
}
