// Who gives: found again by address and name together, never by one alone; couples often share an address.
import { z } from 'zod';
import type { Db, Trx } from '#server/platform/db.ts';

export type NewSupporter = {
  name: string;
  greeting: string;
  email: string;
  phone: string | null;
  addressLine1: string | null;
  addressLine2: string | null;
  town: string | null;
  postcode: string | null;
  country: string;
  isNameWithheld: boolean;
  at: Date;
};

const foundSchema = z.object({ id: z.string(), name: z.string(), is_name_withheld: z.boolean() });

/** Letters alone decide: case, accents' spelling and spaces do not make another person. */
const sameName = (one: string, other: string): boolean => normalise(one) === normalise(other);
const normalise = (name: string): string =>
  name.normalize('NFKC').toLocaleLowerCase('en-GB').replaceAll(/\s+/g, ' ').trim();

/**
 * The supporter with this address and name, or a new one. What is on record is not overwritten by a public
 * form; a wish to be hidden always counts.
 */
export async function keepSupporter(
  trx: Trx,
  supporter: NewSupporter,
): Promise<{ id: string; isNew: boolean }> {
  // Two gifts of one person at once must not make two people.
  await trx.raw('select pg_advisory_xact_lock(hashtextextended(?, 0))', [
    `supporter:${supporter.email.toLowerCase()}`,
  ]);
  const found: unknown[] = await trx('supporters')
    .whereRaw('lower(email) = ?', [supporter.email.toLowerCase()])
    .whereNull('merged_into')
    .whereNull('erased_at')
    .orderBy('created_at')
    .select('id', 'name', 'is_name_withheld');
  const same = found.map((row) => foundSchema.parse(row)).find((row) => sameName(row.name, supporter.name));
  if (same) {
    if (supporter.isNameWithheld && !same.is_name_withheld)
      await trx('supporters').where({ id: same.id }).update({ is_name_withheld: true });
    return { id: same.id, isNew: false };
  }
  const [row] = await trx('supporters')
    .insert({
      name: supporter.name,
      greeting: supporter.greeting,
      email: supporter.email,
      phone: supporter.phone,
      address_line1: supporter.addressLine1,
      address_line2: supporter.addressLine2,
      town: supporter.town,
      postcode: supporter.postcode,
      country: supporter.country,
      is_name_withheld: supporter.isNameWithheld,
      created_at: supporter.at,
    })
    .returning<{ id: string }[]>('id');
  if (!row) throw new Error('the supporter was not written');
  return { id: row.id, isNew: true };
}

export const CHANNELS = ['email', 'post', 'phone'] as const;
export type Channel = (typeof CHANNELS)[number];

/** One row a channel, given or not: what was not agreed to is as much a record as what was. */
export async function keepConsents(
  trx: Trx,
  consent: {
    supporterId: string;
    wordingId: string;
    given: Record<Channel, boolean>;
    sourceKind: string;
    sourceId: string;
    at: Date;
  },
): Promise<void> {
  await trx('consents').insert(
    CHANNELS.map((channel) => ({
      supporter_id: consent.supporterId,
      channel,
      is_given: consent.given[channel],
      wording_id: consent.wordingId,
      source_kind: consent.sourceKind,
      source_id: consent.sourceId,
      recorded_at: consent.at,
    })),
  );
}

const consentRow = z.object({
  channel: z.enum(CHANNELS),
  is_given: z.boolean(),
  words: z.string(),
  version: z.number(),
});
export type KeptConsent = { channel: Channel; isGiven: boolean; wording: string; version: number };

export async function listConsents(db: Db, sourceKind: string, sourceId: string): Promise<KeptConsent[]> {
  const rows: unknown[] = await db('consents as c')
    .join('wordings as w', 'w.id', 'c.wording_id')
    .where({ 'c.source_kind': sourceKind, 'c.source_id': sourceId })
    .orderBy('c.id')
    .select('c.channel', 'c.is_given', 'w.words', 'w.version');
  return rows.map((row) => {
    const consent = consentRow.parse(row);
    return {
      channel: consent.channel,
      isGiven: consent.is_given,
      wording: consent.words,
      version: consent.version,
    };
  });
}
