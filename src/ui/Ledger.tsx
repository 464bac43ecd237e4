// A ruled table: hairlines, numbers to the right, totals double-ruled. On a narrow page each row folds.
import type { ReactNode } from 'react';

export type LedgerHead = { key: string; label: ReactNode; isNumber?: boolean; className?: string };

type Props = {
  caption: ReactNode;
  heads: readonly LedgerHead[];
  /** Rows and, where there is one, the foot. */
  children: ReactNode;
  folds?: boolean;
};

export function Ledger({ caption, heads, children, folds = false }: Props) {
  return (
    <table className={folds ? 'ledger fold' : 'ledger'}>
      <caption>{caption}</caption>
      <thead>
        <tr>
          {heads.map(({ key, label, isNumber, className }) => (
            <th key={key} scope="col" className={className ?? (isNumber ? 'n' : undefined)}>
              {label}
            </th>
          ))}
        </tr>
      </thead>
      {children}
    </table>
  );
}
