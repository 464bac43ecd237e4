// The desk's gifts over the API: who may read what, and everything that one gift's chain tells.
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { giftChainSchema } from '#shared/giving/desk-schemas.ts';
import { addGift } from './desk-rows.ts';
import { openDesk, type Desk } from './desk-app.ts';

let desk: Desk;
beforeAll(async () => {
  desk = await openDesk();
});
afterAll(() => desk.app.stop());

describe('who may read gifts', () => {
  it.each(['chair', 'treasurer', 'secretary', 'examiner'] as const)('the %s may', async (role) => {
    const gift = await addGift(desk.db, desk.world);
    expect((await desk.as(role).get('/api/desk/gifts')).status).toBe(200);
    expect((await desk.as(role).get('/api/desk/gifts.csv')).status).toBe(200);
    expect((await desk.as(role).get(`/api/desk/gifts/${gift.number}`)).status).toBe(200);
  });

  it.each(['site', 'schools'] as const)('the %s may not', async (role) => {
    const gift = await addGift(desk.db, desk.world);
    for (const path of ['/api/desk/gifts', '/api/desk/gifts.csv', `/api/desk/gifts/${gift.number}`])
      expect((await desk.as(role).get(path)).status).toBe(403);
  });

  it('a stranger is asked to sign in', async () => {
    for (const path of ['/api/desk/gifts', '/api/desk/gifts.csv', '/api/desk/gifts/1'])
      expect((await desk.app.agent().get(path)).status).toBe(401);
  });

  it('nothing stands where no gift is', async () => {
    for (const place of ['999999999', '0', '-1', '1e3', '99999999999999999999', 'abc'])
      expect((await desk.as('treasurer').get(`/api/desk/gifts/${place}`)).status).toBe(404);
  });

  it('every wrong key of the filter is named', async () => {
    const answer = await desk.as('treasurer').get('/api/desk/gifts?sort=name&from=2026-13-01&thanks=no');
    expect(answer.status).toBe(400);
    expect(Object.keys((answer.body as { fields: object }).fields).sort()).toEqual([
      'from',
      'sort',
      'thanks',
    ]);
  });
});

describe('one gift’s chain', () => {
  it('tells every step in words and in order, failed tries included', async () => {
    const at = (minute: number) => new Date(Date.UTC(2026, 4, 4, 11, minute));
    const gift = await addGift(desk.db, desk.world, {
      at: at(5),
      isDeclared: true,
      part: 'lantern',
      words: [{ kind: 'message', words: 'Well done' }],
    });
    await desk
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
    await desk.db('payment_events').insert([
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
    const chain = giftChainSchema.parse(
      (await desk.as('examiner').get(`/api/desk/gifts/${gift.number}`)).body,
    );
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
      /recorded[\s\S]*posted in the books, dated 4 May 2026[\s\S]*wrote (?:a|wall)[\s\S]*thank-you to Judith Hargreaves was written[\s\S]*thank-you was sent/,
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
