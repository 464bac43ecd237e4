// The code of the moment, or one recovery code in its place.
import { useState } from 'react';
import { oneTimeCodeSchema, recoveryCodeSchema } from '#shared/accounts/session-schemas.ts';
import { AccountField } from './AccountField.tsx';
import { AccountForm } from './AccountForm.tsx';
import { useGiveCode } from './accounts-queries.ts';
import { useDeskForm } from './use-desk-form.ts';

function OneTimeCodeForm() {
  const giveCode = useGiveCode();
  const form = useDeskForm({
    schema: oneTimeCodeSchema,
    defaultValues: { code: '' },
    send: giveCode.mutateAsync,
  });
  return (
    <AccountForm
      {...form}
      name="one-time"
      label="Second factor"
      labels={{ code: 'One-time code' }}
      onSubmit={(event) => void form.submit(event)}
      button="Go on"
      workingWords="Looking at the code …"
    >
      <AccountField
        {...form.register('code')}
        form="one-time"
        label="One-time code"
        hint="The six figures that your app shows now. They change every half minute."
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

function RecoveryCodeForm() {
  const giveCode = useGiveCode();
  const form = useDeskForm({
    schema: recoveryCodeSchema,
    defaultValues: { code: '' },
    send: giveCode.mutateAsync,
  });
  return (
    <AccountForm
      {...form}
      name="recovery"
      label="Second factor, without the app"
      labels={{ code: 'Recovery code' }}
      onSubmit={(event) => void form.submit(event)}
      button="Go on"
      workingWords="Looking at the code …"
    >
      <AccountField
        {...form.register('code')}
        form="recovery"
        label="Recovery code"
        hint="One line of the list that you kept, such as k7qm-2xvp-9d4t. Each works once."
        fault={form.faults.code}
        type="text"
        className="code-input"
        autoComplete="off"
        autoCapitalize="none"
        spellCheck={false}
      />
    </AccountForm>
  );
}

export function SecondFactorForm() {
  const [hasNoApp, setHasNoApp] = useState(false);
  return (
    <>
      {hasNoApp ? <RecoveryCodeForm /> : <OneTimeCodeForm />}
      <p className="other-way">
        <button type="button" className="act word" onClick={() => setHasNoApp(!hasNoApp)}>
          {hasNoApp ? 'Use the code of the app' : 'Use a recovery code'}
        </button>
      </p>
    </>
  );
}
