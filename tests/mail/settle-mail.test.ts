// A person decides about a doubtful or failed letter; the desk is told of those that wait for a word.
import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { listMailAbout, listOwedMail, sendDueMail, settleMail } from '#server/platform/mail/index.ts';
import { FROM_NAME, queueOne, rowOf, setUpMail, type MailSetting } from './mail-setting.ts';

let setting: MailSetting;
let accountId: string;
beforeAll(async () => {
  setting = await setUpMail();
  accountId = await setting.addAccount();
});
afterAll(() => setting.end());
beforeEach(async () => {
  setting.smtp.clear();
  setting.smtp.setMode({});
  await setting.db('mail_outbox').delete();
});

const send = () => sendDueMail(setting.deps, { fromName: FROM_NAME, now: setting.now });
const owedIds = async (now = new Date('2027-05-03T09:30:00Z')) =>
  (await listOwedMail(setting.db, now)).map((one) => one.id);
const settle = (id: string, decision: 'send-again' | 'leave') =>
  setting.db.transaction((trx) => settleMail(trx, { id, decision, accountId }));

async function doubtful(): Promise<string> {
  setting.smtp.setMode({ afterData: 'drop', times: 1 });
  const id = await queueOne(setting.db);
  await send();
  return id;
}

describe('settleMail', () => {
  it('sends a doubtful letter again under the same Message-ID', async () => {
    const id = await doubtful();
    expect(await owedIds()).toEqual([id]);
    expect(await settle(id, 'send-again')).toMatchObject({ id, stateBefore: 'uncertain', state: 'queued' });
    expect(await owedIds()).toEqual([]);
    await send();
    expect(await rowOf(setting.db, id)).toMatchObject({ state: 'sent', settled_by: null });
    const messageIds = setting.smtp.messages().map((one) => one.messageId);
    expect(messageIds).toHaveLength(2);
    expect(new Set(messageIds).size).toBe(1);
  });

  it('leaves a doubtful letter as it is, and the desk is not asked again', async () => {
    const id = await doubtful();
    await settle(id, 'leave');
    expect(await owedIds()).toEqual([]);
    expect(await rowOf(setting.db, id)).toMatchObject({ state: 'uncertain', settled_by: accountId });
    setting.forward(60);
    expect(await send()).toMatchObject({ claimed: 0 });
  });

  it('decides once: a second word is refused', async () => {
    const id = await doubtful();
    await settle(id, 'leave');
    await expect(settle(id, 'send-again')).rejects.toMatchObject({ status: 422 });
  });

  it('stops a letter that would still be tried', async () => {
    setting.smtp.setMode({ refuse: [{ address: '*', code: 452 }] });
    const id = await queueOne(setting.db);
    await send();
    await settle(id, 'leave');
    setting.forward(60);
    expect(await send()).toMatchObject({ claimed: 0 });
    expect((await rowOf(setting.db, id)).state).toBe('suppressed');
  });

  it('refuses to decide about a letter that is sent, and knows no letter that is not there', async () => {
    const id = await queueOne(setting.db);
    await send();
    await expect(settle(id, 'send-again')).rejects.toMatchObject({ status: 422 });
    await expect(settle(randomUUID(), 'leave')).rejects.toMatchObject({ status: 404 });
  });

  it('refuses to send a letter to an address that is not plain', async () => {
    const id = await queueOne(setting.db, { toAddress: 'a@post.example, evil@post.example' });
    await expect(settle(id, 'send-again')).rejects.toMatchObject({ extra: { reason: 'unsafe-address' } });
  });
});

describe('what the desk is told', () => {
  it('is a refused letter at once, a delayed one from its third try', async () => {
    setting.smtp.setMode({ refuse: [{ address: '*', code: 452 }] });
    const id = await queueOne(setting.db);
    for (const wait of [1, 5]) {
      await send();
      expect(await owedIds()).toEqual([]);
      setting.forward(wait);
    }
    await send();
    expect(await owedIds()).toEqual([id]);
  });

  it('is a letter that nobody has sent for an hour', async () => {
    const id = await queueOne(setting.db, { at: new Date('2027-05-03T09:00:00Z') });
    expect(await owedIds(new Date('2027-05-03T09:59:00Z'))).toEqual([]);
    expect(await owedIds(new Date('2027-05-03T10:01:00Z'))).toEqual([id]);
  });

  it('is every letter about one thing', async () => {
    const subjectId = randomUUID();
    await queueOne(setting.db, { subjectId });
    await queueOne(setting.db, { subjectId, kind: 'dedication-told' });
    await queueOne(setting.db);
    const lines = await listMailAbout(setting.db, 'gift', subjectId);
    expect(lines.map((line) => line.kind).toSorted()).toEqual(['dedication-told', 'gift-thanks']);
  });
});
