// In memory or in honour of somebody, and whom to tell of it.
import { Choice } from '#src/ui/Choice.tsx';
import { ChoiceGroup } from '#src/ui/ChoiceGroup.tsx';
import { SheetRow } from '#src/ui/SheetRow.tsx';
import { TextField } from '#src/ui/TextField.tsx';
import { radioProps, textProps, tickProps } from './sheet-fields.ts';
import type { SheetControls } from './use-give-form.ts';

const NOTE =
  'If we may tell one of the family, leave their name and e-mail. They hear of it once a person here has read the words. We tell them your name, unless you hide it from everybody below, and never the sum unless you tick it.';

export function DedicationRow({ controls, number }: { controls: SheetControls; number: number }) {
  return (
    <SheetRow number={number} heading="In memory or in honour" note={NOTE}>
      <ChoiceGroup
        name="dedication"
        legend="In memory or in honour of somebody"
        fault={controls.faults.dedication}
        className="abreast"
      >
        <Choice {...radioProps(controls, 'dedication', 'none', true)}>Neither</Choice>
        <Choice {...radioProps(controls, 'dedication', 'memory')}>In memory of</Choice>
        <Choice {...radioProps(controls, 'dedication', 'honour')}>In honour of</Choice>
      </ChoiceGroup>
      <div className="fields when-dedicated">
        <TextField
          {...textProps(controls, 'dedicationName')}
          hint="As it should be read."
          autoComplete="off"
          spellCheck={false}
        />
        <fieldset className="fields">
          <legend className="lab">May we tell one of the family?</legend>
          <div className="pair">
            <TextField
              {...textProps(controls, 'contactName')}
              isOptional
              autoComplete="off"
              spellCheck={false}
            />
            <TextField
              {...textProps(controls, 'contactEmail')}
              isOptional
              type="email"
              autoComplete="off"
              spellCheck={false}
            />
          </div>
          <Choice {...tickProps(controls, 'contactSum')}>Tell them how much I gave</Choice>
        </fieldset>
      </div>
    </SheetRow>
  );
}
