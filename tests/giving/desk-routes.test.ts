// The desk's gifts over the API: who may read what, names withheld everywhere, harmless CSV, verdicts given once.
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { giftChainSchema, giftListSchema } from '#shared/giving/desk-schemas.ts';
import { pence } from '#shared/money.ts';
import { NAME_WITHHELD, ROLES, type Role } from '#shared/roles.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';
import { signIn, type Present } from './desk-people.ts';
import { addGift, addMail, addWorld, type AddedGift, type World } from './desk-rows.ts';

let app: TestApp;
let world: World;
const people = new Map<Role, Present>();
const as = (role: Role): Present => {
  const person = people.get(role);
  if (!person) throw new Error(`nobody is ${role}`);
  return person;
};

beforeAll(async () => {
  app = await startTestApp();
  world = await addWorld(app.deps.db);
  for (const role of ROLES) people.set(role, await signIn(app, [role], `The ${role}`));
});
afterAll(() => app.stop());

const auditOf = (objectId: string) =>
  app.deps
    .db('audit.lines')
    .where({ object_id: objectId })
    .orderBy('id')
    .select<{ action: string; actor_id: string; detail: object }[]>('action', 'actor_id', 'detail');

describe('who may read gifts', () => {
  it.each(['chair', 'treasurer', 'secretary', 'examiner'] as const)('the %s may', async (role) => {
    const gift = await addGift(app.deps.db, world);
    expect((await as(role).get('/api/desk/gifts')).status).toBe(200);
    expect((await as(role).get('/api/desk/gifts.csv')).status).toBe(200);
    expect((await as(role).get(`/api/desk/gifts/${gift.number}`)).status).toBe(200);
  });

  it.each(['site', 'schools'] as const)('the %s may not', async (role) => {
    const gift = await addGift(app.deps.db, world);
    for (const path of ['/api/desk/gifts', '/api/desk/gifts.csv', `/api/desk/gifts/${gift.number}`])
      expect((await as(role).get(path)).status).toBe(403);
  });

  it('a stranger is asked to sign in', async () => {
    for (const path of ['/api/desk/gifts', '/api/desk/gifts.csv', '/api/desk/gifts/1'])
      expect((await app.agent().get(path)).status).toBe(401);
  });

  it('nothing stands where no gift is', async () => {
    for (const place of ['999999999', '0', '-1', '1e3', '99999999999999999999', 'abc'])
      expect((await as('treasurer').get(`/api/desk/gifts/${place}`)).status).toBe(404);
  });

  it('every wrong key of the filter is named', async () => {
    const answer = await as('treasurer').get('/api/desk/gifts?sort=name&from=2026-13-01&thanks=no');
    expect(answer.status).toBe(400);
    expect(Object.keys((answer.body as { fields: object }).fields).sort()).toEqual([
      'from',
      'sort',
      'thanks',
    ]);
  });
});

const SECRETS = [
  'Hidden Hollis',
  'hollis@hidden.example',
  'Sluice Row',
  '01632 960417',
  'love from Hollis',
  'Aunt Hollis',
  'kin@hidden.example',
  'Kin of Hollis',
];

