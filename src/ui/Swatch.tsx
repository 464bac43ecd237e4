// The small key of a state's marks: solid, cross-hatched, hatched, dashed outline.
export type SwatchKind = 'placed' | 'making' | 'paid' | 'planned';

const RISING =
  'M-3 13L10 0M0 14L14 0M4 14L18 0M8 14L22 0M12 14L24 2M16 14L24 6M-3 9L6 0M-3 5L2 0M20 14L24 10';
const FALLING =
  'M25 13L12 0M22 14L8 0M18 14L4 0M14 14L0 0M10 14L-2 2M6 14L-2 6M25 9L16 0M25 5L20 0M2 14L-2 10';

export function Swatch({ kind }: { kind: SwatchKind }) {
  return (
    <svg className={`swatch sw-${kind}`} viewBox="0 0 22 14" aria-hidden="true">
      {(kind === 'paid' || kind === 'making') && <path d={RISING} />}
      {kind === 'making' && <path d={FALLING} />}
      <rect x=".7" y=".7" width="20.6" height="12.6" />
    </svg>
  );
}
