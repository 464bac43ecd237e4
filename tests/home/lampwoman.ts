// The Lampwoman with sums that can be changed, as the public API tells of her.
import { readFileSync } from 'node:fs';
import { campaignSchema, type Campaign } from '#shared/campaign/campaign-schemas.ts';
import { computeReach, type ReachPart } from '#shared/campaign/reach-rules.ts';
import { add, NOTHING, pence, type Pence } from '#shared/money.ts';

type Row = [slug: string, name: string, pounds: number, bottomMm: number | null, topMm: number | null];

const ROWS: readonly Row[] = [
  ['footing', 'Footing', 6400, 0, 500],
  ['boots-and-hem', 'Boots and hem', 3900, 500, 1050],
  ['skirt-lower', 'Lower skirt', 5200, 1050, 2100],
  ['skirt-upper', 'Upper skirt', 4900, 2100, 3160],
  ['belt-and-rope', 'Belt and rope', 2600, 3160, 3400],
  ['body', 'Body', 6800, 3400, 4100],
  ['left-arm', 'Left arm', 3400, 3100, 4250],
  ['shoulders', 'Shoulders', 4300, 4100, 4450],
  ['right-arm-lower', 'Raised arm to the elbow', 3100, 4300, 4920],
  ['right-forearm', 'Forearm and hand', 4100, 4900, 5860],
  ['head-and-scarf', 'Head and scarf', 9700, 4450, 5120],
  ['lantern-frame', 'Lantern frame', 15200, 5840, 7200],
  ['panes', 'The 24 panes', 14400, 5980, 6720],
];
const LIFTING: Row = ['lifting', 'Crane and lifting', 1800, null, null];

const drawing = readFileSync(new URL('../../seeds/lampwoman-figure.svg', import.meta.url), 'utf8');

export type Wishes = {
  givenPounds?: number;
  meantPounds?: Record<string, number>;
  inKindPounds?: Record<string, number>;
  /** A cost without height, after the shoulders. */
  withLifting?: boolean;
};

const pounds = (sum: number): Pence => pence(sum * 100);

export function lampwoman(wishes: Wishes = {}): Campaign {
  const { givenPounds = 41_280, meantPounds = {}, inKindPounds = {}, withLifting = false } = wishes;
  const rows = withLifting ? [...ROWS.slice(0, 8), LIFTING, ...ROWS.slice(8)] : ROWS;
  const priced = rows.map(([slug, , cost, bottomMm, topMm]): ReachPart => ({
    slug,
    bottomMm,
    topMm,
    costPence: pounds(cost),
    inKindPence: pounds(inKindPounds[slug] ?? 0),
    meantPence: pounds(meantPounds[slug] ?? 0),
  }));
  const meant = add(NOTHING, ...priced.map((part) => part.meantPence));
  const reach = computeReach(priced, pence(pounds(givenPounds) - meant));
  const nameOf = (slug: string): string => rows.find((row) => row[0] === slug)?.[1] ?? '';
  let sumPence = NOTHING;
  const rungs = reach.rungs.map(({ topMm, slugs, costPence }) => {
    sumPence = add(sumPence, costPence);
    const slug = slugs.find((one) => rows.some((row) => row[0] === one && row[4] === topMm)) ?? '';
    return { topMm, slug, name: nameOf(slug), sumPence };
  });
  return campaignSchema.parse({
    name: 'The Lampwoman',
    pronoun: 'her',
    lead: 'For forty years one woman rowed out at dusk and lit the river lamp.',
    place: 'Hythe Green',
    goalPence: add(NOTHING, ...priced.map((part) => part.costPence)),
    givenPence: pounds(givenPounds),
    givers: 612,
    heightMm: 7200,
    reach: { ...reach, rungs },
    description: ['Her skirt stands.', 'Her body is on the trestles.', 'Her head is still to find.'],
    parts: reach.parts.map((reached, index) => ({
      ...priced[index],
      ...reached,
      name: nameOf(reached.slug),
      inKind: inKindPounds[reached.slug]
        ? [{ firm: 'Thornquay Plate', amountPence: pounds(inKindPounds[reached.slug] ?? 0) }]
        : [],
      state: reached.isPaid ? 'paid' : 'planned',
      maker: null,
    })),
    stages: [
      {
        slug: 'body',
        name: 'Body carved',
        mark: 'carving',
        expectedOn: '2027-07-30',
        doneOn: null,
        remark: null,
        changes: [{ fromDay: '2027-06-25', toDay: '2027-07-30', reason: 'Two oak butts split.' }],
      },
    ],
    wording: {
      id: '0b8f3a52-4d2e-4c55-9f0e-2f6f8a1d9c11',
      version: 1,
      purpose: 'To carve, raise and light the Lampwoman.',
      onShortfall: 'We build what can stand.',
      onSurplus: 'It keeps her lit.',
      partChoice: 'wish',
    },
    drawing,
    giftAidOffered: true,
  });
}

export const SOCIETY = {
  name: 'Brackenhythe Heritage Society',
  addressLine: 'Staithe House, 4 Ropewalk, Brackenhythe BK4 7HY',
  phone: '01632 960 114',
  email: 'post@brackenhythe.example',
  charityNumber: '0000000',
  registrationStatement: 'Registered charity 0000000 (invented).',
  complaints: 'Tell us first.',
};
