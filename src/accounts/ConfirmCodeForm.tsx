// The first code of a new second factor, which shows that the app has it.
import { oneTimeCodeSchema } from '#shared/accounts/session-schemas.ts';
import { AccountField } from './AccountField.tsx';
import { AccountForm } from './AccountForm.tsx';
import { useConfirmSecondFactor } from './accounts-queries.ts';
import { useDeskForm } from './use-desk-form.ts';

const NAME = 'confirm';

export function ConfirmCodeForm({ onCodes }: { onCodes: (codes: readonly string[]) => void }) {
  const confirm = useConfirmSecondFactor();
  const form = useDeskForm({
    schema: oneTimeCodeSchema,
    defaultValues: { code: '' },
    send: async (values) => onCodes((await confirm.mutateAsync(values)).recoveryCodes),
  });
  return (
    <AccountForm
      {...form}
      name={NAME}
      label="Confirm the second factor"
      labels={{ code: 'Code in the app' }}
      onSubmit={(event) => void form.submit(event)}
      button="Confirm it"
      workingWords="Looking at the code …"
    >
      <AccountField
        {...form.register('code')}
        form={NAME}
        label="Code in the app"
        hint="The six figures that it shows now."
        fault={form.faults.code}
        type="text"
        className="code-input"
        inputMode="numeric"
        autoComplete="one-time-code"
        spellCheck={false}
      />
    </AccountForm>
  );
}
