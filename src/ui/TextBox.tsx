// A field of several lines.
import type { ComponentProps } from 'react';
import { describedBy, Field, type FieldParts } from './Field.tsx';

type Props = FieldParts & Omit<ComponentProps<'textarea'>, 'id'> & { name: string };

export function TextBox({ label, hint, fault, isOptional, ...box }: Props) {
  const id = box.name;
  return (
    <Field {...{ id, label, hint, fault }} isOptional={isOptional ?? false}>
      <textarea
        rows={3}
        {...box}
        id={id}
        aria-describedby={describedBy(id, { label, hint, fault })}
        aria-invalid={fault ? true : undefined}
      />
    </Field>
  );
}
