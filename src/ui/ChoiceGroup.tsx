// Choices that answer one question; the question is their legend.
import type { ReactNode } from 'react';

type Props = {
  name: string;
  legend: ReactNode;
  isLegendShown?: boolean;
  fault?: string | undefined;
  className?: string;
  children: ReactNode;
};

export function ChoiceGroup({ name, legend, isLegendShown, fault, className, children }: Props) {
  return (
    <fieldset
      className={`choices${fault ? ' field bad' : ''}`}
      aria-describedby={fault ? `${name}-fault` : undefined}
    >
      <legend className={isLegendShown ? undefined : 'visually-hidden'}>{legend}</legend>
      {fault ? (
        <span className="fault" id={`${name}-fault`}>
          {fault}
        </span>
      ) : null}
      <div className={className}>{children}</div>
    </fieldset>
  );
}
