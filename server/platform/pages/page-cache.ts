// Keeps what follows only from the campaign's data: made once, given to all, thrown away at each change.
import { dayOf } from '#shared/dates.ts';
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
type Kept<T> = { drawn: T; begunAt: Date };

const MOST_KEPT = 64;
const LONGEST_KEPT_MS = 5 * 60_000;

/** Wordings and dates come into force by the clock, with no change that would tell of it. */
function isFresh({ begunAt }: Kept<unknown>, now: Date): boolean {
  const ageMs = now.getTime() - begunAt.getTime();
  return ageMs >= 0 && ageMs < LONGEST_KEPT_MS && dayOf(begunAt) === dayOf(now);
}

/**
 * Everybody who asks while one is being made waits for that one. A change forgets what was made and what is
 * still being made, so nobody who asks after a change is given what was begun before it. Only what may be kept
 * takes a place: addresses that lead nowhere cannot push out those that lead somewhere.
 */
export function createDrawnOnce<T>(
  changes: Pick<Changes, 'onChange'>,
  draw: (key: string) => Promise<T>,
  { mostKept = MOST_KEPT, mayKeep = () => true }: Limits<T> = {},
): DrawnOnce<T> {
  const kept = new Map<string, Kept<T>>();
  const underWay = new Map<string, Promise<T>>();
  changes.onChange(CAMPAIGN_CHANGED, () => {
    kept.clear();
    underWay.clear();
  });

  function keep(key: string, one: Kept<T>): void {
    kept.delete(key);
    kept.set(key, one);
    for (const oldest of kept.keys()) {
      if (kept.size <= mostKept) break;
      kept.delete(oldest);
    }
  }

  function start(key: string): Promise<T> {
    const begunAt = new Date();
    const drawing = draw(key);
    underWay.set(key, drawing);
    /** Whether nothing has changed since it was begun. */
    const end = (): boolean => underWay.get(key) === drawing && underWay.delete(key);
    drawing.then((drawn) => {
      if (end() && mayKeep(drawn)) keep(key, { drawn, begunAt });
    }, end);
    return drawing;
  }

  return {
    async get(key) {
      const found = kept.get(key);
      if (found && isFresh(found, new Date())) return found.drawn;
      return underWay.get(key) ?? start(key);
    },
    count: () => kept.size,
  };
}
