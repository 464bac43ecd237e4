// Keeps Gift Aid declarations exactly as they were given.
import { z } from 'zod';
import type { Db, Trx } from '#server/platform/db.ts';

export type NewDeclaration = {
  supporterId: string;
  wordingId: string;
  fullName: string;
  addressLine1: string;
  addressLine2: string | null;
  town: string;
  /** `X` for a giver who lives abroad, as the tax authority's schedule has it. */
  postcode: string;
  country: string;
  givenAt: Date;
  sourceKind: string;
  sourceId: string;
};

export async function keepDeclaration(trx: Trx, declaration: NewDeclaration): Promise<string> {
  const [row] = await trx('declarations')
    .insert({
      supporter_id: declaration.supporterId,
      wording_id: declaration.wordingId,
      full_name: declaration.fullName,
      address_line1: declaration.addressLine1,
      address_line2: declaration.addressLine2,
      town: declaration.town,
      postcode: declaration.postcode,
      country: declaration.country,
      covers: 'past-present-future',
      is_own_money: true,
      given_at: declaration.givenAt,
      source_kind: declaration.sourceKind,
      source_id: declaration.sourceId,
    })
    .returning<{ id: string }[]>('id');
  if (!row) throw new Error('the declaration was not written');
  return row.id;
}

const rowSchema = z.object({
  id: z.string(),
  words: z.string(),
  version: z.number(),
  full_name: z.string(),
  address_line1: z.string(),
  address_line2: z.string().nullable(),
  town: z.string(),
  postcode: z.string(),
  given_at: z.date(),
});

export type KeptDeclaration = {
  id: string;
  wording: string;
  version: number;
  fullName: string;
  address: string;
  givenAt: Date;
};

export async function findDeclaration(db: Db, id: string): Promise<KeptDeclaration | undefined> {
  const found: unknown = await db('declarations as d')
    .join('wordings as w', 'w.id', 'd.wording_id')
    .where('d.id', id)
    .first('d.*', 'w.words', 'w.version');
  if (found === undefined) return undefined;
  const row = rowSchema.parse(found);
  return {
    id: row.id,
    wording: row.words,
    version: row.version,
    fullName: row.full_name,
    address: [row.address_line1, row.address_line2, row.town, row.postcode === 'X' ? null : row.postcode]
      .filter((line): line is string => line !== null && line !== '')
      .join(', '),
    givenAt: row.given_at,
  };
}
