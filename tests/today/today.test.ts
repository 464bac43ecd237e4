// Today: what is owed to whom, soonest first, each role its own view.
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { todaySchema, type OwedRow } from '#shared/today/today-schemas.ts';
import type { Role } from '#shared/roles.ts';
import { listOwed } from '#server/today/index.ts';
import { startTestApp, type TestApp } from '#tests/support/app.ts';
import { signIn } from '#tests/giving/desk-people.ts';
import { addGift, addMail, addWorld, type World } from '#tests/giving/desk-rows.ts';

const NOW = new Date('2027-05-04T10:00:00Z');
const ago = (hours: number): Date => new Date(NOW.getTime() - hours * 3_600_000);
let app: TestApp;
let world: World;
const owed = (...roles: Role[]): Promise<OwedRow[]> => listOwed(app.deps.db, { roles }, NOW);

beforeAll(async () => {
  app = await startTestApp();
  world = await addWorld(app.deps.db);
});
afterAll(() => app.stop());
beforeEach(async () => {
  const tables = [
    'mail_outbox',
    'public_words',
    'gift_shares',
    'gifts',
    'gift_intents',
    'payment_events',
    'check_runs',
  ];
  for (const table of tables) await app.deps.db(table).delete();
  await runEveryCheck(new Date(NOW.getTime() - 1));
});

/** As the worker does each night; they found nothing. */
const runEveryCheck = (at: Date) =>
  app.deps.db.raw(
    `insert into check_runs (ran_at, name, faults) select ?, viewname, 0 from pg_views where schemaname = 'checks'`,
    [at],
  );

const addEvent = (id: string, state: string, receivedAt: Date, fault: string | null = null) =>
  app.deps.db('payment_events').insert({
    id,
    type: 'charge.updated',
    object_kind: 'charge',
    object_id: 'ch_1',
    happened_at: receivedAt,
    received_at: receivedAt,
    payload: '{}',
    state,
    fault,
  });

/** @returns the id by which the desk may name it; the intent's own when it has no card page. */
const addIntent = async (state: string, createdAt: Date, expiresAt: Date | null = null): Promise<string> => {
  const id = randomUUID();
  const sessionId = state === 'started' ? null : `cs_of_${createdAt.getTime()}`;
  await app.deps.db('gift_intents').insert({
    id,
    amount_pence: 2000,
    appeal_wording_id: world.appealId,
    consent_wording_id: world.consentWordingId,
    answers: '{}',
    state,
    session_id: sessionId,
    session_expires_at: expiresAt,
    created_at: createdAt,
    last_fault: state === 'mismatched' ? 'paid 1900 gbp, asked 2000 gbp' : null,
  });
  return sessionId ?? id;
};

describe('words nobody has read', () => {
  it('can be passed from the row; after three days they are late', async () => {
    const fresh = await addGift(app.deps.db, world, {
      at: ago(3),
      words: [
        {
          kind: 'memory',
          words: 'Albert Rudge',
          contactEmail: 'r@staithe.example',
          contactName: 'Mrs Rudge',
        },
      ],
    });
    await addGift(app.deps.db, world, { at: ago(24 * 5), words: [{ kind: 'message', words: 'Well done' }] });
    const rows = await owed('secretary');
    expect(rows.map((row) => [row.due, row.dueDay, row.waitedDays, row.waited])).toEqual([
      ['late', '2027-05-02', 5, '5 days'],
      ['today', '2027-05-04', 0, 'since 8am'],
    ]);
    expect(rows[1]).toMatchObject({
      what: `To read, the dedication of gift ${fresh.number}, in memory of “Albert Rudge”. The family is told once they are passed.`,
      owedTo: 'Judith Hargreaves and the family',
      action: { kind: 'judge', giftNumber: fresh.number, wordsId: fresh.wordIds[0], words: 'Albert Rudge' },
    });
  });

  it('a hidden giver’s are the treasurer’s to read; others only learn that they wait', async () => {
    const gift = await addGift(app.deps.db, world, {
      at: ago(3),
      name: 'Hidden Hollis',
      nameShown: 'treasurer-only',
      words: [{ kind: 'message', words: 'love from Hollis' }],
    });
    expect((await owed('treasurer'))[0]?.action.kind).toBe('judge');
    for (const role of ['chair', 'secretary', 'examiner'] as const) {
      const [row] = await owed(role);
      expect(row).toMatchObject({
        owedTo: 'name withheld',
        action: { kind: 'open', path: `/desk/gifts/${gift.number}#words` },
      });
      expect(JSON.stringify(row)).not.toContain('Hollis');
    }
  });

  it('the examiner sees them but is offered no verdict', async () => {
    await addGift(app.deps.db, world, { at: ago(3), words: [{ kind: 'message', words: 'Well done' }] });
    expect((await owed('examiner')).map((row) => row.action.kind)).toEqual(['open']);
  });
});

