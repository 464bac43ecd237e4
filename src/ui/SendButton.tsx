// The button that sends a form. Once pressed it says what it is doing and cannot be pressed again.
import type { ReactNode } from 'react';

type Props = {
  isWorking: boolean;
  workingWords: string;
  form?: string;
  isPlain?: boolean;
  children: ReactNode;
};

export function SendButton({ isWorking, workingWords, form, isPlain, children }: Props) {
  return (
    <button
      type="submit"
      className={isPlain ? 'button plain' : 'button'}
      form={form}
      // Not `disabled`: that would take the focus away from whoever pressed it by keyboard.
      aria-disabled={isWorking ? true : undefined}
      onClick={(event) => {
        if (isWorking) event.preventDefault();
      }}
    >
      {isWorking ? workingWords : children}
    </button>
  );
}
