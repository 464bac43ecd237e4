// Puts a letter in the outbox, in the transaction of what it tells of. Sending comes after the commit.
import { randomUUID } from 'node:crypto';
import type { Trx } from '../db.ts';
import { nudge } from '../queue.ts';
import { insertLetter } from './outbox-store.ts';
import { isPlainAddress, oneLine } from './plain-address.ts';

export type MailToQueue = {
  kind: string;
  subjectKind: string;
  subjectId: string;
  toName: string;
  toAddress: string;
  /** Our own address on the web; its host stands in the Message-ID. */
  siteUrl: string;
  subject: string;
  html: string;
  plain: string;
  at: Date;
};

export const UNSAFE_ADDRESS = 'Not sent: this is not one plain e-mail address.';

const messageIdOf = (id: string, siteUrl: string): string => `<m.${id}@${new URL(siteUrl).hostname}>`;

/**
 * One letter of a kind about a subject, however often it is asked for; the Message-ID is fixed here.
 * An unsafe address is never given to the mail server, but it does not undo what the letter tells of either:
 * a gift is a gift. The letter is kept as failed, so that a person sees it.
 * @returns the letter's id, or undefined when it was queued before
 */
export async function queueMail(trx: Trx, mail: MailToQueue): Promise<string | undefined> {
  const id = randomUUID();
  const isSafe = isPlainAddress(mail.toAddress);
  const isNew = await insertLetter(trx, {
    id,
    messageId: messageIdOf(id, mail.siteUrl),
    kind: mail.kind,
    subjectKind: mail.subjectKind,
    subjectId: mail.subjectId,
    toName: oneLine(mail.toName),
    toAddress: isSafe ? mail.toAddress : oneLine(mail.toAddress),
    subject: oneLine(mail.subject),
    html: mail.html,
    plain: mail.plain,
    state: isSafe ? 'queued' : 'hard_failed',
    response: isSafe ? null : UNSAFE_ADDRESS,
    at: mail.at,
  });
  if (!isNew) return undefined;
  if (isSafe) await nudge(trx, 'send-mail');
  return id;
}
