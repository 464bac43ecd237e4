// Towards what: the whole figure, or a part that is not paid for yet.
import type { GiveSheet } from '#shared/giving/give-schemas.ts';
import { formatPence } from '#shared/money.ts';
import { Choice } from '#src/ui/Choice.tsx';
import { ChoiceGroup } from '#src/ui/ChoiceGroup.tsx';
import { SheetRow } from '#src/ui/SheetRow.tsx';
import { radioProps } from './sheet-fields.ts';
import type { SheetControls } from './use-give-form.ts';

const NOTES: Record<GiveSheet['partChoice'], string> = {
  wish: 'Choosing a part is a wish within the one appeal: your gift goes there first. If it is filled before yours arrives, yours goes to the next part to be built and we tell you so.',
  fund: 'A gift to a part is kept in a fund of its own and is spent on that part alone. If it is filled before yours arrives, what is over goes to the next part to be built and we tell you so.',
};

type Props = { controls: SheetControls; sheet: GiveSheet; number: number };

export function TowardsRow({ controls, sheet, number }: Props) {
  const asked = sheet.answers.towards ?? 'whole';
  const isClosed = asked !== 'whole' && !sheet.openParts.some((part) => part.slug === asked);
  return (
    <SheetRow number={number} heading="Towards" note={NOTES[sheet.partChoice]}>
      {isClosed ? (
        <p className="told">
          The part you chose is paid for now, so the whole figure is chosen here. Choose another part if you
          would rather.
        </p>
      ) : null}
      <ChoiceGroup name="towards" legend="Towards what" fault={controls.faults.towards} className="towards">
        <Choice
          {...radioProps(controls, 'towards', 'whole', true)}
          need={`${formatPence(sheet.stillNeededPence)} needed`}
        >
          The whole figure, from the ground up
        </Choice>
        {sheet.openParts.map(({ slug, name, stillNeededPence }) => (
          <Choice
            key={slug}
            {...radioProps(controls, 'towards', slug)}
            need={`${formatPence(stillNeededPence)} needed`}
          >
            {name}
          </Choice>
        ))}
      </ChoiceGroup>
    </SheetRow>
  );
}
