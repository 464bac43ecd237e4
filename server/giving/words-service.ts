// A person reads what the public wrote, before anybody else sees it, and passes it or holds it back.
import { z } from 'zod';
import { WORDS_KINDS, type JudgeWords } from '#shared/giving/desk-schemas.ts';
import { recordAudit } from '#server/accounts/index.ts';
import type { Deps } from '#server/deps.ts';
import { toPence, type Trx } from '#server/platform/db.ts';
import { Conflict, NotAllowed, NotFound } from '#server/platform/errors.ts';
import { queueDedicationLetter } from './giving-emails.ts';
import { readReceipt } from './receipt-reads.ts';
import { mayAct, WITHHELD_SQL, type Reader } from './withheld-names.ts';

const lockedSchema = z.object({
  id: z.uuid(),
  gift_id: z.string(),
  kind: z.enum(WORDS_KINDS),
  words: z.string(),
  contact_name: z.string().nullable(),
  contact_email: z.string().nullable(),
  may_tell_sum: z.boolean(),
  read_at: z.date().nullable(),
  amount_pence: z.unknown().transform(toPence),
  is_withheld: z.boolean(),
});
type LockedWords = z.output<typeof lockedSchema>;

async function lockWords(trx: Trx, giftNumber: number, wordsId: string): Promise<LockedWords> {
  const found: unknown = await trx('public_words as w')
    .join('gifts as g', 'g.id', 'w.gift_id')
    .join('supporters as s', 's.id', 'g.supporter_id')
    .where({ 'w.id': wordsId, 'g.number': giftNumber })
    .forUpdate('w')
    .first('w.*', 'g.amount_pence', {
      is_withheld: trx.raw(WITHHELD_SQL),
    });
  if (found === undefined) throw new NotFound(`There are no such words with gift ${giftNumber}.`);
  return lockedSchema.parse(found);
}

/** The family hears of a gift once its words are passed; of the sum only when the giver said so. */
async function tellFamily(deps: Deps, trx: Trx, words: LockedWords, at: Date): Promise<void> {
  const { kind, contact_email: contactEmail } = words;
  if ((kind !== 'memory' && kind !== 'honour') || contactEmail === null) return;
  const receipt = await readReceipt(trx, words.gift_id);
  await queueDedicationLetter(trx, {
    giftId: words.gift_id,
    kind,
    honouredName: words.words,
    contactName: words.contact_name ?? '',
    contactEmail,
    giverName: words.is_withheld ? null : receipt.name,
    sumPence: words.may_tell_sum ? words.amount_pence : null,
    campaignName: receipt.campaignName,
    society: receipt,
    siteUrl: deps.config.publicAddress,
    at,
  });
}

type Judgement = JudgeWords & { giftNumber: number; wordsId: string; requestId: string | undefined };

/**
 * @throws NotFound, NotAllowed when this person may not read them, Conflict when somebody else read them first
 */
export async function judgeWords(
  deps: Deps,
  trx: Trx,
  person: Reader & { accountId: string },
  { giftNumber, wordsId, verdict, requestId }: Judgement,
): Promise<void> {
  const words = await lockWords(trx, giftNumber, wordsId);
  if (!mayAct(person, words.is_withheld))
    throw new NotAllowed(
      'The giver asked to be known to the treasurer only, so the treasurer reads these words.',
    );
  if (words.read_at !== null)
    throw new Conflict(
      'Somebody else has read these words meanwhile. Load the page again to see.',
      'words-read',
    );
  const at = deps.clock.now();
  await trx('public_words')
    .where({ id: words.id })
    .update({ read_at: at, read_by: person.accountId, verdict });
  await recordAudit(trx, {
    at,
    actor: { kind: 'desk', accountId: person.accountId },
    action: verdict === 'passed' ? 'words-passed' : 'words-held',
    objectKind: 'words',
    objectId: words.id,
    detail: { giftNumber, kind: words.kind },
    ...(requestId !== undefined && { requestId }),
  });
  if (verdict === 'passed') await tellFamily(deps, trx, words, at);
}
