// How much: three sums and a place for another.
import { useState, type ChangeEvent } from 'react';
import { SheetRow } from '#src/ui/SheetRow.tsx';
import { SumRow } from '#src/ui/SumRow.tsx';
import type { SheetControls } from './use-give-form.ts';

const SUMS = [
  { value: '5', words: '£5' },
  { value: '20', words: '£20' },
  { value: '60', words: '£60' },
] as const;

type Props = { controls: SheetControls; note: string; number: number };

export function AmountRow({ controls, note, number }: Props) {
  const { form, start, faults } = controls;
  const [setAside, keepAside] = useState('');
  const chooseSum = (event: ChangeEvent<HTMLInputElement>) => {
    // A sum written and then not chosen is set aside, and stands there again when Other is chosen again.
    const written = form.getValues('other');
    if (event.target.value === 'other') {
      if (written === '') form.setValue('other', setAside);
    } else if (written !== '') {
      keepAside(written);
      form.setValue('other', '');
    }
  };
  const writeSum = (event: ChangeEvent<HTMLInputElement>) => {
    if (event.target.value !== '') form.setValue('amount', 'other');
  };
  return (
    <SheetRow number={number} heading="How much" note={note}>
      <SumRow
        legend="How much"
        sums={SUMS}
        chosen={start.amount}
        radio={form.register('amount', { onChange: chooseSum })}
        otherValue="other"
        other={{ ...form.register('other', { onChange: writeSum }), defaultValue: start.other }}
        fault={faults.amount ?? faults.other}
      />
    </SheetRow>
  );
}
