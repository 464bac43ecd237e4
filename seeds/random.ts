// Chance that repeats: the same seed gives the same year, to the last gift.

export type Chance = {
  /** 0 up to 1. */
  next(): number;
  below(count: number): number;
  pick<T>(from: readonly T[]): T;
  /** One of the values, as often as its weight says. */
  weighted<T>(choices: readonly (readonly [T, number])[]): T;
  happens(share: number): boolean;
};

/** Mulberry32: small, public domain, and good enough for a made-up town. */
export function createChance(seed: number): Chance {
  let state = seed >>> 0;
  const next = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
  const pick = <T>(from: readonly T[]): T => {
    const one = from[Math.floor(next() * from.length)];
    if (one === undefined) throw new Error('nothing to pick from');
    return one;
  };
  return {
    next,
    below: (count) => Math.floor(next() * count),
    pick,
    weighted(choices) {
      let left = next() * choices.reduce((sum, [, weight]) => sum + weight, 0);
      for (const [value, weight] of choices) {
        left -= weight;
        if (left < 0) return value;
      }
      return pick(choices)[0];
    },
    happens: (share) => next() < share,
  };
}
