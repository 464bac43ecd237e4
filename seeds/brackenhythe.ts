// Brackenhythe before the first gift: the society, its wordings and people, the Lampwoman and her stages.
import { readFileSync } from 'node:fs';
import { declarationWording } from '#shared/declarations/statutory-wording.ts';
import { addDays, type Day } from '#shared/dates.ts';
import { pence } from '#shared/money.ts';
import { createAccount } from '#server/accounts/index.ts';
import { addFund } from '#server/books/index.ts';
import {
  addAppealWording,
  addCampaign,
  addFigure,
  addParts,
  addStages,
  publishCampaign,
  type NewPart,
} from '#server/campaign/index.ts';
import type { Trx } from '#server/platform/db.ts';
import { addWording, SETTING_KEYS, setSetting, writeSociety } from '#server/society/index.ts';
import { DEMONSTRATION_PEOPLE } from './demonstration-people.ts';

export const SOCIETY_NAME = 'Brackenhythe Heritage Society';

const pounds = (count: number) => pence(count * 100);
const part = (
  slug: string,
  name: string,
  cost: number,
  bottomMm: number,
  topMm: number,
  maker?: string,
): NewPart => ({
  slug,
  name,
  costPence: pounds(cost),
  bottomMm,
  topMm,
  maker,
});

/** In the order of building. */
export const LAMPWOMAN_PARTS: readonly NewPart[] = [
  part('footing', 'Footing', 6_400, 0, 500, 'Brackenhythe Groundworks'),
  part('boots-and-hem', 'Boots and hem', 3_900, 500, 1_050, 'Ossel & Wray, timber'),
  part('skirt-lower', 'Lower skirt', 5_200, 1_050, 2_100, 'Ossel & Wray, timber'),
  part('skirt-upper', 'Upper skirt', 4_900, 2_100, 3_160, 'Ossel & Wray, timber'),
  part('belt-and-rope', 'Belt and rope', 2_600, 3_160, 3_400, 'Staithe Rope Works'),
  part('body', 'Body', 6_800, 3_400, 4_100, 'The carver and four volunteers'),
  part('left-arm', 'Left arm', 3_400, 3_100, 4_250),
  part('shoulders', 'Shoulders', 4_300, 4_100, 4_450),
  part('right-arm-lower', 'Raised arm to the elbow', 3_100, 4_300, 4_920),
  part('right-forearm', 'Forearm and hand', 4_100, 4_900, 5_860),
  part('head-and-scarf', 'Head and scarf', 9_700, 4_450, 5_120),
  part('lantern-frame', 'Lantern frame', 15_200, 5_840, 7_200),
  part('panes', 'The 24 panes', 14_400, 5_980, 6_720),
];

const GOAL = pounds(84_000);

const COMPLAINTS =
  'If something is wrong, tell us first: write to the secretary at the address above and we answer within ten working days. ' +
  'If you are still not content you may write to the Fundraising Regulator or to the Charity Commission for England and Wales.';

const CONSENT_WORDS =
  'By e-mail, when something changes on the figure. By post, about twice a year. By telephone or text, for work days. ' +
  'Nothing is ticked for you; every letter says how to stop the rest.';

async function seedSociety(trx: Trx, startDay: Day): Promise<void> {
  const from = new Date(`${startDay}T00:00:00Z`);
  await writeSociety(trx, {
    name: SOCIETY_NAME,
    addressLine: 'Staithe House, 4 Ropewalk, Brackenhythe BK4 7HY',
    phone: '01632 960 114',
    email: 'post@brackenhythe.example',
    charityNumber: '0000000',
    registrationStatement: 'Registered charity 0000000 (invented)',
    complaints: COMPLAINTS,
    giftAidRecognisedOn: addDays(startDay, -700),
    giftAidReference: 'XX00000',
  });
  await addWording(trx, 'declaration', 1, declarationWording(SOCIETY_NAME), from);
  await addWording(trx, 'consent', 1, CONSENT_WORDS, from);
  await setSetting(trx, SETTING_KEYS.leastGift, startDay, 100);
  await setSetting(trx, SETTING_KEYS.largeGift, startDay, 100_000);
}

