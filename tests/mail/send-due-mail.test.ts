// What becomes of a letter: sent once, tried again, failed, or doubtful and left for a person.
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { countDueMail, mailTasks, sendDueMail, type SendingInput } from '#server/platform/mail/index.ts';
import { FROM_NAME, queueOne, rowOf, setUpMail, startRudeServer, type MailSetting } from './mail-setting.ts';

let setting: MailSetting;
beforeAll(async () => {
  setting = await setUpMail();
});
afterAll(() => setting.end());
beforeEach(async () => {
  setting.smtp.clear();
  setting.smtp.setMode({});
  await setting.db('mail_outbox').delete();
});

const send = (more: Partial<SendingInput> = {}) =>
  sendDueMail(setting.deps, { fromName: FROM_NAME, now: setting.now, ...more });

const minutesUntil = (moment: Date | null): number =>
  Math.round(((moment?.getTime() ?? 0) - setting.now().getTime()) / 60_000);

describe('a letter that the server takes', () => {
  it('is sent once, from the society, with both its forms and its own Message-ID', async () => {
    const id = await queueOne(setting.db, { toName: 'Zoë Żółć', subject: 'Thank you, Zoë' });
    expect(await send()).toMatchObject({ claimed: 1, sent: 1 });
    expect(await send()).toMatchObject({ claimed: 0, sent: 0 });
    const row = await rowOf(setting.db, id);
    expect(row).toMatchObject({ state: 'sent', tries: 1, lease_until: null });
    expect(row.response).toMatch(/^250/);
    const [kept, ...more] = setting.smtp.messages();
    expect(more).toHaveLength(0);
    expect(kept).toMatchObject({
      messageId: row.message_id,
      subject: 'Thank you, Zoë',
      envelopeFrom: 'post@brackenhythe.example',
      envelopeTo: ['thea.quillan@post.example'],
      fromText: '"Brackenhythe Heritage Society" <post@brackenhythe.example>',
    });
    const { plain, html, source } = await setting.smtp.read(kept?.id ?? '');
    expect(plain).toBe('Thank you.\n');
    expect(html).toBe('<p>Thank you.</p>');
    expect(source).toMatch(/^Auto-Submitted: auto-generated\r$/m);
  });

  it('is dated by the society’s clock', async () => {
    const id = await queueOne(setting.db);
    await send();
    expect((await rowOf(setting.db, id)).sent_at?.toISOString()).toMatch(/^2027-05-03T09:30/);
  });

  it('is given to the server only after its hand-over is committed', async () => {
    const id = await queueOne(setting.db);
    let seen: string | undefined;
    const mailer = {
      send: async () => {
        seen = (await rowOf(setting.db, id)).state;
        return { kind: 'taken' as const, response: '250 fine' };
      },
    };
    await sendDueMail({ ...setting.deps, mailer }, { fromName: FROM_NAME, now: setting.now });
    expect(seen).toBe('handing_over');
  });

  it('is sent once each by two senders at the same moment', async () => {
    for (let index = 0; index < 30; index += 1)
      await queueOne(setting.db, { toAddress: `giver${index}@post.example` });
    const tallies = await Promise.all([send({ limit: 20 }), send({ limit: 20 }), send({ limit: 20 })]);
    expect(tallies.reduce((sum, tally) => sum + tally.sent, 0)).toBe(30);
    const addresses = setting.smtp.messages().flatMap((one) => one.envelopeTo);
    expect(addresses).toHaveLength(30);
    expect(new Set(addresses).size).toBe(30);
  });
});

describe('a letter that the server refuses', () => {
  it('has failed when the address is refused for good, and is never tried again', async () => {
    setting.smtp.setMode({ refuse: [{ address: 'thea.quillan@post.example', code: 550 }] });
    const id = await queueOne(setting.db);
    await send();
    expect(await rowOf(setting.db, id)).toMatchObject({ state: 'hard_failed', tries: 1 });
    expect((await rowOf(setting.db, id)).response).toMatch(/550/);
    setting.forward(60 * 24 * 7);
    expect(await send()).toMatchObject({ claimed: 0 });
  });

  it.each([
    ['before the letter', { refuse: [{ address: '*', code: 452 }] }],
    ['after the letter', { afterData: 'answer' as const, afterDataCode: 451 }],
  ])('waits 1, 5, 15, 60 minutes and a day when refused for now %s, then has failed', async (_, mode) => {
    setting.smtp.setMode(mode);
    const id = await queueOne(setting.db);
    for (const [index, wait] of [1, 5, 15, 60, 24 * 60].entries()) {
      await send();
      const row = await rowOf(setting.db, id);
      expect(row).toMatchObject({ state: 'soft_failed', tries: index + 1 });
      expect(minutesUntil(row.next_try_at)).toBe(wait);
      setting.forward(wait - 0.5);
      expect(await send()).toMatchObject({ claimed: 0 });
      setting.forward(0.5);
    }
    await send();
    expect(await rowOf(setting.db, id)).toMatchObject({ state: 'hard_failed', tries: 6 });
  });

  it('goes out in the end when the trouble passes', async () => {
    setting.smtp.setMode({ refuse: [{ address: '*', code: 452 }] });
    const id = await queueOne(setting.db);
    await send();
    setting.smtp.setMode({});
    setting.forward(1);
    await send();
    expect(await rowOf(setting.db, id)).toMatchObject({ state: 'sent', tries: 2, next_try_at: null });
    expect(setting.smtp.messages()).toHaveLength(1);
  });

  it('for good after its text has failed too', async () => {
    setting.smtp.setMode({ afterData: 'answer', afterDataCode: 554 });
    const id = await queueOne(setting.db);
    await send();
    expect((await rowOf(setting.db, id)).state).toBe('hard_failed');
  });

  it('does not keep the others back', async () => {
    setting.smtp.setMode({ refuse: [{ address: 'gone@post.example', code: 550 }] });
    await queueOne(setting.db, { toAddress: 'gone@post.example', at: new Date('2027-01-01T09:00:00Z') });
    const id = await queueOne(setting.db);
    expect(await send()).toMatchObject({ sent: 1, failed: 1 });
    expect((await rowOf(setting.db, id)).state).toBe('sent');
  });
});