describe('letters', () => {
  it('that came back or may have gone are owed; sent, settled and freshly delayed ones are not', async () => {
    const failed = await addGift(app.deps.db, world, { at: ago(50), thanks: 'hard_failed' });
    const doubtful = await addGift(app.deps.db, world, {
      at: ago(2),
      thanks: 'uncertain',
      name: 'Hidden Hollis',
      nameShown: 'treasurer-only',
    });
    await addGift(app.deps.db, world, { at: ago(2), thanks: 'sent' });
    await addGift(app.deps.db, world, { at: ago(2), thanks: 'soft_failed' });
    const delayed = await addGift(app.deps.db, world, { at: ago(2), thanks: 'soft_failed' });
    await app.deps.db('mail_outbox').where({ id: delayed.mailId }).update({ tries: 3 });
    const settled = await addGift(app.deps.db, world, { at: ago(2), thanks: 'hard_failed' });
    const person = await signIn(app, ['secretary']);
    await person.post(`/api/desk/mail/${settled.mailId}/settle`, { decision: 'leave' }).expect(200);
    expect((await owed('chair')).map((row) => row.id)).toContain(`mail-${delayed.mailId}`);
    await person.post(`/api/desk/mail/${delayed.mailId}/settle`, { decision: 'leave' }).expect(200);
    const rows = await owed('chair');
    expect(rows.map((row) => [row.id, row.due, row.owedTo])).toEqual([
      [`mail-${failed.mailId}`, 'late', 'Judith Hargreaves'],
      [`mail-${doubtful.mailId}`, 'today', 'name withheld'],
    ]);
    expect(rows[0]).toMatchObject({
      what: `The thank-you for £20, gift ${failed.number}, came back`,
      action: { kind: 'open', path: `/desk/gifts/${failed.number}#letters` },
    });
    expect((await owed('treasurer'))[1]?.owedTo).toBe('Hidden Hollis');
  });

  it('a letter to a family is told apart from the thanks, and leads to the same gift', async () => {
    const gift = await addGift(app.deps.db, world, { at: ago(2) });
    await addMail(app.deps.db, {
      subjectId: gift.id,
      kind: 'dedication-told',
      state: 'hard_failed',
      at: ago(2),
    });
    expect((await owed('secretary'))[0]).toMatchObject({
      owedTo: 'the family',
      action: { path: `/desk/gifts/${gift.number}#letters` },
    });
  });
});

