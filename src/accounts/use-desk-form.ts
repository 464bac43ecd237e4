// A form of the desk: checked by the shared schema, sent, and answered in the same place whoever found the fault.
import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useForm, type DefaultValues, type FieldErrors, type FieldValues } from 'react-hook-form';
import type { z } from 'zod';
import type { FieldFaults } from '#shared/errors.ts';
import { ApiProblem, NoAnswer } from '#src/lib/api.ts';

const NONE: FieldFaults = {};

function faultsOf(errors: FieldErrors): FieldFaults {
  const faults: FieldFaults = {};
  for (const [field, error] of Object.entries(errors))
    faults[field] = typeof error?.message === 'string' ? error.message : 'Put this right.';
  return faults;
}

function troubleOf(error: unknown): string {
  if (error instanceof NoAnswer) return error.message;
  if (error instanceof ApiProblem) return error.problem.detail ?? error.problem.title;
  return 'Something went wrong here. Nothing was half done. Try again.';
}

type Options<Input extends FieldValues, Output> = {
  schema: z.ZodType<Output, Input>;
  defaultValues: DefaultValues<Input>;
  send: (values: Output) => Promise<unknown>;
};

export function useDeskForm<Input extends FieldValues, Output>({
  schema,
  defaultValues,
  send,
}: Options<Input, Output>) {
  const { register, handleSubmit, reset, formState } = useForm<Input, unknown, Output>({
    resolver: zodResolver(schema),
    defaultValues,
    // The summary takes the focus and leads to the answer.
    shouldFocusError: false,
    reValidateMode: 'onSubmit',
  });
  const [faults, setFaults] = useState(NONE);
  const [trouble, setTrouble] = useState<string | null>(null);

  const submit = handleSubmit(
    async (values) => {
      setFaults(NONE);
      setTrouble(null);
      try {
        await send(values);
      } catch (error) {
        const fields = error instanceof ApiProblem ? error.problem.fields : undefined;
        if (fields) setFaults(fields);
        else setTrouble(troubleOf(error));
      }
    },
    (errors) => {
      setTrouble(null);
      setFaults(faultsOf(errors));
    },
  );
  return { register, reset, submit, faults, trouble, isSending: formState.isSubmitting };
}
