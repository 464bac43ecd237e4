// The sheet in the browser: checked on pressing, by the server's own rules; nothing that was written is let go.
import { useEffect, useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useForm, type FieldErrors, type UseFormReturn } from 'react-hook-form';
import { useNavigation, useSubmit } from 'react-router-dom';
import { z } from 'zod';
import type { FieldFaults } from '#shared/errors.ts';
import {
  giveRequestSchema,
  keptAnswers,
  type GiveFormFilled,
  type GiveSheet,
} from '#shared/giving/give-schemas.ts';
import type { SheetTrouble } from './give-actions.ts';
import type { GivePageData } from './give-loaders.ts';
import { startTexts, typedBefore, type FormTexts } from './give-form-data.ts';
import { useQuietKeeping } from './use-quiet-keeping.ts';

export const SHEET_ID = 'give-sheet';

type SheetForm = UseFormReturn<FormTexts, unknown, GiveFormFilled>;
export type SheetControls = {
  form: SheetForm;
  /** What each answer is drawn with, the same on the server and in the browser. */
  start: FormTexts;
  faults: FieldFaults;
};

const CHOICES = ['amount', 'towards', 'dedication', 'wall'] as const;

const schemaOf = (sheet: GiveSheet) =>
  z.preprocess((texts: FormTexts) => keptAnswers(texts), giveRequestSchema({ leastPence: sheet.leastPence }));

const wordsOf = (errors: FieldErrors<FormTexts>): FieldFaults =>
  Object.fromEntries(Object.entries(errors).map(([field, { message }]) => [field, message ?? '']));

/** What the last press was answered, kept when a step to another place of the page makes the router forget it. */
function useLastTrouble(sent: SheetTrouble | undefined, loaded: FieldFaults) {
  const [last, setLast] = useState<Partial<SheetTrouble>>(sent ?? { fields: loaded });
  const [seen, setSeen] = useState(sent);
  if (sent && sent !== seen) {
    setSeen(sent);
    setLast(sent);
  }
  return [last, setLast] as const;
}

export function useGiveForm({ sheet, faults }: GivePageData, sent: SheetTrouble | undefined) {
  const [start] = useState(() => startTexts({ ...sheet.answers, ...sent?.answers }, sheet.openParts));
  // The page may have been written in before the script arrived.
  const [written] = useState(() => typedBefore(SHEET_ID) ?? start);
  const [last, setLast] = useLastTrouble(sent, faults);
  const form = useForm<FormTexts, unknown, GiveFormFilled>({
    defaultValues: written,
    resolver: zodResolver(schemaOf(sheet)),
    reValidateMode: 'onSubmit',
    shouldFocusError: false,
  });
  useEffect(() => {
    // On registering, the form library takes the choice that was drawn for the one that was made.
    for (const field of CHOICES) form.setValue(field, written[field]);
  }, [form, written]);
  const { markKept, keepNow } = useQuietKeeping(form.getValues);
  const submit = useSubmit();
  const isWorking = useNavigation().formAction !== undefined;
  const press = form.handleSubmit(
    (_, event) => {
      if (isWorking || !(event?.target instanceof HTMLFormElement)) return;
      markKept();
      void submit(event.target);
    },
    (errors) => {
      keepNow();
      setLast({ fields: wordsOf(errors) });
    },
  );
  const controls: SheetControls = { form, start, faults: last.fields ?? {} };
  return { controls, trouble: last.trouble, isWorking, press };
}
