// Days waited as tally strokes, the fifth across; never above ten, then the words alone must do.
const MOST = 10;
const STEP = 4.6;
const GROUP = 5;
/** Small leanings, so that strokes look made by hand. They repeat: the same wait is always drawn alike. */
const LEAN = [0.6, -0.7, 0.3, -0.4, 0.5, -0.3, 0.7, -0.5];
const lean = (index: number): number => LEAN[index % LEAN.length] ?? 0;

function strokes(days: number): { path: string; width: number } {
  let path = '';
  let x = 3;
  for (let index = 0; index < days; index += 1) {
    if (index % GROUP === GROUP - 1) {
      path += `M${x - 4 * STEP - 2.5} 14.5L${x - STEP + 2.5} 5`;
      x += 4;
      continue;
    }
    path += `M${x + lean(index)} ${3 + lean(index + 3)}L${x - lean(index)} ${17 - lean(index + 1)}`;
    x += STEP;
  }
  return { path, width: Math.ceil(x + 2) };
}

export function Tally({ days }: { days: number }) {
  if (days < 1 || days > MOST) return null;
  const { path, width } = strokes(days);
  return (
    <svg className="tally" aria-hidden="true" width={width} height={20} viewBox={`0 0 ${width} 20`}>
      <path d={path} />
    </svg>
  );
}
