// A person's word on a letter that did not go out or may not have: send it again, or leave it.
import { NotFound, Refused } from '../errors.ts';
import type { Trx } from '../db.ts';
import { nudge } from '../queue.ts';
import type { MailState } from './outbox-store.ts';
import { lockLetter, updateSettled } from './settle-store.ts';
import { isPlainAddress } from './plain-address.ts';

export type MailDecision = 'send-again' | 'leave';

export type SettledMail = {
  id: string;
  kind: string;
  subjectKind: string;
  subjectId: string;
  decision: MailDecision;
  stateBefore: MailState;
  state: MailState;
};

const OPEN: readonly MailState[] = ['uncertain', 'hard_failed', 'soft_failed'];

/** Left alone, a letter that would still be tried is stopped; the others stay what they are. */
const stateWhenLeft = (before: MailState): MailState => (before === 'soft_failed' ? 'suppressed' : before);

/**
 * Sent again it keeps its Message-ID, so that a mailbox which has it already can tell the two apart from two
 * letters. The caller writes the audit line.
 * @throws NotFound, or Refused when nothing is left to decide
 */
export async function settleMail(
  trx: Trx,
  { id, decision, accountId }: { id: string; decision: MailDecision; accountId: string },
): Promise<SettledMail> {
  const letter = await lockLetter(trx, id);
  if (!letter) throw new NotFound('There is no such letter.');
  if (!OPEN.includes(letter.state) || letter.isSettled)
    throw new Refused('Nothing is left to decide about this letter.', 'mail-not-open');
  if (decision === 'send-again' && !isPlainAddress(letter.toAddress))
    throw new Refused('This is not one plain e-mail address, so no letter can go there.', 'unsafe-address');
  const state = decision === 'send-again' ? 'queued' : stateWhenLeft(letter.state);
  await updateSettled(trx, id, decision === 'send-again' ? { state } : { state, settledBy: accountId });
  if (decision === 'send-again') await nudge(trx, 'send-mail');
  const { kind, subjectKind, subjectId } = letter;
  return { id, kind, subjectKind, subjectId, decision, stateBefore: letter.state, state };
}