describe('a giver known to the treasurer only', () => {
  let hidden: AddedGift[];
  beforeAll(async () => {
    const wish = {
      name: 'Hidden Hollis',
      email: 'hollis@hidden.example',
      isDeclared: true,
      thanks: 'uncertain',
      words: [
        { kind: 'message' as const, words: 'love from Hollis' },
        {
          kind: 'memory' as const,
          words: 'Aunt Hollis',
          contactName: 'Kin of Hollis',
          contactEmail: 'kin@hidden.example',
        },
      ],
    };
    hidden = [
      await addGift(app.deps.db, world, { ...wish, nameShown: 'treasurer-only' }),
      await addGift(app.deps.db, world, { ...wish, isSupporterWithheld: true }),
    ];
    for (const gift of hidden) {
      await addMail(app.deps.db, {
        subjectId: gift.id,
        kind: 'dedication-told',
        toName: 'Kin of Hollis',
        address: 'kin@hidden.example',
        at: new Date('2026-05-04T12:00:00Z'),
      });
      await app.deps.db('payment_events').insert({
        id: `evt_${gift.id}`,
        type: 'checkout.session.completed',
        object_kind: 'checkout.session',
        object_id: gift.sessionId,
        happened_at: new Date(),
        received_at: new Date(),
        payload: JSON.stringify({
          data: { object: { customer_details: { name: 'Hidden Hollis', email: 'hollis@hidden.example' } } },
        }),
        state: 'worked',
      });
    }
  });

  it.each(['chair', 'secretary', 'examiner'] as const)(
    'is “name withheld” to the %s everywhere',
    async (role) => {
      const answers = [
        await as(role).get('/api/desk/gifts'),
        await as(role).get('/api/desk/gifts.csv'),
        await as(role).get('/api/desk/today'),
        ...(await Promise.all(hidden.map((gift) => as(role).get(`/api/desk/gifts/${gift.number}`)))),
      ];
      for (const answer of answers) {
        expect(answer.status).toBe(200);
        expect(SECRETS.filter((secret) => answer.text.includes(secret) && secret !== 'Sluice Row')).toEqual(
          [],
        );
      }
      for (const answer of answers.slice(3)) {
        expect(answer.text).not.toContain('Sluice Row');
        const chain = giftChainSchema.parse(answer.body);
        expect(chain).toMatchObject({
          isWithheld: true,
          giver: {
            name: NAME_WITHHELD,
            number: null,
            greeting: null,
            email: null,
            phone: null,
            address: null,
          },
        });
        expect(chain.declaration).toMatchObject({ name: NAME_WITHHELD, address: null });
        expect(
          chain.mails.map((mail) => [mail.toName, mail.toAddress, mail.subject, mail.plain, mail.answer]),
        ).toEqual([
          [NAME_WITHHELD, null, null, null, null],
          [NAME_WITHHELD, null, null, null, null],
        ]);
        expect(
          chain.words.map((one) => [one.words, one.contactName, one.contactEmail, one.mayJudge]),
        ).toEqual([
          [null, null, null, false],
          [null, null, null, false],
        ]);
        expect(chain.mails.some((mail) => mail.maySettle)).toBe(false);
      }
    },
  );

  it('is named to the treasurer, marked as withheld', async () => {
    const list = giftListSchema.parse((await as('treasurer').get('/api/desk/gifts')).body);
    const rows = list.days
      .flatMap((day) => day.rows)
      .filter((row) => hidden.some((gift) => gift.number === row.number));
    expect(rows.map((row) => [row.giver, row.isWithheld])).toEqual([
      ['Hidden Hollis', true],
      ['Hidden Hollis', true],
    ]);
    const chain = giftChainSchema.parse(
      (await as('treasurer').get(`/api/desk/gifts/${hidden[0]?.number}`)).body,
    );
    expect(chain.giver).toMatchObject({ name: 'Hidden Hollis', email: 'hollis@hidden.example' });
    expect(chain.words.every((one) => one.words !== null && one.mayJudge)).toBe(true);
    expect(chain.mails[0]?.plain).toContain('Dear Hidden Hollis');
  });

  it('a chair who is treasurer too reads the name', async () => {
    const both = await signIn(app, ['chair', 'treasurer'], 'Both');
    const chain = giftChainSchema.parse((await both.get(`/api/desk/gifts/${hidden[0]?.number}`)).body);
    expect(chain.giver.name).toBe('Hidden Hollis');
  });

  it('has words and letters that only the treasurer decides about', async () => {
    const [gift] = hidden;
    if (!gift) throw new Error('no gift');
    const words = await as('chair').post(`/api/desk/gifts/${gift.number}/words/${gift.wordIds[0]}`, {
      verdict: 'passed',
    });
    expect(words.status).toBe(403);
    const letter = await as('secretary').post(`/api/desk/mail/${gift.mailId}/settle`, { decision: 'leave' });
    expect(letter.status).toBe(403);
    const untouched = await app.deps
      .db('mail_outbox')
      .where({ id: gift.mailId })
      .first<{ settled_by: string | null }>('settled_by');
    expect(untouched.settled_by).toBeNull();
    expect(
      (await as('treasurer').post(`/api/desk/mail/${gift.mailId}/settle`, { decision: 'leave' })).status,
    ).toBe(200);
  });

  it('is not named to the family either', async () => {
    const gift = await addGift(app.deps.db, world, {
      name: 'Hidden Hollis',
      nameShown: 'treasurer-only',
      sumPence: pence(4321),
      words: [
        {
          kind: 'memory',
          words: 'Albert Rudge',
          contactName: 'Mrs Rudge',
          contactEmail: 'rudge@staithe.example',
        },
      ],
    });
    await as('treasurer')
      .post(`/api/desk/gifts/${gift.number}/words/${gift.wordIds[0]}`, { verdict: 'passed' })
      .expect(200);
    const letter = await app.deps
      .db('mail_outbox')
      .where({ kind: 'dedication-told', subject_id: gift.id })
      .first<{ plain: string; html: string }>('plain', 'html');
    expect(`${letter.plain}${letter.html}`).not.toMatch(/Hollis|43\.21/);
    expect(letter.plain).toContain('Albert Rudge');
  });
});

