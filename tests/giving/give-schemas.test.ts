// The rules of the sheet, the same in the browser and on the server.
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fieldFaults, type FieldFaults } from '#shared/errors.ts';
import {
  chosenSum,
  GIVE_FIELDS,
  giveRequestSchema,
  keptAnswers,
  type GiveForm,
} from '#shared/giving/give-schemas.ts';
import { emailFault, isWholeName, tidyPostcode } from '#shared/giving/text-rules.ts';
import { LEAST_CARD_PENCE, pence } from '#shared/money.ts';

const BOUNDS = { leastPence: LEAST_CARD_PENCE };
const PERSON = { name: 'Thea Quillan', email: 'thea.quillan@post.example' };
const HOME = { address1: '9 Ropewalk', town: 'Brackenhythe', postcode: 'BK4 7HY' };

function faultsOf(form: GiveForm): FieldFaults {
  const judged = giveRequestSchema(BOUNDS).safeParse(form);
  return judged.success ? {} : fieldFaults(judged.error);
}
const faultyFields = (form: GiveForm) => Object.keys(faultsOf({ ...PERSON, ...form })).sort();

test('a name and an address for mail are enough; everything else is off or the usual', () => {
  const form = giveRequestSchema(BOUNDS).parse(PERSON);
  expect(form).toMatchObject({ amount: '20', towards: 'whole', dedication: 'none', wall: 'not-public' });
  expect([form.declare, form.byEmail, form.byPost, form.byPhone, form.contactSum]).toEqual(Array(5).fill(''));
});

test('an empty sheet names both missing answers at once', () => {
  expect(Object.keys(faultsOf({}))).toEqual(['name', 'email']);
});

test('a field that is not asked for is refused by name', () => {
  const judged = giveRequestSchema(BOUNDS).safeParse({ ...PERSON, role: 'chair' });
  expect(judged.error && fieldFaults(judged.error)).toHaveProperty('role');
});

describe('the sum', () => {
  const ask = (amount: GiveForm['amount'], other = '') => faultsOf({ ...PERSON, amount, other });

  test('runs from the least to the most that a card can pay', () => {
    expect(ask('other', '0.30')).toEqual({});
    expect(ask('other', '99,999.99')).toEqual({});
    expect(ask('other', '0.29').other).toContain('The least we can take by card is £0.30');
    expect(ask('other', '0').other).toContain('The least');
    expect(ask('other', '100000').other).toContain('The most we can take by card is £99,999.99');
  });

  test('the least is the society’s to set', () => {
    expect(chosenSum({ amount: '5', other: '' }, { leastPence: pence(1000) })).toHaveProperty('fault');
  });

  test('that can be read two ways is asked about in both readings', () => {
    expect(ask('other', '25,00').other).toBe('Do you mean £25 or £2,500? Write it like 25.00 or 2500.00.');
  });

  test('empty or unreadable is asked for in words', () => {
    expect(ask('other').other).toContain('Write how much');
    expect(ask('other', 'some').other).toContain('We cannot read this as a sum');
  });

  test('chosen and another one written as well is asked about, the same one twice is not', () => {
    expect(ask('20', '35').other).toContain('You chose £20 and also wrote “35”');
    expect(ask('20', 'some').other).toContain('You chose £20');
    expect(ask('20', '£20.00')).toEqual({});
  });

  test('is exactly what was written, for every sum that can be paid', () => {
    fc.assert(
      fc.property(fc.integer({ min: 30, max: 9_999_999 }), (value) => {
        const chosen = chosenSum({ amount: 'other', other: (value / 100).toFixed(2) }, BOUNDS);
        expect(chosen).toEqual({ pence: value });
      }),
    );
  });
});