describe('a letter whose answer is lost', () => {
  it('is doubtful and is not sent again by itself, although the server has it', async () => {
    setting.smtp.setMode({ afterData: 'drop', times: 1 });
    const id = await queueOne(setting.db);
    expect(await send()).toMatchObject({ uncertain: 1, sent: 0 });
    expect((await rowOf(setting.db, id)).state).toBe('uncertain');
    for (const minutes of [1, 5, 60, 60 * 24 * 3]) {
      setting.forward(minutes);
      expect(await send()).toMatchObject({ claimed: 0 });
    }
    expect(setting.smtp.messages()).toHaveLength(1);
  });

  it('becomes doubtful when its sender dies in the hand-over, once the lease is over', async () => {
    const id = await queueOne(setting.db);
    const mailer = { send: () => Promise.reject(new Error('the process is gone')) };
    const dead = sendDueMail({ ...setting.deps, mailer }, { fromName: FROM_NAME, now: setting.now });
    await expect(dead).rejects.toThrow('gone');
    setting.forward(1.9);
    await send();
    expect((await rowOf(setting.db, id)).state).toBe('handing_over');
    setting.forward(0.2);
    await send();
    expect((await rowOf(setting.db, id)).state).toBe('uncertain');
    expect(setting.smtp.messages()).toHaveLength(0);
  });

  it('goes back to waiting when its sender dies before the hand-over', async () => {
    const id = await queueOne(setting.db);
    await setting
      .db('mail_outbox')
      .where({ id })
      .update({ state: 'claimed', lease_until: new Date(setting.now().getTime() + 120_000) });
    expect(await send()).toMatchObject({ claimed: 0 });
    setting.forward(2.1);
    expect(await send()).toMatchObject({ claimed: 1, sent: 1 });
  });

  it('is settled by an answer that comes later than the lease', async () => {
    const id = await queueOne(setting.db);
    const mailer = {
      send: async () => {
        setting.forward(3);
        await send();
        expect((await rowOf(setting.db, id)).state).toBe('uncertain');
        return { kind: 'taken' as const, response: '250 at last' };
      },
    };
    await sendDueMail({ ...setting.deps, mailer }, { fromName: FROM_NAME, now: setting.now });
    expect(await rowOf(setting.db, id)).toMatchObject({ state: 'sent', response: '250 at last' });
  });
});

describe('a mail server that is away', () => {
  it('costs one letter one try; the rest wait, and nothing is doubtful', async () => {
    const ids = [await queueOne(setting.db), await queueOne(setting.db), await queueOne(setting.db)];
    const away = { ...setting.deps, mailer: setting.mailerTo('smtp://127.0.0.1:1') };
    const tally = await sendDueMail(away, { fromName: FROM_NAME, now: setting.now });
    expect(tally).toMatchObject({ claimed: 3, failed: 1, uncertain: 0, isServerAway: true });
    const states = await Promise.all(ids.map(async (id) => (await rowOf(setting.db, id)).state));
    expect(states.toSorted()).toEqual(['queued', 'queued', 'soft_failed']);
  });

  it('that hangs up before it asks for the text leaves no doubt: the letter is tried again', async () => {
    const id = await queueOne(setting.db);
    const rude = await startRudeServer();
    const away = { ...setting.deps, mailer: setting.mailerTo(rude.url) };
    await sendDueMail(away, { fromName: FROM_NAME, now: setting.now });
    await rude.stop();
    expect((await rowOf(setting.db, id)).state).toBe('soft_failed');
  });
});

describe('a line that the server closed meanwhile', () => {
  it('leaves no doubt about the next letter, which goes out soon after', async () => {
    await queueOne(setting.db);
    await send();
    await setting.smtp.hangUp();
    const id = await queueOne(setting.db);
    await send();
    setting.forward(1);
    await send();
    expect((await rowOf(setting.db, id)).state).toBe('sent');
    expect(setting.smtp.messages()).toHaveLength(2);
  });
});

describe('a letter that must not go out after all', () => {
  it('is held back at the hand-over with the reason', async () => {
    const id = await queueOne(setting.db);
    await send({ findReasonNotToSend: () => Promise.resolve('The giver asked us to stop.') });
    expect(await rowOf(setting.db, id)).toMatchObject({
      state: 'suppressed',
      tries: 0,
      response: 'The giver asked us to stop.',
    });
    expect(setting.smtp.messages()).toHaveLength(0);
  });
});

describe('the worker’s task', () => {
  const task = (deps = setting.deps) =>
    mailTasks(deps, { findFromName: () => Promise.resolve(FROM_NAME), now: setting.now })['send-mail']();

  it('empties the outbox, however much is in it', async () => {
    for (let index = 0; index < 23; index += 1) await queueOne(setting.db);
    expect(await countDueMail(setting.db, setting.now())).toBe(23);
    await task();
    expect(await countDueMail(setting.db, setting.now())).toBe(0);
    expect(setting.smtp.messages()).toHaveLength(23);
  });

  it('stops when the mail server is away, and leaves the rest for later', async () => {
    await queueOne(setting.db);
    await queueOne(setting.db);
    await task({ ...setting.deps, mailer: setting.mailerTo('smtp://127.0.0.1:1') });
    expect(await countDueMail(setting.db, setting.now())).toBe(1);
  });
});
