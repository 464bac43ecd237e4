// What the site lead of the demonstration says of parts and stages.
import { addDays, dayOf, type Day } from '#shared/dates.ts';
import { finishStage, markPart, moveStage } from '#server/campaign/index.ts';
import type { Deps } from '#server/deps.ts';
import type { Brackenhythe } from './brackenhythe.ts';

type Site = { deps: Deps; town: Brackenhythe };
export type Happening = { day: Day; happen: (site: Site) => Promise<void> };

/** What the site lead says of parts and stages, each on its day. */
export function happenings(lastDay: Day): Happening[] {
  const on = (days: number, happen: Happening['happen']): Happening => ({
    day: addDays(lastDay, days),
    happen,
  });
  const deed = (run: Site) => ({
    actor: { kind: 'desk' as const, accountId: run.town.people.get('osric.wray@brackenhythe.example') ?? '' },
    at: run.deps.clock.now(),
  });
  const mark =
    (workState: 'making' | 'placed', ...slugs: string[]) =>
    async (run: Site) => {
      const { campaignId } = run.town;
      for (const slug of slugs)
        await run.deps.db.transaction((trx) => markPart(trx, { campaignId, slug, workState }, deed(run)));
    };
  const finish = (slug: string) => async (run: Site) => {
    const done = { campaignId: run.town.campaignId, slug, day: dayOf(run.deps.clock.now()) };
    await run.deps.db.transaction((trx) => finishStage(trx, done, deed(run)));
  };
  return [
    on(-240, mark('making', 'footing')),
    on(-205, mark('placed', 'footing')),
    on(-204, finish('footing')),
    on(-160, mark('making', 'boots-and-hem', 'skirt-lower')),
    on(-110, mark('placed', 'boots-and-hem')),
    on(-75, mark('placed', 'skirt-lower')),
    on(-74, mark('making', 'skirt-upper')),
    on(-52, mark('placed', 'skirt-upper')),
    on(-51, finish('skirt')),
    on(-45, mark('making', 'body', 'belt-and-rope')),
    on(-12, async (run: Site) => {
      const reason = 'Two of the oak butts split as they dried; new ones are being cut.';
      const move = { campaignId: run.town.campaignId, slug: 'body', toDay: addDays(lastDay, 86), reason };
      await run.deps.db.transaction((trx) => moveStage(trx, move, deed(run)));
    }),
  ];
}
