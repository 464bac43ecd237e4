// A new password, against the present one.
import { useState } from 'react';
import { ADVISED_PASSWORD_LENGTH, MIN_PASSWORD_LENGTH } from '#shared/accounts/password-rules.ts';
import { changePasswordSchema } from '#shared/accounts/session-schemas.ts';
import { AccountField } from './AccountField.tsx';
import { AccountForm } from './AccountForm.tsx';
import { useChangePassword } from './accounts-queries.ts';
import { useDeskForm } from './use-desk-form.ts';

const NAME = 'change';
const LABELS = { password: 'Present password', newPassword: 'New password' };

export function ChangePasswordForm({ email }: { email: string }) {
  const change = useChangePassword();
  const [isDone, setIsDone] = useState(false);
  const form = useDeskForm({
    schema: changePasswordSchema,
    defaultValues: { password: '', newPassword: '' },
    send: async (values) => {
      setIsDone(false);
      await change.mutateAsync(values);
      form.reset();
      setIsDone(true);
    },
  });
  return (
    <AccountForm
      {...form}
      name={NAME}
      label="Changing it"
      labels={LABELS}
      onSubmit={(event) => void form.submit(event)}
      button="Change it"
      workingWords="Changing it …"
      isPlain
    >
      <p className="told" role="status" hidden={!isDone}>
        {isDone && 'The password is changed. Wherever else you were signed in, you are not any more.'}
      </p>
      {/* Password managers keep the new password under the right name. */}
      <input type="text" hidden readOnly autoComplete="username" value={email} />
      <AccountField
        {...form.register('password')}
        form={NAME}
        label={LABELS.password}
        fault={form.faults.password}
        type="password"
        autoComplete="current-password"
      />
      <AccountField
        {...form.register('newPassword')}
        form={NAME}
        label={LABELS.newPassword}
        hint={`At least ${MIN_PASSWORD_LENGTH} characters; ${ADVISED_PASSWORD_LENGTH} or more is better. Four words that do not belong together are good.`}
        fault={form.faults.newPassword}
        type="password"
        autoComplete="new-password"
      />
    </AccountForm>
  );
}
