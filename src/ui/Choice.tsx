// One thing to choose or to tick, with its words; the whole line can be pressed.
import type { ComponentProps, ReactNode } from 'react';

type Props = { children: ReactNode; need?: ReactNode } & ComponentProps<'input'> & {
    type: 'radio' | 'checkbox';
  };

export function Choice({ children, need, ...input }: Props) {
  return (
    <label className="choice">
      <input {...input} />
      <span>{children}</span>
      {need ? <span className="need">{need}</span> : null}
    </label>
  );
}