describe('payments and checks', () => {
  it('hang after an hour, events after ten minutes; what is refused or does not agree at once', async () => {
    const hanging = await addIntent('confirming', ago(2));
    await addIntent('asked', ago(5), ago(-1));
    await addIntent('confirming', ago(0.5));
    const left = await addIntent('asked', ago(1.5), ago(0.01));
    const started = await addIntent('started', ago(1.2));
    await addIntent('started', ago(0.7));
    await addIntent('expired', ago(9));
    const wrong = await addIntent('mismatched', ago(0.1));
    await addEvent('evt_old', 'waiting', ago(0.2));
    await addEvent('evt_new', 'waiting', ago(0.1));
    await addEvent('evt_refused', 'refused', ago(0.01), 'livemode is not ours');
    await addEvent('evt_done', 'worked', ago(9));
    const rows = await owed('treasurer');
    expect(rows.map((row) => row.id)).toEqual([
      `payment-${hanging}`,
      `payment-${left}`,
      expect.stringMatching(/^payment-unnamed-[0-9a-f]{24}$/),
      'event-evt_old',
      `payment-${wrong}`,
      'event-evt_refused',
    ]);
    expect(JSON.stringify(rows)).not.toContain(started);
    expect(rows[4]?.detail.join()).toContain('paid 1900 gbp');
    const kinds = ['look', 'look', 'look', 'look'];
    expect(rows.map((row) => row.action.kind)).toEqual([...kinds, 'settle', 'settle']);
    expect((await owed('chair')).map((row) => row.action.kind)).toEqual([...kinds, 'look', 'look']);
  });

  it('end by the treasurer’s word with a reason, once, and by nobody else’s', async () => {
    const wrong = await addIntent('mismatched', ago(2));
    const confirming = await addIntent('confirming', ago(3));
    await addEvent('evt_refused', 'refused', ago(1), 'livemode is not ours');
    const [treasurer, chair] = [await signIn(app, ['treasurer']), await signIn(app, ['chair'])];
    const place = `/api/desk/payments/intent/${wrong}/settle`;
    const body = { reason: 'Given back in the card service' };
    await chair.post(place, body).expect(403);
    await treasurer.post(place, { reason: ' ' }).expect(400);
    await treasurer.post('/api/desk/payments/intent/cs_of_nobody/settle', body).expect(404);
    await treasurer.post('/api/desk/payments/gift/1/settle', body).expect(404);
    await treasurer.post(`/api/desk/payments/intent/${confirming}/settle`, body).expect(422);
    expect((await owed('treasurer')).map((row) => row.id)).toContain(`payment-${wrong}`);
    await treasurer.post(place, body).expect(200);
    await treasurer.post(place, body).expect(409);
    await treasurer.post('/api/desk/payments/event/evt_refused/settle', body).expect(200);
    expect((await owed('treasurer')).map((row) => row.id)).toEqual([`payment-${confirming}`]);
    expect(
      await app.deps.db('gift_intents').where({ session_id: wrong }).first('settled_by', 'settled_reason'),
    ).toEqual({ settled_by: treasurer.accountId, settled_reason: body.reason });
    const lines = await app.deps
      .db('audit.lines')
      .where({ action: 'payment-looked-at', actor_id: treasurer.accountId })
      .orderBy('id')
      .pluck('detail');
    expect(lines).toEqual([
      { kind: 'intent', id: wrong },
      { kind: 'event', id: 'evt_refused' },
    ]);
  });

  it('checks that never ran are owed in one row', async () => {
    await app.deps.db('check_runs').whereIn('name', ['trial_balance', 'shown_total']).delete();
    const rows = await owed('examiner');
    expect(rows.map((row) => [row.what, row.detail])).toEqual([
      ['2 nightly checks have never run', ['shown total', 'trial balance']],
    ]);
  });

  it('a check is owed when its last run found something or lies too far back', async () => {
    const run = (name: string, hours: number, faults: number) => ({
      name,
      ran_at: ago(hours),
      faults,
      detail: JSON.stringify(Array.from({ length: faults }, () => ({ id: 'x', fault: 'out by 1 pence' }))),
    });
    await app.deps
      .db('check_runs')
      .whereIn('name', ['trial_balance', 'gift_amounts', 'shown_total'])
      .delete();
    await app.deps
      .db('check_runs')
      .insert([
        run('trial_balance', 30, 2),
        run('trial_balance', 6, 0),
        run('gift_amounts', 30, 0),
        run('gift_amounts', 6, 1),
        run('shown_total', 27, 0),
      ]);
    const rows = await owed('examiner');
    expect(rows.map((row) => row.what)).toEqual([
      'The nightly check “shown total” has not run since 3 May 2027, 8am',
      'The nightly check “gift amounts” found 1 fault',
    ]);
    expect(rows[1]?.detail).toEqual(['out by 1 pence (x)']);
  });
});

describe('over the API', () => {
  it('tells the day of the society’s clock, and what was lately done', async () => {
    app.clock.moveTo(new Date('2027-06-10T23:30:00Z'));
    await runEveryCheck(app.clock.now());
    const gift = await addGift(app.deps.db, world, { words: [{ kind: 'message', words: 'Well done' }] });
    const person = await signIn(app, ['secretary'], 'Joan Pellow');
    await person
      .post(`/api/desk/gifts/${gift.number}/words/${gift.wordIds[0]}`, { verdict: 'passed' })
      .expect(200);
    const today = todaySchema.parse((await person.get('/api/desk/today')).body);
    expect(today.day).toBe('2027-06-11');
    expect(today.mayReadGifts).toBe(true);
    expect(today.rows).toEqual([]);
    expect(today.history[0]).toMatchObject({
      words: 'Words passed by Joan Pellow.',
      giftNumber: gift.number,
    });
  });

  it('shows the site and schools nothing of gifts, and strangers nothing at all', async () => {
    await addGift(app.deps.db, world, { at: ago(3), words: [{ kind: 'message', words: 'Well done' }] });
    for (const role of ['site', 'schools'] as const) {
      const answer = await (await signIn(app, [role])).get('/api/desk/today');
      expect(todaySchema.parse(answer.body)).toMatchObject({ mayReadGifts: false, rows: [], history: [] });
    }
    expect((await app.agent().get('/api/desk/today')).status).toBe(401);
  });
});
