// The only file that names the tables of the society: its details, dated settings, and statutory wordings.
import { z } from 'zod';
import { dayOf, type Day } from '#shared/dates.ts';
import type { Society } from '#shared/society/society-schemas.ts';
import type { Db, Trx } from '#server/platform/db.ts';
import { NotFound } from '#server/platform/errors.ts';

const rowSchema = z.object({
  name: z.string(),
  address_line: z.string(),
  phone: z.string(),
  email: z.string(),
  charity_number: z.string(),
  registration_statement: z.string(),
  gift_aid_recognised_on: z.string().nullable(),
  complaints: z.string(),
});

export type SocietyDetails = Society & { giftAidRecognisedOn: Day | null };

const toSociety = (row: z.infer<typeof rowSchema>): SocietyDetails => ({
  name: row.name,
  addressLine: row.address_line,
  phone: row.phone,
  email: row.email,
  charityNumber: row.charity_number,
  registrationStatement: row.registration_statement,
  giftAidRecognisedOn: row.gift_aid_recognised_on,
  complaints: row.complaints,
});

export async function getSociety(db: Db): Promise<SocietyDetails> {
  const row: unknown = await db('society').first();
  if (row === undefined) throw new NotFound('The society’s details are not yet written down.');
  return toSociety(rowSchema.parse(row));
}

/** Gift Aid is offered only for days on or after the recognition. */
export async function isGiftAidOffered(db: Db, at: Date): Promise<boolean> {
  const society = await getSociety(db);
  return society.giftAidRecognisedOn !== null && society.giftAidRecognisedOn <= dayOf(at);
}

const settingRow = z.object({ key: z.string(), value: z.unknown() });

/** The value of every setting that holds on a day; one that was never set by then is missing. */
export async function readSettings(db: Db, day: Day): Promise<Map<string, unknown>> {
  const rows: unknown[] = await db('settings')
    .distinctOn('key')
    .where('from_day', '<=', day)
    .orderBy([{ column: 'key' }, { column: 'from_day', order: 'desc' }])
    .select('key', 'value');
  return new Map(rows.map((row) => settingRow.parse(row)).map(({ key, value }) => [key, value]));
}

export type WordingKind = 'declaration' | 'consent';
const wordingSchema = z.object({ id: z.string(), version: z.number(), words: z.string() });
export type Wording = z.infer<typeof wordingSchema>;

/** The newest wording in force at a moment. */
export async function getWording(db: Db, kind: WordingKind, at: Date): Promise<Wording> {
  const row: unknown = await db('wordings')
    .where({ kind })
    .where('from_at', '<=', at)
    .orderBy('version', 'desc')
    .first();
  if (row === undefined) throw new NotFound(`No ${kind} wording is in force.`);
  return wordingSchema.parse(row);
}

export async function addWording(
  trx: Trx,
  kind: WordingKind,
  version: number,
  words: string,
  fromAt: Date,
): Promise<void> {
  await trx('wordings').insert({ kind, version, words, from_at: fromAt });
}

export async function setSetting(trx: Trx, key: string, fromDay: Day, value: unknown): Promise<void> {
  await trx('settings')
    .insert({ key, from_day: fromDay, value: JSON.stringify(value) })
    .onConflict(['key', 'from_day'])
    .merge();
}

export async function writeSociety(
  trx: Trx,
  details: SocietyDetails & { giftAidReference: string | null },
): Promise<void> {
  await trx('society')
    .insert({
      name: details.name,
      address_line: details.addressLine,
      phone: details.phone,
      email: details.email,
      charity_number: details.charityNumber,
      registration_statement: details.registrationStatement,
      gift_aid_recognised_on: details.giftAidRecognisedOn,
      gift_aid_reference: details.giftAidReference,
      complaints: details.complaints,
    })
    .onConflict('is_only')
    .merge();
}