export async function seedPeople(
  trx: Trx,
  sessionSecret: string,
  createdAt: Date,
): Promise<Map<string, string>> {
  const ids = new Map<string, string>();
  for (const person of DEMONSTRATION_PEOPLE) {
    const id = await createAccount(trx, {
      ...person,
      isDemonstration: true,
      createdAt,
      ...(person.totpSecret && { secondFactor: { secret: person.totpSecret, sessionSecret } }),
    });
    ids.set(person.email, id);
  }
  return ids;
}

const PURPOSE =
  'To carve, raise and light the Lampwoman on Hythe Green, and to keep her sound for her first ten years.';
const SHORTFALL =
  'If we cannot raise enough to finish her, we build as far up as the money reaches, and whatever is left goes to the upkeep of the town’s river lamps. Above £120 from one giver we ask first.';
const SURPLUS =
  'If more comes than she costs, the rest is kept for her upkeep: oiling the oak, tending the lamp, and the insurance.';

async function seedCampaign(trx: Trx, startDay: Day): Promise<string> {
  const from = new Date(`${startDay}T00:00:00Z`);
  const fund = await addFund(trx, {
    slug: 'the-figure',
    name: 'The figure',
    restriction: 'restricted',
    purpose: PURPOSE,
  });
  await addFund(trx, {
    slug: 'general',
    name: 'General',
    restriction: 'unrestricted',
    purpose: 'Whatever the society is for.',
  });
  const campaignId = await addCampaign(trx, {
    slug: 'lampwoman',
    name: 'The Lampwoman',
    pronoun: 'her',
    place: 'Hythe Green',
    whatSumsBuy:
      '£5 is one oak peg, turned and driven. £20 is a foot of green oak. £60 is a morning of the carver.',
    goalPence: GOAL,
    fundId: fund.id,
    lead: 'For forty years one woman rowed out at dusk and lit the river lamp, so that the boats came home. We are building her in green oak, 7.2 metres tall, to stand on Hythe Green with her lantern up. The town pays for her, peg by peg.',
  });
  await addParts(trx, campaignId, LAMPWOMAN_PARTS);
  const wording = {
    purpose: PURPOSE,
    onShortfall: SHORTFALL,
    onSurplus: 'If more comes than she costs, the rest is kept for her upkeep.',
    partChoice: 'wish' as const,
  };
  await addAppealWording(trx, campaignId, { ...wording, version: 1 }, from);
  await addAppealWording(
    trx,
    campaignId,
    { ...wording, version: 2, onSurplus: SURPLUS },
    new Date(`${addDays(startDay, 180)}T00:00:00Z`),
  );
  await addFigure(
    trx,
    campaignId,
    1,
    readFileSync(new URL('lampwoman-figure.svg', import.meta.url), 'utf8'),
    from,
  );
  await publishCampaign(trx, campaignId, { actor: { kind: 'system' }, at: from });
  return campaignId;
}

/** Days are counted from the last day of the demonstration, so that the story always stands at the same point. */
async function seedStages(trx: Trx, campaignId: string, lastDay: Day): Promise<void> {
  const from = (days: number) => addDays(lastDay, days);
  await addStages(trx, campaignId, [
    { slug: 'footing', name: 'Footing poured', mark: 'footing', expectedOn: from(-206), remark: null },
    {
      slug: 'skirt',
      name: 'Skirt raised',
      mark: 'frame',
      expectedOn: from(-46),
      remark: 'Frame and planking to the belt, 3.2 m.',
    },
    { slug: 'body', name: 'Body, belt and arms carved', mark: 'carving', expectedOn: from(51), remark: null },
    {
      slug: 'upper-half',
      name: 'Upper half lifted',
      mark: 'lifting',
      expectedOn: from(136),
      remark: 'Waits on the money for the head.',
    },
    {
      slug: 'lantern',
      name: 'Lantern hung and lit',
      mark: 'lighting',
      expectedOn: from(185),
      remark: 'At dusk.',
    },
  ]);
}

export type Brackenhythe = { campaignId: string; people: Map<string, string> };

/** Everything but gifts. `lastDay` is the day on which the demonstration stands. */
export async function seedBrackenhythe(
  trx: Trx,
  input: { startDay: Day; lastDay: Day; sessionSecret: string },
): Promise<Brackenhythe> {
  await seedSociety(trx, input.startDay);
  const people = await seedPeople(trx, input.sessionSecret, new Date(`${input.startDay}T09:00:00Z`));
  const campaignId = await seedCampaign(trx, input.startDay);
  await seedStages(trx, campaignId, input.lastDay);
  return { campaignId, people };
}
