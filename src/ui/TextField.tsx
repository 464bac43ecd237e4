// A field of one line. The label stands above; the answer is written on the line.
import type { ComponentProps } from 'react';
import { describedBy, Field, type FieldParts } from './Field.tsx';

type Props = FieldParts & { isShort?: boolean } & Omit<ComponentProps<'input'>, 'id'> & { name: string };

export function TextField({ label, hint, fault, isOptional, isShort, ...input }: Props) {
  const id = input.name;
  return (
    <Field {...{ id, label, hint, fault }} isOptional={isOptional ?? false} isShort={isShort ?? false}>
      <input
        type="text"
        {...input}
        id={id}
        aria-describedby={describedBy(id, { label, hint, fault })}
        aria-invalid={fault ? true : undefined}
      />
    </Field>
  );
}
