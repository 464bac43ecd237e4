// What a person decides at the desk, once: about words from givers and about letters that failed.
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { giftChainSchema } from '#shared/giving/desk-schemas.ts';
import { pence } from '#shared/money.ts';
import { addGift, addMail } from './desk-rows.ts';
import { openDesk, type Desk } from './desk-app.ts';

let desk: Desk;
beforeAll(async () => {
  desk = await openDesk();
});
afterAll(() => desk.app.stop());

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
    const gift = await addGift(desk.db, desk.world, { words, sumPence: pence(4321) });
    const path = `/api/desk/gifts/${gift.number}/words/${gift.wordIds[0]}`;
    await desk.as('secretary').post(path, { verdict: 'passed' }).expect(200);
    const letters = await desk
      .db('mail_outbox')
      .where({ kind: 'dedication-told', subject_id: gift.id })
      .select<{ to_address: string; plain: string; state: string }[]>('to_address', 'plain', 'state');
    expect(letters).toMatchObject([{ to_address: 'cray@staithe.example', state: 'queued' }]);
    expect(letters[0]?.plain).toContain('£43.21');
    expect(await desk.auditOf(gift.wordIds[0] ?? '')).toMatchObject([
      { action: 'words-passed', actor_id: desk.as('secretary').accountId },
    ]);
    const chain = giftChainSchema.parse(
      (await desk.as('examiner').get(`/api/desk/gifts/${gift.number}`)).body,
    );
    expect(chain.words).toMatchObject([{ verdict: 'passed', readBy: 'The secretary', mayJudge: false }]);
    expect(chain.history[0]?.words).toBe('Words passed by The secretary.');
    expect((await desk.as('chair').post(path, { verdict: 'held' })).status).toBe(409);
  });

  it('held back, nobody is told', async () => {
    const gift = await addGift(desk.db, desk.world, { words });
    await desk
      .as('chair')
      .post(`/api/desk/gifts/${gift.number}/words/${gift.wordIds[0]}`, { verdict: 'held' })
      .expect(200);
    expect(await desk.db('mail_outbox').where({ kind: 'dedication-told', subject_id: gift.id })).toHaveLength(
      0,
    );
  });

  it('without leave the sum is not told', async () => {
    const gift = await addGift(desk.db, desk.world, {
      words: [{ ...words[0], kind: 'honour', words: 'Ada Cray', mayTellSum: false }],
      sumPence: pence(4321),
    });
    await desk
      .as('chair')
      .post(`/api/desk/gifts/${gift.number}/words/${gift.wordIds[0]}`, { verdict: 'passed' })
      .expect(200);
    const letter = await desk
      .db('mail_outbox')
      .where({ kind: 'dedication-told', subject_id: gift.id })
      .first<{ plain: string; html: string }>('plain', 'html');
    expect(`${letter.plain}${letter.html}`).not.toContain('43.21');
    expect(letter.plain).toContain('Judith Hargreaves');
  });

  it('of two verdicts at once, one stands and the other is told so', async () => {
    const gift = await addGift(desk.db, desk.world, { words });
    const path = `/api/desk/gifts/${gift.number}/words/${gift.wordIds[0]}`;
    const answers = await Promise.all([
      desk.as('secretary').post(path, { verdict: 'passed' }),
      desk.as('treasurer').post(path, { verdict: 'passed' }),
    ]);
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409]);
    expect(await desk.auditOf(gift.wordIds[0] ?? '')).toHaveLength(1);
    expect(await desk.db('mail_outbox').where({ kind: 'dedication-told', subject_id: gift.id })).toHaveLength(
      1,
    );
  });

  it('the examiner, another gift’s number, unknown words and half an answer are all refused', async () => {
    const [gift, other] = [await addGift(desk.db, desk.world, { words }), await addGift(desk.db, desk.world)];
    const [wordsId] = gift.wordIds;
    expect(
      (
        await desk
          .as('examiner')
          .post(`/api/desk/gifts/${gift.number}/words/${wordsId}`, { verdict: 'passed' })
      ).status,
    ).toBe(403);
    expect(
      (await desk.as('chair').post(`/api/desk/gifts/${other.number}/words/${wordsId}`, { verdict: 'passed' }))
        .status,
    ).toBe(404);
    expect(
      (await desk.as('chair').post(`/api/desk/gifts/${gift.number}/words/nonsense`, { verdict: 'passed' }))
        .status,
    ).toBe(404);
    expect(
      (
        await desk
          .as('chair')
          .post(`/api/desk/gifts/${gift.number}/words/${wordsId}`, { verdict: 'shredded' })
      ).status,
    ).toBe(400);
    expect(
      (
        await desk.as('chair').post(`/api/desk/gifts/${gift.number}/words/${wordsId}`, {
          verdict: 'held',
          extra: 1,
        })
      ).status,
    ).toBe(400);
    const row = await desk
      .db('public_words')
      .where({ id: wordsId })
      .first<{ read_at: Date | null }>('read_at');
    expect(row.read_at).toBeNull();
  });
});

describe('letters that failed', () => {
  it('are sent again, or left; each leaves a line, and nothing is decided twice', async () => {
    const [one, two] = [
      await addGift(desk.db, desk.world, { thanks: 'uncertain' }),
      await addGift(desk.db, desk.world, { thanks: 'hard_failed' }),
    ];
    await desk
      .as('secretary')
      .post(`/api/desk/mail/${one.mailId}/settle`, { decision: 'send-again' })
      .expect(200);
    await desk.as('secretary').post(`/api/desk/mail/${two.mailId}/settle`, { decision: 'leave' }).expect(200);
    const states = await desk
      .db('mail_outbox')
      .whereIn('id', [one.mailId, two.mailId])
      .orderBy('state')
      .select<{ state: string }[]>('state');
    expect(states.map((row) => row.state)).toEqual(['hard_failed', 'queued']);
    expect(await desk.auditOf(one.mailId ?? '')).toMatchObject([
      { action: 'mail-sent-again', actor_id: desk.as('secretary').accountId },
    ]);
    expect(await desk.auditOf(two.mailId ?? '')).toMatchObject([{ action: 'mail-left' }]);
    expect(
      (await desk.as('chair').post(`/api/desk/mail/${two.mailId}/settle`, { decision: 'send-again' })).status,
    ).toBe(422);
    const chain = giftChainSchema.parse((await desk.as('chair').get(`/api/desk/gifts/${two.number}`)).body);
    expect(chain.mails[0]).toMatchObject({ settledBy: 'The secretary', maySettle: false });
  });

  it('a letter about something else, the examiner and an unknown letter are refused', async () => {
    const gift = await addGift(desk.db, desk.world, { thanks: 'uncertain' });
    expect(
      (await desk.as('examiner').post(`/api/desk/mail/${gift.mailId}/settle`, { decision: 'leave' })).status,
    ).toBe(403);
    const foreign = await addMail(desk.db, {
      subjectId: 'elsewhere',
      subjectKind: 'account',
      kind: 'reset',
      state: 'uncertain',
      at: new Date(),
    });
    expect(
      (await desk.as('chair').post(`/api/desk/mail/${foreign}/settle`, { decision: 'leave' })).status,
    ).toBe(404);
    const row = await desk
      .db('mail_outbox')
      .where({ id: foreign })
      .first<{ settled_by: string | null }>('settled_by');
    expect(row.settled_by).toBeNull();
  });
});