describe('the CSV', () => {
  it('has no cell that a spreadsheet would run, whatever a giver calls themselves', async () => {
    const names = [
      "=cmd|' /C calc'!A0",
      '+1+1',
      '-2+3',
      '@SUM(A1)',
      '\tTab',
      '\rReturn',
      '＝1+1',
      'Comma, "quote"',
      'Two\nlines',
      'Łódź Żółć',
    ];
    for (const name of names)
      await addGift(app.deps.db, world, { name, part: 'lantern', at: new Date('2026-02-01T10:00:00Z') });
    const answer = await as('treasurer').get('/api/desk/gifts.csv?from=2026-02-01&to=2026-02-01&sort=oldest');
    expect(answer.headers['content-type']).toBe('text/csv; charset=utf-8');
    expect(answer.headers['content-disposition']).toMatch(
      /^attachment; filename="gifts-\d{4}-\d\d-\d\d\.csv"$/,
    );
    expect(answer.text.startsWith('\ufeff"No."')).toBe(true);
    expect(answer.text.endsWith('\r\n')).toBe(true);
    const cells = [...answer.text.matchAll(/"((?:[^"]|"")*)"/g)].map(([, cell = '']) =>
      cell.replaceAll('""', '"'),
    );
    expect(cells.filter((cell) => /^[=+\-@\t\r\n\0＝＋－＠]/.test(cell))).toEqual([]);
    expect(cells).toEqual(
      expect.arrayContaining([
        "'=cmd|' /C calc'!A0",
        'Comma, "quote"',
        'Two\nlines',
        'Łódź Żółć',
        '2026-02-01',
        '20.00',
      ]),
    );
    expect(cells).toHaveLength((names.length + 1) * 11);
  });

  it('holds every gift of the filter, not only a page, and leaves an audit line', async () => {
    const at = new Date('2026-01-15T10:00:00Z');
    for (let batch = 0; batch < 6; batch += 1)
      await Promise.all(Array.from({ length: 100 }, () => addGift(app.deps.db, world, { at, thanks: null })));
    const answer = await as('examiner').get('/api/desk/gifts.csv?from=2026-01-15&to=2026-01-15');
    const lines = answer.text.trim().split('\r\n');
    expect(lines).toHaveLength(601);
    expect(new Set(lines).size).toBe(601);
    const [line] = await app.deps
      .db('audit.lines')
      .where({ action: 'gifts-exported', actor_id: as('examiner').accountId })
      .orderBy('id', 'desc')
      .select<{ object_id: string }[]>('object_id');
    expect(line?.object_id).toContain('from=2026-01-15');
  }, 60_000);
});

