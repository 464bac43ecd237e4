// Which letters a giver agrees to, channel by channel, none of them ticked beforehand.
import { Choice } from '#src/ui/Choice.tsx';
import { ChoiceGroup } from '#src/ui/ChoiceGroup.tsx';
import { SheetRow } from '#src/ui/SheetRow.tsx';
import { tickProps } from './sheet-fields.ts';
import type { SheetControls } from './use-give-form.ts';

type Props = { controls: SheetControls; wording: string; number: number };

export function ConsentRow({ controls, wording, number }: Props) {
  return (
    <SheetRow
      number={number}
      heading="May we write to you?"
      note="Nothing is ticked for you. You always get your receipt and one thank-you. Every letter says how to stop the rest."
    >
      <ChoiceGroup name="byEmail" legend={wording} isLegendShown fault={controls.faults.byEmail}>
        <Choice {...tickProps(controls, 'byEmail')}>By e-mail, when something changes on the figure</Choice>
        <Choice {...tickProps(controls, 'byPost')}>By post, about twice a year</Choice>
        <Choice {...tickProps(controls, 'byPhone')}>By telephone or text, for work days</Choice>
      </ChoiceGroup>
    </SheetRow>
  );
}
