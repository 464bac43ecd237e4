// The drawn mark of each kind of stage: black shapes (`ink`) and what is cut out of them (`cut`).
import type { Stage } from '#shared/campaign/campaign-schemas.ts';

const MARKS: Record<Stage['mark'], readonly { kind: 'ink' | 'cut'; d: string }[]> = {
  footing: [
    { kind: 'ink', d: 'M6 34h40v9H6zM9 22h34v9H9zM12 10h28v9H12z' },
    { kind: 'cut', d: 'M24 10h2v9h-2zM17 22h2v9h-2zM33 22h2v9h-2zM22 34h2v9h-2z' },
  ],
  frame: [
    { kind: 'ink', d: 'M9 8h9v36H9zM34 8h9v36h-9zM6 12h40v9H6zM14 40 34 24l4 5-20 16z' },
    {
      kind: 'cut',
      d: 'M12 16.5a1.6 1.6 0 1 0 3.2 0a1.6 1.6 0 1 0-3.2 0M37 16.5a1.6 1.6 0 1 0 3.2 0a1.6 1.6 0 1 0-3.2 0',
    },
  ],
  carving: [
    { kind: 'ink', d: 'M8 30 30 10l6 6L16 38zM34 8l6-4 8 9-4 5zM5 45l4-12 10 8z' },
    { kind: 'cut', d: 'M14 31 31 15l1.2 1.2L16 32.6z' },
    { kind: 'ink', d: 'M24 44c5-7 12-7 16-3s1 8-3 5l-1-2c4 1 2-4-2-3s-5 3-8 4z' },
  ],
  lifting: [
    { kind: 'ink', d: 'M24 2h4v12h-4zM26 12l14 14-2.4 2.4L26 17 14.400 28.400 12 26zM11 27h30v17H11z' },
    { kind: 'cut', d: 'M15 31l3 10 1-10zM22 30l2 11 2-11zM30 30l2 11 2-11z' },
  ],
  lighting: [
    { kind: 'ink', d: 'M14 18h24l-3 22H17zM10 17l10-9h12l10 9zM18 41h16v4H18z' },
    {
      kind: 'cut',
      d: 'M18 21h7l-.4 7h-6zM27 21h7l-1 7h-5.600zM18.800 30h5.600l-.3 7h-4.600zM27.400 30h5.600l-.8 7h-4.600z',
    },
  ],
};

export function StageMark({ mark }: { mark: Stage['mark'] }) {
  return (
    <svg className="mark" viewBox="0 0 52 52" aria-hidden="true">
      {MARKS[mark].map(({ kind, d }) => (
        <path key={d} className={kind === 'ink' ? 'k' : 'p'} d={d} />
      ))}
    </svg>
  );
}
