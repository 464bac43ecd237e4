// What a person at the desk decides about a letter that failed or may not have gone.
import type { SettleMail } from '#shared/giving/desk-schemas.ts';
import { recordAudit } from '#server/accounts/index.ts';
import type { Deps } from '#server/deps.ts';
import type { Trx } from '#server/platform/db.ts';
import { NotAllowed, NotFound } from '#server/platform/errors.ts';
import { settleMail } from '#server/platform/mail/index.ts';
import { listLetterSubjects } from './owed-reads.ts';
import { mayAct, type Reader } from './withheld-names.ts';

type Decision = SettleMail & { mailId: string; requestId: string | undefined };

/** @throws NotFound, NotAllowed for a letter whose reader is hidden, Refused when nothing is left to decide */
export async function settleLetter(
  deps: Deps,
  trx: Trx,
  person: Reader & { accountId: string },
  { mailId, decision, requestId }: Decision,
): Promise<void> {
  const settled = await settleMail(trx, { id: mailId, decision, accountId: person.accountId });
  const [about] = await listLetterSubjects(trx, [settled.subjectId], person);
  // Letters about anything but a gift are another room's to settle.
  if (!about) throw new NotFound('There is no such letter about a gift.');
  if (!mayAct(person, about.isWithheld))
    throw new NotAllowed('The giver asked to be known to the treasurer only, so the treasurer decides here.');
  await recordAudit(trx, {
    at: deps.clock.now(),
    actor: { kind: 'desk', accountId: person.accountId },
    action: decision === 'send-again' ? 'mail-sent-again' : 'mail-left',
    objectKind: 'mail',
    objectId: mailId,
    detail: { giftNumber: about.giftNumber, stateBefore: settled.stateBefore },
    ...(requestId !== undefined && { requestId }),
  });
}
