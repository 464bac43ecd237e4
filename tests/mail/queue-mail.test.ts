// Putting letters in the outbox: once each, with a fixed Message-ID, and never to an address that is not plain.
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { isPlainAddress, listOwedMail, queueMail, sendDueMail } from '#server/platform/mail/index.ts';
import { aLetter, FROM_NAME, queueOne, rowOf, setUpMail, type MailSetting } from './mail-setting.ts';

let setting: MailSetting;
beforeAll(async () => {
  setting = await setUpMail();
});
afterAll(() => setting.end());

const TRICKS = [
  'a@post.example\r\nRCPT TO:<evil@post.example>',
  'a@post.example, evil@post.example',
  'a@post.example;evil@post.example',
  '"evil@post.example a"@post.example',
  'Kind Person <evil@post.example>',
  '<evil@post.example>',
  'team: evil@post.example;',
  'evil@post.example (a@post.example)',
  'a@b@post.example',
  'a@[127.0.0.1]',
  'a\\@post.example',
  'a@post.example\u0000',
  'a@post.example\u2028b',
  'a\u202e@post.example',
  'a@-post.example',
  'a@post',
  '@post.example',
  'a b@post.example',
  '',
  `${'a'.repeat(65)}@post.example`,
  `a@${'b'.repeat(60)}.${'c'.repeat(60)}.${'d'.repeat(60)}.${'e'.repeat(60)}.${'f'.repeat(20)}.example`,
];

describe('a plain address', () => {
  it.each(TRICKS)('is not %j', (trick) => {
    expect(isPlainAddress(trick)).toBe(false);
  });
  it.each([
    'thea.quillan@post.example',
    "o'hara+gift@post.example",
    'x@a-b.post.example',
    'żółć@łódź.example',
  ])('is %s', (address) => {
    expect(isPlainAddress(address)).toBe(true);
  });
});

describe('queueMail', () => {
  it('keeps one letter of a kind about a subject, however often it is asked for', async () => {
    const letter = aLetter();
    const first = await setting.db.transaction((trx) => queueMail(trx, letter));
    const second = await setting.db.transaction((trx) =>
      queueMail(trx, { ...letter, subject: 'Other words' }),
    );
    expect(first).toBeDefined();
    expect(second).toBeUndefined();
    const rows = await setting.db('mail_outbox').where({ subject_id: letter.subjectId });
    expect(rows).toHaveLength(1);
    expect(rows[0]).toMatchObject({ state: 'queued', subject: 'Thank you for your gift' });
  });

  it('fixes the Message-ID when the letter is written', async () => {
    const id = await queueOne(setting.db);
    expect((await rowOf(setting.db, id)).message_id).toBe(`<m.${id}@lampwoman.example>`);
  });

  it('nudges the worker only when the transaction holds', async () => {
    const letter = aLetter();
    const jobs = async () => (await setting.owner('graphile_worker.jobs').where({ key: 'send-mail' })).length;
    await setting.owner.raw(`delete from graphile_worker._private_jobs`);
    await setting.db
      .transaction(async (trx) => {
        await queueMail(trx, letter);
        throw new Error('the gift was refused');
      })
      .catch(() => undefined);
    expect(await jobs()).toBe(0);
    expect(await setting.db('mail_outbox').where({ subject_id: letter.subjectId })).toHaveLength(0);
    await queueOne(setting.db);
    expect(await jobs()).toBe(1);
  });

  it('keeps a letter to an unsafe address as failed, gives it to no server, and tells the desk', async () => {
    const before = setting.smtp.messages().length;
    const id = await queueOne(setting.db, { toAddress: 'a@post.example, evil@post.example' });
    await setting.db('mail_outbox').whereNot({ id }).delete();
    await sendDueMail(setting.deps, { fromName: FROM_NAME, now: setting.now });
    expect(await rowOf(setting.db, id)).toMatchObject({ state: 'hard_failed', tries: 0 });
    expect(setting.smtp.messages()).toHaveLength(before);
    expect((await listOwedMail(setting.db, setting.deps.clock.now())).map((one) => one.id)).toContain(id);
  });

  it('never gives the server an address that was changed behind its back', async () => {
    const id = await queueOne(setting.db);
    await setting.db('mail_outbox').where({ id }).update({ to_address: 'a@post.example, evil@post.example' });
    await sendDueMail(setting.deps, { fromName: FROM_NAME, now: setting.now });
    expect((await rowOf(setting.db, id)).state).toBe('suppressed');
  });

  it('lets no header in through a name or a subject', async () => {
    setting.smtp.clear();
    await queueOne(setting.db, {
      toName: 'Thea\r\nBcc: evil@post.example',
      subject: 'Thanks\r\nBcc: evil@post.example\r\n\r\nWords of my own',
    });
    await sendDueMail(setting.deps, { fromName: FROM_NAME, now: setting.now });
    const [kept] = setting.smtp.messages();
    expect(kept?.envelopeTo).toEqual(['thea.quillan@post.example']);
    const { source } = await setting.smtp.read(kept?.id ?? '');
    const head = source.slice(0, source.indexOf('\r\n\r\n'));
    expect(head).not.toMatch(/^bcc:/im);
    expect(kept?.subject).toContain('Bcc: evil@post.example');
  });
});
