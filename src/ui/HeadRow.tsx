// The head of a ruled table. Roles are written out, because a table that refolds loses them in some readers.
export type Head = { label: string; className?: string; isHidden?: boolean };

export function HeadRow({ heads }: { heads: readonly Head[] }) {
  return (
    <thead role="rowgroup">
      <tr role="row">
        {heads.map(({ label, className, isHidden }) => (
          <th key={label} role="columnheader" scope="col" className={className}>
            {isHidden ? <span className="vh">{label}</span> : label}
          </th>
        ))}
      </tr>
    </thead>
  );
}
