// A giver who asked to be known to the treasurer only: no list, CSV, chain, letter or history names them.
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { giftChainSchema, giftListSchema } from '#shared/giving/desk-schemas.ts';
import { pence } from '#shared/money.ts';
import { NAME_WITHHELD } from '#shared/roles.ts';
import { keepCheckRun, runChecks } from '#server/books/index.ts';
import { signIn } from './desk-people.ts';
import { addGift, addMail, type AddedGift } from './desk-rows.ts';
import { openDesk, type Desk } from './desk-app.ts';

let desk: Desk;
beforeAll(async () => {
  desk = await openDesk();
});
afterAll(() => desk.app.stop());

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
      await addGift(desk.db, desk.world, { ...wish, nameShown: 'treasurer-only' }),
      await addGift(desk.db, desk.world, { ...wish, isSupporterWithheld: true }),
    ];
    for (const gift of hidden) {
      await addMail(desk.db, {
        subjectId: gift.id,
        kind: 'dedication-told',
        toName: 'Kin of Hollis',
        address: 'kin@hidden.example',
        at: new Date('2026-05-04T12:00:00Z'),
      });
      await desk.db('payment_events').insert({
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
        await desk.as(role).get('/api/desk/gifts'),
        await desk.as(role).get('/api/desk/gifts.csv'),
        await desk.as(role).get('/api/desk/today'),
        ...(await Promise.all(hidden.map((gift) => desk.as(role).get(`/api/desk/gifts/${gift.number}`)))),
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

  it.each(['chair', 'secretary', 'examiner', 'treasurer'] as const)(
    'is never opened to the %s by an intent’s id or a receipt’s key, nor is any other giver',
    async (role) => {
      const open = await addGift(desk.db, desk.world, { name: 'Open Olive' });
      const stuck: AddedGift[] = [];
      for (const state of ['mismatched', 'started', 'asked', 'confirming', 'paid']) {
        const gift = await addGift(desk.db, desk.world, {
          name: 'Hidden Hollis',
          nameShown: 'treasurer-only',
        });
        await desk
          .db('gift_intents')
          .where({ id: gift.intentId })
          .update({ state, last_fault: `not that of ${gift.intentId}` });
        stuck.push(gift);
      }
      const [nameless, , , , lost] = stuck;
      if (!nameless || !lost) throw new Error('no gift');
      await desk.db('gift_intents').where({ id: nameless.intentId }).update({ session_id: null });
      await desk.db('gift_shares').where({ gift_id: lost.id }).delete();
      await desk.db('gifts').where({ id: lost.id }).delete();
      await desk.db('payment_events').insert({
        id: `evt_refused_${open.id}`,
        type: 'checkout.session.completed',
        object_kind: 'checkout.session',
        object_id: open.sessionId,
        happened_at: new Date(),
        received_at: new Date(),
        payload: '{}',
        state: 'refused',
        fault: `no gift for ${open.intentId}`,
      });
      const results = await runChecks(desk.db);
      expect(results.flatMap((one) => one.faults.map((fault) => fault.id))).toContain(lost.sessionId);
      await desk.db.transaction((trx) => keepCheckRun(trx, results, desk.app.clock.now()));
      const gifts = [...hidden, open, ...stuck];
      const answers = await Promise.all(
        [
          '/api/desk/gifts',
          '/api/desk/gifts.csv',
          '/api/desk/today',
          ...gifts.filter((gift) => gift !== lost).map((gift) => `/api/desk/gifts/${gift.number}`),
        ].map((path) => desk.as(role).get(path).expect(200)),
      );
      const told = answers.map((answer) => answer.text).join('');
      expect(told).toContain('does not agree with what was asked for');
      expect(told).toContain('no gift for …');
      expect(told).toContain('/receipts/…');
      expect(gifts.filter((gift) => told.includes(gift.intentId))).toEqual([]);
      expect(gifts.filter((gift) => told.includes(gift.receiptToken))).toEqual([]);
    },
  );

  it('is named to the treasurer, marked as withheld', async () => {
    const list = giftListSchema.parse((await desk.as('treasurer').get('/api/desk/gifts')).body);
    const rows = list.days
      .flatMap((day) => day.rows)
      .filter((row) => hidden.some((gift) => gift.number === row.number));
    expect(rows.map((row) => [row.giver, row.isWithheld])).toEqual([
      ['Hidden Hollis', true],
      ['Hidden Hollis', true],
    ]);
    const chain = giftChainSchema.parse(
      (await desk.as('treasurer').get(`/api/desk/gifts/${hidden[0]?.number}`)).body,
    );
    expect(chain.giver).toMatchObject({ name: 'Hidden Hollis', email: 'hollis@hidden.example' });
    expect(chain.words.every((one) => one.words !== null && one.mayJudge)).toBe(true);
    expect(chain.mails[0]?.plain).toContain('Dear Hidden Hollis');
  });

  it('a chair who is treasurer too reads the name', async () => {
    const both = await signIn(desk.app, ['chair', 'treasurer'], 'Both');
    const chain = giftChainSchema.parse((await both.get(`/api/desk/gifts/${hidden[0]?.number}`)).body);
    expect(chain.giver.name).toBe('Hidden Hollis');
  });

  it('has words and letters that only the treasurer decides about', async () => {
    const [gift] = hidden;
    if (!gift) throw new Error('no gift');
    const words = await desk.as('chair').post(`/api/desk/gifts/${gift.number}/words/${gift.wordIds[0]}`, {
      verdict: 'passed',
    });
    expect(words.status).toBe(403);
    const letter = await desk
      .as('secretary')
      .post(`/api/desk/mail/${gift.mailId}/settle`, { decision: 'leave' });
    expect(letter.status).toBe(403);
    const untouched = await desk
      .db('mail_outbox')
      .where({ id: gift.mailId })
      .first<{ settled_by: string | null }>('settled_by');
    expect(untouched.settled_by).toBeNull();
    expect(
      (await desk.as('treasurer').post(`/api/desk/mail/${gift.mailId}/settle`, { decision: 'leave' })).status,
    ).toBe(200);
  });

  it('is not named to the family either', async () => {
    const gift = await addGift(desk.db, desk.world, {
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
    await desk
      .as('treasurer')
      .post(`/api/desk/gifts/${gift.number}/words/${gift.wordIds[0]}`, { verdict: 'passed' })
      .expect(200);
    const letter = await desk
      .db('mail_outbox')
      .where({ kind: 'dedication-told', subject_id: gift.id })
      .first<{ plain: string; html: string }>('plain', 'html');
    expect(`${letter.plain}${letter.html}`).not.toMatch(/Hollis|43\.21/);
    expect(letter.plain).toContain('Albert Rudge');
  });
});