describe('words from givers', () => {
  const words = [
    {
      kind: 'honour' as const,
      words: 'Ada Cray',
      contactName: 'Cray family',
      contactEmail: 'cray@staithe.example',
      mayTellSum: true,
    },
  ];

  it('once passed, the family is told once, with the sum because the giver said so, and a line is left', async () => {
    const gift = await addGift(app.deps.db, world, { words, sumPence: pence(4321) });
    const path = `/api/desk/gifts/${gift.number}/words/${gift.wordIds[0]}`;
    await as('secretary').post(path, { verdict: 'passed' }).expect(200);
    const letters = await app.deps
      .db('mail_outbox')
      .where({ kind: 'dedication-told', subject_id: gift.id })
      .select<{ to_address: string; plain: string; state: string }[]>('to_address', 'plain', 'state');
    expect(letters).toMatchObject([{ to_address: 'cray@staithe.example', state: 'queued' }]);
    expect(letters[0]?.plain).toContain('£43.21');
    expect(await auditOf(gift.wordIds[0] ?? '')).toMatchObject([
      { action: 'words-passed', actor_id: as('secretary').accountId },
    ]);
    const chain = giftChainSchema.parse((await as('examiner').get(`/api/desk/gifts/${gift.number}`)).body);
    expect(chain.words).toMatchObject([{ verdict: 'passed', readBy: 'The secretary', mayJudge: false }]);
    expect(chain.history[0]?.words).toBe('Words passed by The secretary.');
    expect((await as('chair').post(path, { verdict: 'held' })).status).toBe(409);
  });

  it('held back, nobody is told', async () => {
    const gift = await addGift(app.deps.db, world, { words });
    await as('chair')
      .post(`/api/desk/gifts/${gift.number}/words/${gift.wordIds[0]}`, { verdict: 'held' })
      .expect(200);
    expect(
      await app.deps.db('mail_outbox').where({ kind: 'dedication-told', subject_id: gift.id }),
    ).toHaveLength(0);
  });

  it('without leave the sum is not told', async () => {
    const gift = await addGift(app.deps.db, world, {
      words: [{ ...words[0], kind: 'honour', words: 'Ada Cray', mayTellSum: false }],
      sumPence: pence(4321),
    });
    await as('chair')
      .post(`/api/desk/gifts/${gift.number}/words/${gift.wordIds[0]}`, { verdict: 'passed' })
      .expect(200);
    const letter = await app.deps
      .db('mail_outbox')
      .where({ kind: 'dedication-told', subject_id: gift.id })
      .first<{ plain: string; html: string }>('plain', 'html');
    expect(`${letter.plain}${letter.html}`).not.toContain('43.21');
    expect(letter.plain).toContain('Judith Hargreaves');
  });

  it('of two verdicts at once, one stands and the other is told so', async () => {
    const gift = await addGift(app.deps.db, world, { words });
    const path = `/api/desk/gifts/${gift.number}/words/${gift.wordIds[0]}`;
    const answers = await Promise.all([
      as('secretary').post(path, { verdict: 'passed' }),
      as('treasurer').post(path, { verdict: 'passed' }),
    ]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
    expect(await auditOf(gift.wordIds[0] ?? '')).toHaveLength(1);
    expect(
      await app.deps.db('mail_outbox').where({ kind: 'dedication-told', subject_id: gift.id }),
    ).toHaveLength(1);
  });

  it('the examiner, another gift’s number, unknown words and half an answer are all refused', async () => {
    const [gift, other] = [await addGift(app.deps.db, world, { words }), await addGift(app.deps.db, world)];
    const [wordsId] = gift.wordIds;
    expect(
      (await as('examiner').post(`/api/desk/gifts/${gift.number}/words/${wordsId}`, { verdict: 'passed' }))
        .status,
    ).toBe(403);
    expect(
      (await as('chair').post(`/api/desk/gifts/${other.number}/words/${wordsId}`, { verdict: 'passed' }))
        .status,
    ).toBe(404);
    expect(
      (await as('chair').post(`/api/desk/gifts/${gift.number}/words/nonsense`, { verdict: 'passed' })).status,
    ).toBe(404);
    expect(
      (await as('chair').post(`/api/desk/gifts/${gift.number}/words/${wordsId}`, { verdict: 'shredded' }))
        .status,
    ).toBe(400);
    expect(
      (
        await as('chair').post(`/api/desk/gifts/${gift.number}/words/${wordsId}`, {
          verdict: 'held',
          extra: 1,
        })
      ).status,
    ).toBe(400);
    const row = await app.deps
      .db('public_words')
      .where({ id: wordsId })
      .first<{ read_at: Date | null }>('read_at');
    expect(row.read_at).toBeNull();
  });
});

describe('letters that failed', () => {
  it('are sent again, or left; each leaves a line, and nothing is decided twice', async () => {
    const [one, two] = [
      await addGift(app.deps.db, world, { thanks: 'uncertain' }),
      await addGift(app.deps.db, world, { thanks: 'hard_failed' }),
    ];
    await as('secretary').post(`/api/desk/mail/${one.mailId}/settle`, { decision: 'send-again' }).expect(200);
    await as('secretary').post(`/api/desk/mail/${two.mailId}/settle`, { decision: 'leave' }).expect(200);
    const states = await app.deps
      .db('mail_outbox')
      .whereIn('id', [one.mailId, two.mailId])
      .orderBy('state')
      .select<{ state: string }[]>('state');
    expect(states.map((row) => row.state)).toEqual(['hard_failed', 'queued']);
    expect(await auditOf(one.mailId ?? '')).toMatchObject([
      { action: 'mail-sent-again', actor_id: as('secretary').accountId },
    ]);
    expect(await auditOf(two.mailId ?? '')).toMatchObject([{ action: 'mail-left' }]);
    expect(
      (await as('chair').post(`/api/desk/mail/${two.mailId}/settle`, { decision: 'send-again' })).status,
    ).toBe(422);
    const chain = giftChainSchema.parse((await as('chair').get(`/api/desk/gifts/${two.number}`)).body);
    expect(chain.mails[0]).toMatchObject({ settledBy: 'The secretary', maySettle: false });
  });

  it('a letter about something else, the examiner and an unknown letter are refused', async () => {
    const gift = await addGift(app.deps.db, world, { thanks: 'uncertain' });
    expect(
      (await as('examiner').post(`/api/desk/mail/${gift.mailId}/settle`, { decision: 'leave' })).status,
    ).toBe(403);
    const foreign = await addMail(app.deps.db, {
      subjectId: 'elsewhere',
      subjectKind: 'account',
      kind: 'reset',
      state: 'uncertain',
      at: new Date(),
    });
    expect((await as('chair').post(`/api/desk/mail/${foreign}/settle`, { decision: 'leave' })).status).toBe(
      404,
    );
    const row = await app.deps
      .db('mail_outbox')
      .where({ id: foreign })
      .first<{ settled_by: string | null }>('settled_by');
    expect(row.settled_by).toBeNull();
  });
});

describe('one gift’s chain', () => {
  it('tells every step in words and in order, failed tries included', async () => {
    const at = (minute: number) => new Date(Date.UTC(2026, 4, 4, 11, minute));
    const gift = await addGift(app.deps.db, world, {
      at: at(5),
      isDeclared: true,
      part: 'lantern',
      words: [{ kind: 'message', words: 'Well done' }],
    });
    await app.deps
      .db('gift_intents')
      .where({ id: gift.intentId })
      .update({ created_at: at(0) });
    const event = (id: string, type: string, object: object, minute: number) => ({
      id: `evt_${id}_${gift.number}`,
      type,
      object_kind: 'x',
      object_id: 'id' in object && typeof object.id === 'string' ? object.id : 'none',
      happened_at: at(minute),
      received_at: at(minute),
      payload: JSON.stringify({ data: { object } }),
      state: 'worked',
    });
    await app.deps.db('payment_events').insert([
      event('c', 'checkout.session.completed', { id: gift.sessionId, client_reference_id: gift.intentId }, 4),
      event(
        'a',
        'payment_intent.payment_failed',
        {
          id: gift.paymentIntentId,
          last_payment_error: { code: 'card_declined', decline_code: 'insufficient_funds' },
        },
        1,
      ),
      event(
        'b',
        'charge.failed',
        { id: 'ch_other', payment_intent: gift.paymentIntentId, failure_code: 'card_declined' },
        2,
      ),
      event('z', 'charge.succeeded', { id: 'ch_strange', payment_intent: 'pi_of_somebody_else' }, 3),
    ]);
    const chain = giftChainSchema.parse((await as('examiner').get(`/api/desk/gifts/${gift.number}`)).body);
    const told = chain.steps.map((step) => step.words);
    expect(told.slice(0, 4)).toEqual([
      'The giver read appeal wording 2 and asked to give £20 for Lantern.',
      'A try failed. The bank said: insufficient funds.',
      'The bank refused the card. The bank said: card declined.',
      'The card page was finished.',
    ]);
    expect(chain.steps.filter((step) => step.isFault)).toHaveLength(2);
    expect([...chain.steps].sort((a, b) => a.at.localeCompare(b.at))).toEqual(chain.steps);
    expect(told.join('\n')).toMatch(
      /recorded[\s\S]*posted in the books, dated 4 May 2026[\s\S]*wrote words[\s\S]*thank-you to Judith Hargreaves was written[\s\S]*thank-you was sent/,
    );
    expect(JSON.stringify(chain)).not.toContain('ch_strange');
    expect(chain.appeal).toEqual({
      version: 2,
      purpose: 'To raise her',
      onShortfall: 'We build lower',
      onSurplus: 'We keep her',
      partChoice: 'wish',
    });
    expect(chain.declaration).toMatchObject({
      version: 3,
      name: 'Judith Hargreaves',
      address: '14 Sluice Row, Brackenhythe, BK4 7HY',
    });
    expect(chain.consents.map((one) => [one.channel, one.isGiven])).toEqual([
      ['email', true],
      ['post', false],
      ['phone', false],
    ]);
    expect(chain.entries).toMatchObject([
      {
        kind: 'received',
        lines: [
          { account: 'Card service, not yet available', fund: 'The figure', amountPence: 2000 },
          { account: 'Gifts by card', amountPence: -2000 },
        ],
      },
    ]);
    expect(chain.giftAidPence).toBe(500);
  });
});
