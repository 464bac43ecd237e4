// Address and password, for the door and for the notice that a session has run out.
import { signInSchema } from '#shared/accounts/session-schemas.ts';
import { AccountField } from './AccountField.tsx';
import { AccountForm } from './AccountForm.tsx';
import { useSignIn } from './accounts-queries.ts';
import { useDeskForm } from './use-desk-form.ts';

const LABELS = { email: 'E-mail address', password: 'Password' };
const NAME = 'sign-in';

export function SignInForm({ email = '' }: { email?: string }) {
  const signIn = useSignIn();
  const form = useDeskForm({
    schema: signInSchema,
    defaultValues: { email, password: '' },
    send: signIn.mutateAsync,
  });
  return (
    <AccountForm
      {...form}
      name={NAME}
      label="Sign in"
      labels={LABELS}
      onSubmit={(event) => void form.submit(event)}
      button="Open the desk"
      workingWords="Looking you up …"
    >
      <AccountField
        {...form.register('email')}
        form={NAME}
        label={LABELS.email}
        fault={form.faults.email}
        type="email"
        autoComplete="username"
        autoCapitalize="none"
        spellCheck={false}
      />
      <AccountField
        {...form.register('password')}
        form={NAME}
        label={LABELS.password}
        fault={form.faults.password}
        type="password"
        autoComplete="current-password"
      />
    </AccountForm>
  );
}
