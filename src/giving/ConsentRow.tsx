// Which letters a giver agrees to, channel by channel, none of them ticked beforehand.
import { Choice } from '#src/ui/Choice.tsx';
import { ChoiceGroup } from '#src/ui/ChoiceGroup.tsx';
import { SheetRow } from '#src/ui/SheetRow.tsx';
import { GIVE_LABELS } from './give-words.ts';
import { tickProps } from './sheet-fields.ts';
import type { SheetControls } from './use-give-form.ts';

type Props = { controls: SheetControls; wording: string; number: number };

export function ConsentRow({ controls, wording, number }: Props) {
  return (
    <SheetRow
      number={number}
      heading="May we write to you?"
      note="Your receipt and one thank-you always come. To stop the rest, do as any letter says, or tell us."
    >
      <ChoiceGroup name="byEmail" legend={wording} isLegendShown fault={controls.faults.byEmail}>
        <Choice {...tickProps(controls, 'byEmail')}>{GIVE_LABELS.byEmail}</Choice>
        <Choice {...tickProps(controls, 'byPost')}>{GIVE_LABELS.byPost}</Choice>
        <Choice {...tickProps(controls, 'byPhone')}>{GIVE_LABELS.byPhone}</Choice>
      </ChoiceGroup>
    </SheetRow>
  );
}
