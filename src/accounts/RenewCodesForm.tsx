// A new set of recovery codes, against the code of the moment. The old set ends.
import { useState } from 'react';
import { oneTimeCodeSchema } from '#shared/accounts/session-schemas.ts';
import { AccountField } from './AccountField.tsx';
import { AccountForm } from './AccountForm.tsx';
import { useRenewRecoveryCodes } from './accounts-queries.ts';
import { RecoveryCodes } from './RecoveryCodes.tsx';
import { useDeskForm } from './use-desk-form.ts';

const NAME = 'renew';

export function RenewCodesForm() {
  const renew = useRenewRecoveryCodes();
  const [codes, setCodes] = useState<readonly string[] | null>(null);
  const form = useDeskForm({
    schema: oneTimeCodeSchema,
    defaultValues: { code: '' },
    send: async (values) => {
      setCodes((await renew.mutateAsync(values)).recoveryCodes);
      form.reset();
    },
  });
  if (codes !== null)
    return <RecoveryCodes codes={codes} onKept={() => setCodes(null)} button="I have kept them" />;
  return (
    <AccountForm
      {...form}
      name={NAME}
      label="Renewal"
      labels={{ code: 'One-time code' }}
      onSubmit={(event) => void form.submit(event)}
      button="Make new recovery codes"
      workingWords="Making them …"
      isPlain
    >
      <AccountField
        {...form.register('code')}
        form={NAME}
        label="One-time code"
        hint="The next code of your app: one that you have used already is not taken again."
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
