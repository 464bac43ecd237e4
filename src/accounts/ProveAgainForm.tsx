// Password, and the present code where there is one, before a second factor is put in or changed.
import { z } from 'zod';
import { oneTimeCodeSchema, type SecondFactorOffer } from '#shared/accounts/session-schemas.ts';
import { AccountField } from './AccountField.tsx';
import { AccountForm } from './AccountForm.tsx';
import { useBeginSecondFactor } from './accounts-queries.ts';
import { useDeskForm } from './use-desk-form.ts';

const NAME = 'prove';
const LABELS = { password: 'Password', code: 'Present one-time code' };
const password = z.string().min(1, 'Write your password.');
const passwordAlone = z.object({ password, code: z.string().transform(() => undefined) });
const passwordAndCode = z.object({ password, code: oneTimeCodeSchema.shape.code });

type Props = { hasCode: boolean; onOffer: (offer: SecondFactorOffer) => void };

export function ProveAgainForm({ hasCode, onOffer }: Props) {
  const begin = useBeginSecondFactor();
  const form = useDeskForm<
    { password: string; code: string },
    { password: string; code?: string | undefined }
  >({
    schema: hasCode ? passwordAndCode : passwordAlone,
    defaultValues: { password: '', code: '' },
    send: async ({ password: given, code }) =>
      onOffer(await begin.mutateAsync({ password: given, ...(code !== undefined && { code }) })),
  });
  return (
    <AccountForm
      {...form}
      name={NAME}
      label="Prove that it is you"
      labels={LABELS}
      onSubmit={(event) => void form.submit(event)}
      button="Show the picture"
      workingWords="Looking …"
    >
      <AccountField
        {...form.register('password')}
        form={NAME}
        label={LABELS.password}
        fault={form.faults.password}
        type="password"
        autoComplete="current-password"
      />
      {hasCode && (
        <AccountField
          {...form.register('code')}
          form={NAME}
          label={LABELS.code}
          hint="From the app that you have used so far."
          fault={form.faults.code}
          type="text"
          className="code-input"
          inputMode="numeric"
          autoComplete="one-time-code"
          spellCheck={false}
        />
      )}
    </AccountForm>
  );
}
