// Said over a page whose session has ended: sign in again here, and what is on the page stays as it is.
import { useEffect, useRef } from 'react';
import type { SessionStep } from '#shared/accounts/session-schemas.ts';
import { accountPaths } from './account-paths.ts';
import { SecondFactorForm } from './SecondFactorForm.tsx';
import { SignInForm } from './SignInForm.tsx';

type Props = { step: Exclude<SessionStep, 'signed-in'>; email: string };

export function RunOutNotice({ step, email }: Props) {
  const dialog = useRef<HTMLDialogElement>(null);
  useEffect(() => {
    const shown = dialog.current;
    if (shown && !shown.open) shown.showModal();
    // The address is known already: the next thing to write is the password, then the code.
    shown?.querySelector<HTMLInputElement>('input:not([type=email])')?.focus();
  }, [step]);
  return (
    // Escape would leave a page that looks alive and keeps nothing.
    <dialog
      ref={dialog}
      className="run-out"
      aria-labelledby="run-out-heading"
      onCancel={(event) => event.preventDefault()}
    >
      <h2 id="run-out-heading">Your time at the desk has run out</h2>
      <p>Nothing on the page behind is lost. Sign in again and go on where you were.</p>
      {step === 'signed-out' && <SignInForm email={email} />}
      {step === 'second-factor' && <SecondFactorForm />}
      {step === 'second-factor-setup' && (
        <p>
          Your roles now need a second factor. <a href={accountPaths.secondFactorSetup}>Set it up</a>, then
          come back.
        </p>
      )}
      <p className="ash">
        Or <a href={accountPaths.signIn}>leave this page</a> and begin anew.
      </p>
    </dialog>
  );
}
