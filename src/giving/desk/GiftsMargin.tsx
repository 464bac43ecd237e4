// Beside the list: what was lately done, the keys, and what the marks mean.
import type { HistoryLine } from '#shared/giving/desk-schemas.ts';
import { HistoryList } from '#src/ui/HistoryList.tsx';
import { toHistoryItem } from './history-item.ts';

export function GiftsMargin({ history }: { history: readonly HistoryLine[] }) {
  return (
    <aside className="margin" aria-label="History and notes">
      <h2>History</h2>
      <HistoryList items={history.map(toHistoryItem)} />
      <h2>Keys</h2>
      <dl className="keylist">
        <div>
          <dt>
            <kbd>↑</kbd> <kbd>↓</kbd>
          </dt>
          <dd>up and down the list, once it has the cursor</dd>
        </div>
        <div>
          <dt>
            <kbd>Enter</kbd>
          </dt>
          <dd>opens the gift</dd>
        </div>
      </dl>
      <h2>Good to know</h2>
      <p className="note">
        Every gift is owed its thanks. A stamp says that they went; plain words say what they wait for.
      </p>
      <p className="note">
        Gift Aid here is an estimate, 25p in the pound of each gift with a declaration that stands.
      </p>
      <p className="note">
        A giver may ask to be known to the treasurer only. Everybody else reads “name withheld”, here and in
        the CSV.
      </p>
    </aside>
  );
}
