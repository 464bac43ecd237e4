// The demonstration's fourteen months: the same services a giver and the desk use, with the clock moved.
import { createServer, type Server } from 'node:http';
import express from 'express';
import { z } from 'zod';
import { addDays, dayOf, type Day } from '#shared/dates.ts';
import { GIVE_FIELDS, type GiveForm } from '#shared/giving/give-schemas.ts';
import type { Role } from '#shared/roles.ts';
import { keepCheckRun, runChecks } from '#server/books/index.ts';
import type { Deps } from '#server/deps.ts';
import { createWebhookRouter, givingTasks, judgeWords, readStanding } from '#server/giving/index.ts';
import type { movableClock } from '#server/platform/clock.ts';
import { sendDueMail } from '#server/platform/mail/index.ts';
import { seedBrackenhythe, SOCIETY_NAME, type Brackenhythe } from './brackenhythe.ts';
import { GIFTS, inventGiver, inventWords, planGifts, type Giver, type PlannedGift } from './gift-plan.ts';
import { giveGift, openControls, type Controls } from './give.ts';
import { happenings } from './happenings.ts';
import { createChance, type Chance } from './random.ts';

export const CAMPAIGN_DAYS = 425;
const CATCH_UP_EVERY = 40;
/** Left for the desk to read, so that Today has something on it. */
const WORDS_LEFT_UNREAD = 6;

type SeedDeps = Deps & { clock: ReturnType<typeof movableClock> };
export type SeedInput = { lastDay: Day; seed: number; tell: (words: string) => void };
type Run = { deps: SeedDeps; controls: Controls; town: Brackenhythe; chance: Chance; input: SeedInput };

const noon = (day: Day): Date => new Date(`${day}T12:00:00Z`);

async function moveTo({ deps, controls }: Pick<Run, 'deps' | 'controls'>, moment: Date): Promise<void> {
  deps.clock.moveTo(moment);
  await controls.post('/clock', { to: moment.toISOString() });
}

/** Hears the payment service while no web process does, at the address it was told. */
async function hearWebhooks(deps: Deps): Promise<Server> {
  const app = express().use('/webhooks/payments', createWebhookRouter(deps));
  const server = createServer(app);
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(deps.config.port, '127.0.0.1', resolve);
  });
  return server;
}

/** What the worker does between gifts: fees come, events are worked, letters go out. */
async function catchUp({ deps, controls }: Run): Promise<void> {
  const tasks = givingTasks(deps);
  await controls.post('/fees/settle');
  await controls.post('/webhooks/flush');
  await tasks['work-payment-events']();
  await tasks['poll-payments']();
  for (;;) {
    const tally = await sendDueMail(deps, { fromName: SOCIETY_NAME, now: () => new Date() });
    if (tally.claimed === 0 || tally.isServerAway) return;
  }
}

const readerOf = (town: Brackenhythe, email: string, name: string, roles: Role[]) => ({
  accountId: town.people.get(email) ?? '',
  name,
  roles,
  isTrustee: false,
});

const unreadSchema = z.object({ id: z.string(), number: z.number(), is_name_withheld: z.boolean() });

/** The secretary reads what the public wrote, oldest first; the treasurer, where a giver asked for nobody else. */
async function readWords({ deps, town }: Run, leave: number): Promise<void> {
  const nell = readerOf(town, 'nell.tolley@brackenhythe.example', 'Nell Tolley', ['secretary']);
  const edwin = readerOf(town, 'edwin.marl@brackenhythe.example', 'Edwin Marl', ['treasurer']);
  const rows: unknown[] = await deps
    .db('public_words as w')
    .join('gifts as g', 'g.id', 'w.gift_id')
    .join('supporters as s', 's.id', 'g.supporter_id')
    .whereNull('w.read_at')
    .orderBy('w.written_at')
    .select('w.id', 'g.number', 's.is_name_withheld');
  for (const row of rows.slice(0, Math.max(0, rows.length - leave)).map((one) => unreadSchema.parse(one)))
    await deps.db.transaction((trx) =>
      judgeWords(deps, trx, row.is_name_withheld ? edwin : nell, {
        verdict: 'passed',
        giftNumber: row.number,
        wordsId: row.id,
        requestId: undefined,
      }),
    );
}

