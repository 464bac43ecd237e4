// One answer of an account form: the shared field around an input that password managers understand.
import type { ComponentProps } from 'react';
import { describedBy, Field, type FieldParts } from '#src/ui/Field.tsx';

type Props = FieldParts & { form: string } & Omit<ComponentProps<'input'>, 'id' | 'form'> & { name: string };

export function AccountField({ form, label, hint, fault, isOptional, ...input }: Props) {
  const id = `${form}-${input.name}`;
  return (
    <Field {...{ id, label, hint, fault }} isOptional={isOptional ?? false}>
      <input
        {...input}
        id={id}
        aria-describedby={describedBy(id, { label, hint, fault })}
        aria-invalid={fault ? true : undefined}
      />
    </Field>
  );
}
