// Ties each answer of the sheet to the form that keeps it.
import type { GiveField } from '#shared/giving/give-schemas.ts';
import { GIVE_LABELS } from './give-words.ts';
import type { SheetControls } from './use-give-form.ts';

export function textProps({ form, start, faults }: SheetControls, field: GiveField) {
  return {
    ...form.register(field),
    label: GIVE_LABELS[field],
    defaultValue: start[field],
    fault: faults[field],
  };
}

/** A box to tick sends its value or nothing. */
export function tickProps({ form, start }: SheetControls, field: GiveField, value = 'on') {
  return {
    ...form.register(field),
    type: 'checkbox' as const,
    id: field,
    value,
    defaultChecked: start[field] === value,
  };
}

/** The first of a group carries the field's own name as its id: that is where links to the answer lead. */
export function radioProps({ form, start }: SheetControls, field: GiveField, value: string, isFirst = false) {
  return {
    ...form.register(field),
    type: 'radio' as const,
    id: isFirst ? field : `${field}-${value}`,
    value,
    defaultChecked: start[field] === value,
  };
}
