// Who gives: found again by address and name together, never by one alone; couples often share an address.
import { z } from 'zod';
import type { Trx } from '#server/platform/db.ts';
import { recordSupporter, type PersonalChange } from './supporters-audit.ts';

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

const text = z.string().nullable();
const foundSchema = z.object({
  id: z.string(),
  name: z.string(),
  is_name_withheld: z.boolean(),
  phone: text,
  address_line1: text,
  address_line2: text,
  town: text,
  postcode: text,
  country: z.string(),
});
type Found = z.output<typeof foundSchema>;
type Column = Exclude<keyof Found, 'id'>;

const ADDRESS = ['address_line1', 'address_line2', 'town', 'postcode'] as const satisfies readonly Column[];

/** Letters alone decide: case, accents' spelling and spaces do not make another person. */
const sameName = (one: string, other: string): boolean => normalise(one) === normalise(other);
const normalise = (name: string): string =>
  name.normalize('NFKC').toLocaleLowerCase('en-GB').replaceAll(/\s+/g, ' ').trim();

const personalColumns = (supporter: NewSupporter) => ({
  name: supporter.name,
  greeting: supporter.greeting,
  email: supporter.email,
  phone: supporter.phone,
  address_line1: supporter.addressLine1,
  address_line2: supporter.addressLine2,
  town: supporter.town,
  postcode: supporter.postcode,
  country: supporter.country,
});

/**
 * What the record lacks and the giver now wrote. An address is taken whole or not at all: a flat of one house
 * with the street of another would reach nobody. Its country stands for nothing while there is no address.
 */
function findGaps(found: Found, supporter: NewSupporter): PersonalChange[] {
  const given = personalColumns(supporter);
  const hasNoAddress = ADDRESS.every((column) => found[column] === null);
  const hasNewAddress = ADDRESS.some((column) => given[column] !== null);
  const gaps = [
    ...(found.phone === null ? (['phone'] as const) : []),
    ...(hasNoAddress && hasNewAddress ? ([...ADDRESS, 'country'] as const) : []),
  ];
  return gaps
    .filter((column) => given[column] !== null && given[column] !== found[column])
    .map((column) => ({ field: column, before: found[column], after: given[column] }));
}

async function fillSupporter(trx: Trx, found: Found, supporter: NewSupporter): Promise<void> {
  const gaps = findGaps(found, supporter);
  if (gaps.length > 0) {
    await trx('supporters')
      .where({ id: found.id })
      .update(Object.fromEntries(gaps.map(({ field, after }) => [field, after])));
    await recordSupporter(trx, 'supporter-filled', { id: found.id, at: supporter.at }, gaps);
  }
  if (supporter.isNameWithheld && !found.is_name_withheld) {
    await trx('supporters').where({ id: found.id }).update({ is_name_withheld: true });
    await recordSupporter(trx, 'supporter-name-withheld', { id: found.id, at: supporter.at }, [
      { field: 'is_name_withheld', before: 'false', after: 'true' },
    ]);
  }
}

async function addSupporter(trx: Trx, supporter: NewSupporter): Promise<string> {
  const personal = personalColumns(supporter);
  const [row] = await trx('supporters')
    .insert({ ...personal, is_name_withheld: supporter.isNameWithheld, created_at: supporter.at })
    .returning<{ id: string }[]>('id');
  if (!row) throw new Error('the supporter was not written');
  const values = { ...personal, ...(supporter.isNameWithheld && { is_name_withheld: 'true' }) };
  await recordSupporter(
    trx,
    'supporter-recorded',
    { id: row.id, at: supporter.at },
    Object.entries(values)
      .filter(([, after]) => after !== null)
      .map(([field, after]) => ({ field, before: null, after })),
  );
  return row.id;
}

/**
 * The supporter with this address and name, or a new one. What is on record is never overwritten by a public
 * form, only what it lacks is filled; a wish to be hidden always counts.
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
    .select('id', 'name', 'is_name_withheld', 'phone', ...ADDRESS, 'country');
  const same = found.map((row) => foundSchema.parse(row)).find((row) => sameName(row.name, supporter.name));
  if (!same) return { id: await addSupporter(trx, supporter), isNew: true };
  await fillSupporter(trx, same, supporter);
  return { id: same.id, isNew: false };
}
