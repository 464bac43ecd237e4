// One answer of a form: its label, a hint, what is wrong with it, and the place to write.
import type { ReactNode } from 'react';

export type FieldParts = {
  label: ReactNode;
  hint?: ReactNode;
  fault?: string | undefined;
  isOptional?: boolean;
};

/** The ids that the input names as its description: the hint first, then the fault. */
export function describedBy(id: string, { hint, fault }: FieldParts): string | undefined {
  const ids = [hint ? `${id}-hint` : '', fault ? `${id}-fault` : ''].filter(Boolean);
  return ids.length > 0 ? ids.join(' ') : undefined;
}

type Props = FieldParts & { id: string; isShort?: boolean; children: ReactNode };

export function Field({ id, label, hint, fault, isOptional, isShort, children }: Props) {
  return (
    <div className={`field${fault ? ' bad' : ''}${isShort ? ' short' : ''}`}>
      <label htmlFor={id}>
        {label}
        {isOptional ? <span className="optional"> (optional)</span> : null}
      </label>
      {hint ? (
        <span className="hint" id={`${id}-hint`}>
          {hint}
        </span>
      ) : null}
      {fault ? (
        <span className="fault" id={`${id}-fault`}>
          {fault}
        </span>
      ) : null}
      {children}
    </div>
  );
}
