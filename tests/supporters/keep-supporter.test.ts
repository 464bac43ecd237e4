// A giver who comes back: what the record lacks is filled, what it has stays, and all of it is written down.
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { keepSupporter } from '#server/supporters/index.ts';
import { cloneDatabase, type TestDatabase } from '#tests/support/database.ts';

let database: TestDatabase;
beforeAll(async () => {
  database = await cloneDatabase();
});
afterAll(() => database.drop());

type Giver = Parameters<typeof keepSupporter>[1];
const at = new Date('2027-05-03T12:00:00Z');
const bare = (email: string): Giver => ({
  name: 'Thea Quillan',
  greeting: 'Mrs Quillan',
  email,
  phone: null,
  addressLine1: null,
  addressLine2: null,
  town: null,
  postcode: null,
  country: 'GB',
  isNameWithheld: false,
  at,
});
const address = {
  addressLine1: '9 Ropewalk',
  addressLine2: 'Upper floor',
  town: 'Calais',
  postcode: '62100',
  country: 'FR',
};
const keep = (giver: Giver) => database.db.transaction((trx) => keepSupporter(trx, giver));
const record = async (id: string): Promise<unknown> => database.db('supporters').where({ id }).first();
const writtenOf = async (id: string) =>
  database
    .db('personal_values as p')
    .join('audit.lines as l', 'l.id', 'p.audit_line_id')
    .where({ person_kind: 'supporter', person_id: id, actor_kind: 'giver', actor_id: id, object_id: id })
    .orderBy('p.id')
    .select<{ action: string; field: string; before_value: string | null; after_value: string | null }[]>(
      'l.action',
      'p.field',
      'p.before_value',
      'p.after_value',
    );

describe('a new supporter', () => {
  it('is written down value by value, and no value stands in the audit line itself', async () => {
    const { id, isNew } = await keep({ ...bare('new@post.example'), phone: '01632 960111' });
    expect(isNew).toBe(true);
    const written = await writtenOf(id);
    expect(written.map((one) => [one.action, one.field, one.before_value, one.after_value])).toEqual([
      ['supporter-recorded', 'name', null, 'Thea Quillan'],
      ['supporter-recorded', 'greeting', null, 'Mrs Quillan'],
      ['supporter-recorded', 'email', null, 'new@post.example'],
      ['supporter-recorded', 'phone', null, '01632 960111'],
      ['supporter-recorded', 'country', null, 'GB'],
    ]);
    expect(await database.db('audit.lines').where({ object_id: id }).pluck('detail')).toEqual([{}]);
  });
});

describe('a supporter who comes back', () => {
  it('has what was missing filled in, with the address whole', async () => {
    const { id } = await keep(bare('filled@post.example'));
    const again = await keep({ ...bare('FILLED@post.example'), ...address, phone: '01632 960222' });
    expect(again).toEqual({ id, isNew: false });
    expect(await record(id)).toMatchObject({
      phone: '01632 960222',
      address_line1: '9 Ropewalk',
      address_line2: 'Upper floor',
      town: 'Calais',
      postcode: '62100',
      country: 'FR',
    });
    const filled = (await writtenOf(id)).filter((one) => one.action === 'supporter-filled');
    expect(filled.map((one) => [one.field, one.before_value, one.after_value])).toEqual([
      ['phone', null, '01632 960222'],
      ['address_line1', null, '9 Ropewalk'],
      ['address_line2', null, 'Upper floor'],
      ['town', null, 'Calais'],
      ['postcode', null, '62100'],
      ['country', 'GB', 'FR'],
    ]);
  });

  it('keeps what is on record, and no second line is put below another house', async () => {
    const first = { ...bare('kept@post.example'), ...address, addressLine2: null, phone: '01632 960333' };
    const { id } = await keep(first);
    const before = await record(id);
    await keep({
      ...first,
      greeting: 'Thea',
      phone: '01632 960444',
      addressLine1: '1 Quay',
      addressLine2: 'Flat 2',
    });
    expect(await record(id)).toEqual(before);
    expect((await writtenOf(id)).filter((one) => one.action !== 'supporter-recorded')).toEqual([]);
  });

  it('is hidden from the day they ask for it, once and for good', async () => {
    const giver = bare('hidden@post.example');
    const { id } = await keep(giver);
    for (const isNameWithheld of [true, true, false]) await keep({ ...giver, isNameWithheld });
    expect(await record(id)).toMatchObject({ is_name_withheld: true });
    expect((await writtenOf(id)).filter((one) => one.action === 'supporter-name-withheld')).toEqual([
      {
        action: 'supporter-name-withheld',
        field: 'is_name_withheld',
        before_value: 'false',
        after_value: 'true',
      },
    ]);
  });
});
