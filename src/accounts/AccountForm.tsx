// The common shape of the desk's short forms: what is wrong, said above; the answers; the button.
import type { FormEventHandler, ReactNode } from 'react';
import type { FieldFaults } from '#shared/errors.ts';
import { ErrorSummary } from '#src/ui/ErrorSummary.tsx';
import { SendButton } from '#src/ui/SendButton.tsx';
import { Trouble } from '#src/ui/Trouble.tsx';

type Props = {
  /** Keeps the ids of two forms on one page apart. */
  name: string;
  label: string;
  labels: Record<string, string>;
  faults: FieldFaults;
  trouble: string | null;
  isSending: boolean;
  onSubmit: FormEventHandler<HTMLFormElement>;
  button: string;
  workingWords: string;
  isPlain?: boolean;
  children: ReactNode;
};

const underIds = (name: string, values: Record<string, string>): Record<string, string> =>
  Object.fromEntries(Object.entries(values).map(([field, value]) => [`${name}-${field}`, value]));

export function AccountForm(props: Props) {
  const { name, label, labels, faults, trouble, isSending, onSubmit, button, workingWords, children } = props;
  return (
    <form className="short-form" aria-label={label} noValidate onSubmit={onSubmit}>
      {Object.keys(faults).length > 0 && (
        <ErrorSummary faults={underIds(name, faults)} labels={underIds(name, labels)} />
      )}
      {trouble !== null && <Trouble heading={trouble} />}
      {children}
      <p className="buttons">
        <SendButton isWorking={isSending} workingWords={workingWords} isPlain={props.isPlain ?? false}>
          {button}
        </SendButton>
      </p>
    </form>
  );
}