async function towardsOf({ deps, chance }: Run, planned: PlannedGift): Promise<string> {
  if (typeof planned.towards === 'object') return planned.towards.slug;
  if (planned.towards === 'whole') return 'whole';
  const { reach, parts } = await readStanding(deps.db);
  // Only parts within the nine that the money of this story reaches, or the sums above would not come out.
  const open = reach.parts
    .slice(0, 9)
    .filter((part) => !part.isPaid && parts.some((one) => one.slug === part.slug))
    .slice(0, 2);
  return open.length === 0 ? 'whole' : chance.pick(open).slug;
}

function toForm(giver: Giver, words: Partial<GiveForm>, planned: PlannedGift, towards: string): GiveForm {
  const blank = Object.fromEntries(GIVE_FIELDS.map((field) => [field, '']));
  const form = {
    ...blank,
    dedication: 'none',
    country: 'GB',
    shownWordings: '1.1',
    ...giver,
    ...words,
    towards,
  };
  return { ...form, amount: 'other', other: (planned.amountPence / 100).toFixed(2) } as GiveForm;
}

async function giveAll(run: Run): Promise<void> {
  const { deps, chance, input } = run;
  const startMs = noon(addDays(input.lastDay, -CAMPAIGN_DAYS)).getTime();
  const endMs = Math.min(new Date(`${input.lastDay}T19:30:00Z`).getTime(), Date.now() - 5 * 60_000);
  const givers = new Map<number, Giver>();
  const due = happenings(input.lastDay);
  for (const [index, planned] of planGifts(chance).entries()) {
    const moment = new Date(startMs + planned.at * (endMs - startMs));
    while (due[0] && noon(due[0].day) <= moment) {
      const next = due.shift();
      if (!next) break;
      await moveTo(run, noon(next.day));
      await next.happen(run);
    }
    await moveTo(run, moment);
    const giver = givers.get(planned.giver) ?? inventGiver(planned.giver + 1, chance);
    givers.set(planned.giver, giver);
    const words = inventWords(chance);
    await giveGift(deps, run.controls, toForm(giver, words, planned, await towardsOf(run, planned)), planned);
    if ((index + 1) % CATCH_UP_EVERY === 0) {
      await catchUp(run);
      input.tell(`${index + 1} of ${GIFTS} gifts`);
    }
    if ((index + 1) % (CATCH_UP_EVERY * 4) === 0 && index + 1 < GIFTS) await readWords(run, 0);
  }
  await catchUp(run);
  await readWords(run, WORDS_LEFT_UNREAD);
  await catchUp(run);
}

/** Fills an empty database. The payment and mail stand-ins must be running and the site's port be free. */
export async function seedDemonstration(deps: SeedDeps, input: SeedInput): Promise<void> {
  const { controlsUrl } = deps.config.payment;
  if (!controlsUrl)
    throw new Error('The demonstration needs the payment stand-in: set TREENAIL_PAYMENT_CONTROLS.');
  const controls = openControls(controlsUrl);
  const hearing = await hearWebhooks(deps);
  try {
    const startDay = addDays(input.lastDay, -CAMPAIGN_DAYS);
    await moveTo({ deps, controls }, noon(startDay));
    const town = await deps.db.transaction((trx) =>
      seedBrackenhythe(trx, { startDay, lastDay: input.lastDay, sessionSecret: deps.config.sessionSecret }),
    );
    const run: Run = { deps, controls, town, chance: createChance(input.seed), input };
    await giveAll(run);
    deps.clock.moveTo(standingMoment(input.lastDay));
    const results = await runChecks(deps.db);
    await deps.db.transaction((trx) => keepCheckRun(trx, results, deps.clock.now()));
    const faults = results.flatMap((one) => one.faults.map((fault) => `${one.name}: ${fault.fault}`));
    if (faults.length > 0) throw new Error(`the books do not agree: ${faults.slice(0, 5).join('; ')}`);
  } finally {
    hearing.closeAllConnections();
    await new Promise((resolve) => hearing.close(resolve));
    await putClockRight(controls, input.lastDay);
  }
}

/** Puts the stand-in's clock where the demonstration stands, also after a generator that was cut off. */
export const putClockRight = (controls: Controls, lastDay: Day): Promise<void> =>
  controls.post('/clock', isToday(lastDay) ? { reset: true } : { to: `${lastDay}T20:00:00Z` });

const isToday = (day: Day): boolean => day === dayOf(new Date());
/** Where the clock stands when all is given: now, or the evening of a day that was asked for. */
const standingMoment = (lastDay: Day): Date =>
  isToday(lastDay) ? new Date() : new Date(`${lastDay}T20:00:00Z`);
