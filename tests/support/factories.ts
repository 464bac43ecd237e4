// Makes what a test stands on: the society and its campaign, and gifts given as a giver gives them.
import { z } from 'zod';
import { GIVE_FIELDS, type GiveForm } from '#shared/giving/give-schemas.ts';
import { addDays, dayOf } from '#shared/dates.ts';
import { beginCheckout, makeToken, readOutcome, writeDraft } from '#server/giving/index.ts';
import { seedBrackenhythe, type Brackenhythe } from '#seeds/brackenhythe.ts';
import type { TestApp } from './app.ts';

/** The version in force in the town that `setUpTown` makes. */
export const APPEAL_VERSION = 2;

const sessionInUrl = /(cs_[A-Za-z0-9_]+)/;

/** The society, its people and the Lampwoman, with no gift yet. */
export async function setUpTown(app: TestApp): Promise<Brackenhythe> {
  const lastDay = dayOf(app.clock.now());
  return app.deps.db.transaction((trx) =>
    seedBrackenhythe(trx, {
      startDay: addDays(lastDay, -400),
      lastDay,
      sessionSecret: app.deps.config.sessionSecret,
    }),
  );
}

/** A whole sheet of £20 by Thea Quillan; name what should be different. */
export const filledSheet = (changes: GiveForm = {}): GiveForm => ({
  ...Object.fromEntries(GIVE_FIELDS.map((field) => [field, ''])),
  amount: '20',
  towards: 'whole',
  dedication: 'none',
  wall: 'not-public',
  country: 'GB',
  name: 'Thea Quillan',
  greeting: 'Mrs Quillan',
  email: 'thea.quillan@post.example',
  shownWordings: '1.1',
  ...changes,
});

export const withDeclaration: GiveForm = {
  address1: '9 Ropewalk',
  town: 'Brackenhythe',
  postcode: 'BK4 7HY',
  declare: 'on',
};

export async function control(app: TestApp, path: string, body: object = {}): Promise<unknown> {
  const answer = await fetch(`${app.paymentControls}${path}`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify(body),
  });
  if (!answer.ok) throw new Error(`${path}: ${answer.status} ${await answer.text()}`);
  return answer.json();
}

export type Asked = { intentId: string; sessionId: string; url: string };

/** As far as the card page. */
export async function askToGive(
  app: TestApp,
  changes: GiveForm = {},
  appealVersion = APPEAL_VERSION,
): Promise<Asked> {
  const token = makeToken();
  await writeDraft(app.deps, token, filledSheet(changes), false);
  const { url, intentId } = await beginCheckout(app.deps, { token, appealVersion });
  return { intentId, sessionId: z.string().parse(sessionInUrl.exec(url)?.[1]), url };
}

/** A paid gift whose giver came back to the page. */
export async function giveGift(
  app: TestApp,
  changes: GiveForm = {},
  appealVersion = APPEAL_VERSION,
): Promise<{ giftId: string; number: number } & Asked> {
  const asked = await askToGive(app, changes, appealVersion);
  await control(app, `/sessions/${asked.sessionId}/pay`);
  await readOutcome(app.deps, asked.intentId);
  const row: unknown = await app.deps.db('gifts').where({ intent_id: asked.intentId }).first('id', 'number');
  const gift = z.object({ id: z.string(), number: z.number() }).parse(row);
  return { giftId: gift.id, number: gift.number, ...asked };
}
