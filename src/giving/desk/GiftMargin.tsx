// Beside one gift: its audit trail, newest first, and what to be careful of.
import type { GiftChain } from '#shared/giving/desk-schemas.ts';
import { HistoryList } from '#src/ui/HistoryList.tsx';

export function GiftMargin({ gift }: { gift: GiftChain | undefined }) {
  return (
    <aside className="margin" aria-label="History and notes">
      <h2>History</h2>
      <HistoryList items={gift?.history ?? []} />
      <h2>Good to know</h2>
      {gift?.isWithheld && (
        <p className="note">
          <b>Name withheld.</b> The giver asked to be known to the treasurer only. Name, address, words and
          letters are shown to nobody else, the chair included.
        </p>
      )}
      <p className="note">
        The history cannot be altered, by us or by anybody. It holds numbers and sums, never names of givers.
      </p>
      <p className="note">
        Wall words and dedications may be shown once they are passed. A message never is: it is read here and
        then by the people who build her.
      </p>
      <p className="note">A family is told once, and only after its dedication is passed.</p>
    </aside>
  );
}
