// Who gives: name, greeting, e-mail, and the home address where it is needed.
import { Choice } from '#src/ui/Choice.tsx';
import { SheetRow } from '#src/ui/SheetRow.tsx';
import { TextField } from '#src/ui/TextField.tsx';
import { textProps, tickProps } from './sheet-fields.ts';
import type { SheetControls } from './use-give-form.ts';

const NOTE = 'The greeting is how every letter to you will begin: “Dear …”.';
const PHONE_NOTE = 'We need your telephone number only if you tick the telephone.';

type Props = { controls: SheetControls; number: number; isGiftAidOffered: boolean };

export function DetailsRow({ controls, number, isGiftAidOffered }: Props) {
  const uses = isGiftAidOffered ? 'Gift Aid or letters by post' : 'letters by post';
  return (
    <SheetRow
      number={number}
      heading="Your details"
      note={`We need your home address only if you tick ${uses}. ${PHONE_NOTE} ${NOTE}`}
    >
      <div className="pair">
        <TextField {...textProps(controls, 'name')} autoComplete="name" spellCheck={false} />
        <TextField
          {...textProps(controls, 'greeting')}
          isOptional
          autoComplete="nickname"
          spellCheck={false}
        />
      </div>
      <TextField
        {...textProps(controls, 'email')}
        hint="The receipt goes here."
        type="email"
        autoComplete="email"
        spellCheck={false}
      />
      <TextField {...textProps(controls, 'address1')} isOptional autoComplete="address-line1" />
      <div className="pair">
        <TextField {...textProps(controls, 'address2')} isOptional autoComplete="address-line2" />
        <TextField {...textProps(controls, 'town')} isOptional autoComplete="address-level2" />
      </div>
      <div className="pair">
        <TextField
          {...textProps(controls, 'postcode')}
          isOptional
          isShort
          autoComplete="postal-code"
          spellCheck={false}
        />
        <TextField
          {...textProps(controls, 'phone')}
          isOptional
          hint="Only if you tick the telephone below."
          type="tel"
          autoComplete="tel"
        />
      </div>
      <Choice {...tickProps(controls, 'country', 'other')}>
        I live outside the UK. Write the country after the town.
      </Choice>
    </SheetRow>
  );
}
