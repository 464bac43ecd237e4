// Where a giver's name may stand, and a message if there is one.
import { useWatch } from 'react-hook-form';
import { MESSAGE_LETTERS, WALL_LETTERS } from '#shared/giving/give-schemas.ts';
import { countLetters } from '#shared/giving/text-rules.ts';
import { Choice } from '#src/ui/Choice.tsx';
import { ChoiceGroup } from '#src/ui/ChoiceGroup.tsx';
import { SheetRow } from '#src/ui/SheetRow.tsx';
import { TextBox } from '#src/ui/TextBox.tsx';
import { TextField } from '#src/ui/TextField.tsx';
import { useHydrated } from '#src/ui/use-hydrated.ts';
import { radioProps, textProps } from './sheet-fields.ts';
import type { SheetControls } from './use-give-form.ts';

export function WallRow({ controls, number }: { controls: SheetControls; number: number }) {
  const [words, message] = useWatch({ control: controls.form.control, name: ['wallWords', 'message'] });
  const isHydrated = useHydrated();
  // A count that stands still while somebody writes would be worse than none.
  const count = isHydrated && words ? ` ${countLetters(words)} so far.` : '';
  // Counted as the rule for messages counts, so that the two never disagree.
  const messageCount = isHydrated && message ? ` ${message.trim().length} so far.` : '';
  return (
    <SheetRow
      number={number}
      heading="The givers’ wall"
      note="The sum is never shown beside a name. A name is read by a person here before it goes up. A message is read by a person at the desk, then by the people who build her; it is never shown to the public."
    >
      <ChoiceGroup name="wall" legend="Your name on the givers’ wall" fault={controls.faults.wall}>
        <Choice {...radioProps(controls, 'wall', 'wall', true)}>Put a name up, in exactly these words</Choice>
        <div className="under when-on-wall">
          <TextField
            {...textProps(controls, 'wallWords')}
            hint={`Up to ${WALL_LETTERS} letters, capitals as you write them.${count}`}
            autoComplete="off"
            spellCheck={false}
          />
        </div>
        <Choice {...radioProps(controls, 'wall', 'not-public')}>Leave my name off</Choice>
        <Choice {...radioProps(controls, 'wall', 'treasurer-only')}>
          Leave it off, and hide it from everybody but the treasurer
        </Choice>
      </ChoiceGroup>
      <TextBox
        {...textProps(controls, 'message')}
        isOptional
        hint={`Up to ${MESSAGE_LETTERS} letters.${messageCount}`}
        rows={2}
      />
    </SheetRow>
  );
}
