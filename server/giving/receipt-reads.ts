// One gift as its giver's receipt tells it: the same words on the page, in the mail and in the PDF.
import { z } from 'zod';
import { formatDay } from '#shared/dates.ts';
import { giftAidOn } from '#shared/declarations/gift-aid-rules.ts';
import { receiptSchema, type Receipt } from '#shared/giving/give-schemas.ts';
import { formatPence } from '#shared/money.ts';
import { findDeclaration } from '#server/declarations/index.ts';
import { toPence, type Db } from '#server/platform/db.ts';
import { NotFound } from '#server/platform/errors.ts';
import { getSociety } from '#server/society/index.ts';
import { dayOf } from '#shared/dates.ts';
import { intentAnswersSchema } from './intent-store.ts';
import { listShares } from './gift-store.ts';

const giftRow = z.object({
  number: z.number(),
  intent_answers: intentAnswersSchema,
  amount_pence: z.unknown().transform(toPence),
  received_on: z.string(),
  declaration_id: z.string().nullable(),
  wanted_part: z.string().nullable(),
  campaign_name: z.string(),
});

/** Receipts are counted from 1 in the order in which gifts came, without gaps that mean anything. */
export const receiptNumber = (giftNumber: number): string => String(giftNumber).padStart(5, '0');

const WHOLE_FIGURE = 'The whole figure, from the ground up';

async function readGiftRow(db: Db, giftId: string): Promise<z.infer<typeof giftRow>> {
  const found: unknown = await db('gifts as g')
    .join('gift_intents as i', 'i.id', 'g.intent_id')
    .join('appeal_wordings as w', 'w.id', 'g.appeal_wording_id')
    .join('campaigns as c', 'c.id', 'w.campaign_id')
    .leftJoin('parts as p', 'p.id', 'g.part_id')
    .where('g.id', giftId)
    .first('g.number', 'g.amount_pence', 'g.received_on', 'g.declaration_id', {
      intent_answers: 'i.answers',
      wanted_part: 'p.name',
      campaign_name: 'c.name',
    });
  if (found === undefined) throw new NotFound('There is no such gift.');
  return giftRow.parse(found);
}

async function readShares(db: Db, giftId: string): Promise<Receipt['shares']> {
  const shares = await listShares(db, giftId);
  const names: { id: string; name: string }[] = await db('parts').select('id', 'name');
  return shares.map((one) => ({
    name: one.partId ? (names.find((part) => part.id === one.partId)?.name ?? '') : WHOLE_FIGURE,
    amountPence: one.amountPence,
    isMeant: one.partId !== null,
  }));
}

/** Why a gift to a part went elsewhere, whole or in part; null when it went where its giver chose. */
function splitNote(wantedPart: string | null, shares: Receipt['shares']): string | null {
  const free = shares.find((one) => !one.isMeant);
  if (wantedPart === null || !free) return null;
  const meant = shares.find((one) => one.isMeant);
  return meant
    ? `${wantedPart} needed only ${formatPence(meant.amountPence)} more when your gift came. The other ${formatPence(free.amountPence)} goes to the next part in building order.`
    : `${wantedPart} was filled by other gifts just before yours came. Yours goes to the next part in building order.`;
}

export async function readReceipt(db: Db, giftId: string): Promise<Receipt> {
  const [gift, shares, society] = [
    await readGiftRow(db, giftId),
    await readShares(db, giftId),
    await getSociety(db),
  ];
  const declaration = gift.declaration_id ? await findDeclaration(db, gift.declaration_id) : undefined;
  const answers = gift.intent_answers;
  return receiptSchema.parse({
    number: receiptNumber(gift.number),
    givenOn: formatDay(gift.received_on),
    campaignName: gift.campaign_name,
    name: answers.name,
    greeting: answers.greeting,
    sumPence: gift.amount_pence,
    shares,
    splitNote: splitNote(gift.wanted_part, shares),
    dedication:
      answers.dedication === 'none' ? null : { kind: answers.dedication, name: answers.dedicationName },
    wallWords: answers.wall === 'wall' ? answers.wallWords : null,
    declaration: declaration
      ? {
          wording: declaration.wording,
          name: declaration.fullName,
          address: declaration.address,
          givenOn: formatDay(dayOf(declaration.givenAt)),
          giftAidPence: giftAidOn(gift.amount_pence, gift.received_on),
        }
      : null,
    societyName: society.name,
    societyAddress: society.addressLine,
    registrationStatement: society.registrationStatement,
    contact: `${society.phone}, ${society.email}`,
    complaints: society.complaints,
  });
}
