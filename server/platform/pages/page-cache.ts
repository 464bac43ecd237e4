// Keeps what follows only from the campaign's data: made once, given to all, thrown away at each change.
import { CAMPAIGN_CHANGED, type Changes } from '#server/platform/changes.ts';

export type DrawnOnce<T> = {
  get(key: string): Promise<T>;
  /** How many are kept now. */
  count(): number;
};

type Limits<T> = {
  mostKept?: number;
  /** Whether a result may be kept for others; a page that was not found may not. */
  mayKeep?: (drawn: T) => boolean;
};

const MOST_KEPT = 64;

/**
 * Everybody who asks while one is being made waits for that one. A change forgets what was made and what is
 * still being made, so nobody who asks after a change is given what was begun before it.
 */
export function createDrawnOnce<T>(
  changes: Pick<Changes, 'onChange'>,
  draw: (key: string) => Promise<T>,
  { mostKept = MOST_KEPT, mayKeep = () => true }: Limits<T> = {},
): DrawnOnce<T> {
  const kept = new Map<string, Promise<T>>();
  changes.onChange(CAMPAIGN_CHANGED, () => kept.clear());

  function start(key: string): Promise<T> {
    const drawing = draw(key);
    kept.set(key, drawing);
    const forget = (): void => {
      if (kept.get(key) === drawing) kept.delete(key);
    };
    drawing.then((drawn) => {
      if (!mayKeep(drawn)) forget();
    }, forget);
    for (const oldest of kept.keys()) {
      if (kept.size <= mostKept) break;
      kept.delete(oldest);
    }
    return drawing;
  }

  return {
    get: (key) => kept.get(key) ?? start(key),
    count: () => kept.size,
  };
}
