// The Gift Aid declaration: what the gift becomes, the words that are declared, and the tick that is never ours.
import { useWatch } from 'react-hook-form';
import { chosenSum, type GiveSheet } from '#shared/giving/give-schemas.ts';
import { pence } from '#shared/money.ts';
import { Choice } from '#src/ui/Choice.tsx';
import { ChoiceGroup } from '#src/ui/ChoiceGroup.tsx';
import { SheetRow } from '#src/ui/SheetRow.tsx';
import { useHydrated } from '#src/ui/use-hydrated.ts';
import { worthWords } from './give-words.ts';
import { tickProps } from './sheet-fields.ts';
import type { SheetControls } from './use-give-form.ts';

const EACH_POUND = `Every ${worthWords(pence(100))}`;

/** What another sum becomes; without script it is not known while it is being written. */
function useOtherWorth(controls: SheetControls, sheet: GiveSheet): string {
  const other = useWatch({ control: controls.form.control, name: 'other' });
  const isHydrated = useHydrated();
  if (!isHydrated) return EACH_POUND;
  const sum = chosenSum({ amount: 'other', other }, { leastPence: sheet.leastPence });
  return 'pence' in sum ? worthWords(sum.pence) : EACH_POUND;
}

type Props = {
  controls: SheetControls;
  sheet: GiveSheet;
  giftAid: NonNullable<GiveSheet['giftAid']>;
  number: number;
};

export function GiftAidRow({ controls, sheet, giftAid, number }: Props) {
  const otherWorth = useOtherWorth(controls, sheet);
  return (
    <SheetRow
      number={number}
      heading="Gift Aid"
      note={
        <>
          <b>Tick only if it is your own money</b> and your own tax. It does not count for gifts from a
          company, a collection or a raffle. Higher-rate taxpayers may claim more back for themselves.
        </>
      }
    >
      <div className="declare">
        {/* The sum that is chosen shows its line by style sheet alone, so that it is true without script. */}
        <p className="worth">
          <span className="worth-5">{worthWords(pence(500))}</span>
          <span className="worth-20">{worthWords(pence(2000))}</span>
          <span className="worth-60">{worthWords(pence(6000))}</span>
          <span className="worth-other">{otherWorth}</span>
        </p>
        <ChoiceGroup name="declare" legend="Gift Aid declaration" fault={controls.faults.declare}>
          <Choice {...tickProps(controls, 'declare')}>{giftAid.wording}</Choice>
        </ChoiceGroup>
        <p className="small sans">{giftAid.notice}</p>
      </div>
    </SheetRow>
  );
}