describe('an address for mail', () => {
  test.each([
    'thea@post.example',
    "o'hara+lamp@mail.post.example",
    'zoë@bücher.example',
    `${'a'.repeat(64)}@post.example`,
  ])('%s is fine', (address) => {
    expect(emailFault(address)).toBeNull();
  });

  test.each([
    'thea.post.example',
    'a@b.org, c@d.org',
    'a@b.org,c@d.org',
    'a@b.org;c@d.org',
    'a@b.org c@d.org',
    'Thea <thea@post.example>',
    '"a@b"@post.example',
    'a@b@post.example',
    'a@post.example\r\nRCPT TO:<evil@post.example>',
    'a@post.example\u0000',
    'a@post\u202e.example',
    'a\u200d@post.example',
    'a@localhost',
    'a@.example',
    'a@post..example',
    'a@post.example.',
    '@post.example',
    'a@',
    `${'a'.repeat(250)}@b.example`,
  ])('%j is refused', (address) => {
    expect(emailFault(address)).not.toBeNull();
  });

  test('that is let through never holds what a mail program reads as more than one address', () => {
    fc.assert(
      fc.property(
        fc.string({ unit: fc.constantFrom(...'ab@.,;:<>()[]"\\ \n\r\u0000é'.split('')) }),
        (text) => {
          // eslint-disable-next-line no-control-regex -- the NUL is what is looked for
          if (emailFault(text) === null) expect(text).not.toMatch(/[\s,;:<>()[\]"\\\u0000]|@.*@/);
        },
      ),
    );
  });

  test('sheds the invisible signs that come with pasting', () => {
    const form = giveRequestSchema(BOUNDS).parse({ ...PERSON, email: ' thea@post.example\u200b ' });
    expect(form.email).toBe('thea@post.example');
  });
});

test.each([
  ['bk47hy', 'BK4 7HY'],
  [' BK4  7HY. ', 'BK4 7HY'],
  ['bk4-7hy', 'BK4 7HY'],
  ['ＢＫ４７ＨＹ', 'BK4 7HY'],
  ['w1a 0ax', 'W1A 0AX'],
  ['W1A OAX', 'W1A 0AX'],
  ['EC1A 1BB', 'EC1A 1BB'],
  ['BK4', null],
  ['4BK 7HY', null],
  ['BK4 7H', null],
  ['75001', null],
])('the postcode %s is read as %s', (text, postcode) => {
  expect(tidyPostcode(text)).toBe(postcode);
});

describe('a declaration', () => {
  const declared = { ...PERSON, ...HOME, declare: 'on' } as const;

  test('is complete with a whole name and the home address', () => {
    expect(faultsOf(declared)).toEqual({});
  });

  test('asks for each missing line of the address', () => {
    expect(faultyFields({ declare: 'on' })).toEqual(['address1', 'postcode', 'town']);
    expect(faultsOf({ ...declared, postcode: '' }).postcode).toContain('The tax office refuses');
  });

  test.each(['Quillan', 'Mrs Quillan', 'Dr. Quillan'])('%s is not a whole name', (name) => {
    expect(isWholeName(name)).toBe(false);
    expect(faultsOf({ ...declared, name })).toHaveProperty('name');
  });
  test.each(['T Quillan', 'T. Quillan', 'T.Quillan', 'Mrs T Quillan', '李 小龙', 'Łucja Żółć'])(
    '%s is a whole name',
    (name) => {
      expect(faultsOf({ ...declared, name })).toEqual({});
    },
  );

  test.each(['PO Box 12', 'P.O. Box 7', 'c/o Brackenhythe Mill', 'Care of the Mill'])(
    '%s is no home address',
    (address1) => {
      expect(faultsOf({ ...declared, address1 })).toHaveProperty('address1');
    },
  );

  test('from abroad needs no postcode, and a foreign one is taken as it is', () => {
    expect(faultsOf({ ...declared, country: 'other', postcode: '' })).toEqual({});
    expect(faultsOf({ ...declared, country: 'other', postcode: '75001' })).toEqual({});
    expect(faultsOf({ ...declared, postcode: '75001' })).toHaveProperty('postcode');
  });
});

test('letters by post need the address, calls need a number', () => {
  expect(faultyFields({ byPost: 'on' })).toEqual(['address1', 'postcode', 'town']);
  expect(faultyFields({ byPhone: 'on' })).toEqual(['phone']);
  expect(faultyFields({ byPhone: 'on', phone: '01632 960 123' })).toEqual([]);
  expect(faultyFields({ byPhone: 'on', phone: 'ask my son' })).toEqual(['phone']);
});

describe('a dedication', () => {
  test('needs the name, and a family contact whole or not at all', () => {
    expect(faultyFields({ dedication: 'memory' })).toEqual(['dedicationName']);
    const named = { dedication: 'memory', dedicationName: 'Walter Quillan' } as const;
    expect(faultyFields(named)).toEqual([]);
    expect(faultyFields({ ...named, contactName: 'Ann' })).toEqual(['contactEmail']);
    expect(faultyFields({ ...named, contactEmail: 'ann@post.example' })).toEqual(['contactName']);
    expect(faultyFields({ ...named, contactName: 'Ann', contactEmail: 'ann' })).toEqual(['contactEmail']);
  });

  test('that was given up asks for nothing more', () => {
    expect(faultyFields({ dedication: 'none', contactEmail: 'half an addr' })).toEqual([]);
  });
});

describe('words on the wall', () => {
  const onWall = (wallWords: string) => faultsOf({ ...PERSON, wall: 'wall', wallWords }).wallWords;

  test('are counted as a reader counts letters', () => {
    expect(onWall('x'.repeat(40))).toBeUndefined();
    expect(onWall('x'.repeat(41))).toBe('These are 41 letters. The wall has room for 40.');
    expect(onWall('e\u0301'.repeat(40))).toBeUndefined();
    expect(onWall('')).toContain('leave your name off');
  });

  test('left from an earlier choice are not judged', () => {
    expect(faultyFields({ wall: 'not-public', wallWords: 'x'.repeat(60) })).toEqual([]);
  });
});

test('a line holds no line break or hidden turn of direction, a message may have lines', () => {
  expect(faultyFields({ greeting: 'Mrs\nQuillan' })).toEqual(['greeting']);
  expect(faultyFields({ address2: 'a\u202eb' })).toEqual(['address2']);
  expect(faultyFields({ message: 'Well done.\r\nGo on!\tThea' })).toEqual([]);
  expect(faultyFields({ message: 'a\u202eb' })).toEqual(['message']);
});

describe('what is kept of a sheet', () => {
  test('is every field as it was typed, however wrong', () => {
    const typed = { email: 'no at sign', message: 'x'.repeat(700), amount: '7', wall: '' };
    expect(keptAnswers(typed)).toEqual({ email: 'no at sign', message: 'x'.repeat(700), amount: '7' });
  });

  test('is never more than the sheet asks for, and always something a database can hold', () => {
    fc.assert(
      fc.property(fc.dictionary(fc.constantFrom<string>(...GIVE_FIELDS, 'role'), fc.anything()), (sent) => {
        const kept = keptAnswers(sent);
        expect(kept).not.toHaveProperty('role');
        for (const value of Object.values(kept)) expect(value).not.toMatch(/\0|\p{Surrogate}/u);
      }),
    );
    expect(keptAnswers({ name: 'a\u0000b\ud800c' })).toEqual({ name: 'abc' });
    expect(keptAnswers(null)).toEqual({});
    expect(keptAnswers(['a'])).toEqual({});
  });
});
