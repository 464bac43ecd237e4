// The plan of all gifts: who, how much, when, towards what. Pure, so that the sums can be checked before any is paid.
import { add, pence, subtract, type Pence } from '#shared/money.ts';
import type { GiveForm } from '#shared/giving/give-schemas.ts';
import { FAMILY_NAMES, FIRST_NAMES, MESSAGES, STREETS } from './town.ts';
import type { Chance } from './random.ts';

export const GIVERS = 612;
export const GIFTS = 640;
export const GIVEN = pence(4_128_000);
const pounds = (count: number): Pence => pence(count * 100);

/** Gifts of the last weeks to parts that the reach has not come to; the sums are those the town is told. */
const MEANT_ABOVE: readonly (readonly [string, readonly number[]])[] = [
  ['right-forearm', [60, 60, 25]],
  ['head-and-scarf', [100, 60, 60, 50, 20, 20]],
  ['panes', [60, 60, 60, 20, 25]],
];

/** `open` means one of the parts that are being paid for when the gift is given. */
export type PlannedGift = {
  giver: number;
  amountPence: Pence;
  /** 0 is the first moment of the campaign, 1 the last. */
  at: number;
  towards: 'whole' | 'open' | { slug: string };
  comesBack: boolean;
};

const SUMS: readonly (readonly [number, number])[] = [
  [5, 17],
  [10, 9],
  [15, 2],
  [20, 32],
  [25, 5],
  [30, 4],
  [50, 8],
  [60, 10],
  [75, 1],
  [100, 6],
  [250, 3.2],
  [500, 1.9],
  [1000, 0.7],
];

/** Bends evenly spread moments so that gifts come thicker towards the end, with bursts around each stage. */
function momentOf(chance: Chance): number {
  const burst = chance.weighted([
    [null, 60],
    [0.03, 10],
    [0.49, 8],
    [0.86, 12],
    [0.97, 10],
  ] as const);
  if (burst === null) return Math.sqrt(chance.next());
  return Math.min(0.999, Math.max(0, burst + (chance.next() - 0.5) * 0.04));
}

/** Raises or lowers single gifts until all of them sum to the penny. */
function fitTo(target: Pence, sums: Pence[], chance: Chance): Pence[] {
  const fitted = [...sums];
  for (let tries = 0; tries < 20_000; tries += 1) {
    const apart = target - add(...fitted);
    if (apart === 0) return fitted;
    const index = chance.below(fitted.length);
    const now = fitted[index] ?? pounds(20);
    const wanted = Math.abs(apart) <= 15_000 ? now + apart : apart > 0 ? now + 4_000 : now - 1_500;
    if (wanted >= 300 && wanted <= 150_000) fitted[index] = pence(wanted);
  }
  throw new Error('the gifts could not be made to sum');
}

export function planGifts(chance: Chance): PlannedGift[] {
  const above = MEANT_ABOVE.flatMap(([slug, sums]) => sums.map((sum) => ({ slug, sum: pounds(sum) })));
  const rest = GIFTS - above.length;
  const sums = fitTo(
    subtract(GIVEN, add(...above.map((one) => one.sum))),
    Array.from({ length: rest }, () => pounds(chance.weighted(SUMS))),
    chance,
  );
  const lower = sums.map((amountPence, index): PlannedGift => ({
    giver: index < GIVERS - above.length ? index : chance.below(GIVERS - above.length),
    amountPence,
    at: momentOf(chance),
    towards: chance.happens(0.12) ? 'open' : 'whole',
    comesBack: chance.happens(0.9),
  }));
  const upper = above.map((one, index): PlannedGift => ({
    giver: GIVERS - above.length + index,
    amountPence: one.sum,
    at: 0.9 + chance.next() * 0.095,
    towards: { slug: one.slug },
    comesBack: true,
  }));
  return [...lower, ...upper].sort((a, b) => a.at - b.at);
}

export type Giver = Pick<
  GiveForm,
  | 'name'
  | 'greeting'
  | 'email'
  | 'address1'
  | 'town'
  | 'postcode'
  | 'wall'
  | 'wallWords'
  | 'declare'
  | 'byEmail'
  | 'byPost'
>;

const plain = (text: string): string =>
  text
    .normalize('NFD')
    .replaceAll(/[\u0300-\u036f]/g, '')
    .replaceAll('Ł', 'L')
    .replaceAll(/[^A-Za-z]/g, '')
    .toLowerCase();

export function inventGiver(number: number, chance: Chance): Giver {
  const first = chance.pick(FIRST_NAMES);
  const family = chance.pick(FAMILY_NAMES);
  const name = `${first} ${family}`;
  const declare = chance.happens(0.62) ? ('on' as const) : ('' as const);
  const hasAddress = declare === 'on' || chance.happens(0.2);
  const wall = chance.weighted([
    ['wall', 44],
    ['not-public', 53],
    ['treasurer-only', 3],
  ] as const);
  return {
    name,
    greeting: chance.weighted([
      [first, 6],
      [`Mr ${family}`, 1],
      [`Mrs ${family}`, 2],
      [`Ms ${family}`, 1],
    ] as const),
    email: `${plain(first)}.${plain(family)}.${number}@post.example`,
    address1: hasAddress ? `${1 + chance.below(88)} ${chance.pick(STREETS)}` : '',
    town: hasAddress ? 'Brackenhythe' : '',
    postcode: hasAddress ? `BK4 ${1 + chance.below(9)}${chance.pick(['AA', 'BD', 'HY', 'LN', 'RT'])}` : '',
    wall,
    wallWords:
      wall === 'wall'
        ? chance.weighted([
            [name, 7],
            [`The ${family} family`, 2],
            [`${first}, Staithe Row`, 1],
          ] as const)
        : '',
    declare,
    byEmail: chance.happens(0.48) ? 'on' : '',
    byPost: hasAddress && chance.happens(0.15) ? 'on' : '',
  };
}

/** In memory, in honour, a message: what comes with one gift and not with its giver. */
export function inventWords(chance: Chance): Partial<GiveForm> {
  const message = chance.happens(0.09) ? { message: chance.pick(MESSAGES) } : {};
  if (!chance.happens(0.13)) return message;
  const dedication = chance.weighted([
    ['memory', 4],
    ['honour', 1],
  ] as const);
  const family = chance.pick(FAMILY_NAMES);
  const contact = chance.happens(0.4)
    ? {
        contactName: `${chance.pick(FIRST_NAMES)} ${family}`,
        contactEmail: `family.${plain(family)}@post.example`,
        contactSum: chance.happens(0.2) ? ('on' as const) : ('' as const),
      }
    : {};
  return { ...message, dedication, dedicationName: `${chance.pick(FIRST_NAMES)} ${family}`, ...contact };
}
