// One gift with its giver, wording, declaration, consents and shares. What could name a hidden giver is never read.
import { z } from 'zod';
import { daySchema } from '#shared/dates.ts';
import { giftAidOn } from '#shared/declarations/gift-aid-rules.ts';
import type { GiftChain } from '#shared/giving/desk-schemas.ts';
import { NOTHING } from '#shared/money.ts';
import { queryRows, toPence, type Db } from '#server/platform/db.ts';
import { NotFound } from '#server/platform/errors.ts';
import { allUnlessWithheld, nameOrWithheld, WITHHELD_SQL, type Reader } from './withheld-names.ts';

const sum = z.unknown().transform(toPence);
const text = z.string().nullable();

const headSchema = z.object({
  id: z.string(),
  intent_id: z.string(),
  number: z.int(),
  received_on: daySchema,
  received_at: z.date(),
  begun_at: z.date(),
  amount_pence: sum,
  name_shown: z.enum(['wall', 'not-public', 'treasurer-only']),
  is_withheld: z.boolean(),
  part_id: text,
  part_name: text,
  session_id: z.string(),
  payment_intent_id: z.string(),
  charge_id: text,
  balance_transaction_id: text,
  fee_pence: z.unknown().transform((value) => (value === null ? null : toPence(value))),
  fee_posted_at: z.date().nullable(),
  appeal_version: z.int(),
  purpose: z.string(),
  on_shortfall: z.string(),
  on_surplus: z.string(),
  part_choice: z.enum(['wish', 'fund']),
  declared_at: z.date().nullable(),
  declaration_cancelled_at: z.date().nullable(),
  declaration_covers: z.enum(['past-present-future', 'this-gift']).nullable(),
  declaration_version: z.int().nullable(),
  declaration_wording: text,
  giver: text,
  giver_number: z.int().nullable(),
  greeting: text,
  email: text,
  phone: text,
  address: text,
  declared_name: text,
  declared_address: text,
});
export type GiftHead = z.output<typeof headSchema>;

const ADDRESS = (table: string): string =>
  `nullif(concat_ws(', ', nullif(${table}.address_line1, ''), nullif(${table}.address_line2, ''),
    nullif(${table}.town, ''), nullif(nullif(${table}.postcode, ''), 'X')), '')`;

/** @throws NotFound when no gift has this number. */
export async function getGiftHead(db: Db, number: number, reader: Reader): Promise<GiftHead> {
  const personal = allUnlessWithheld(reader, {
    giver: 's.name',
    giver_number: 's.number',
    greeting: 's.greeting',
    email: 's.email',
    phone: 's.phone',
    address: ADDRESS('s'),
    declared_name: 'd.full_name',
    declared_address: ADDRESS('d'),
  });
  const [head] = await queryRows(
    db,
    headSchema,
    `select g.id, g.intent_id, g.number, g.received_on, g.received_at, i.created_at as begun_at,
       g.amount_pence, g.name_shown, ${WITHHELD_SQL} as is_withheld, g.part_id, p.name as part_name,
       g.session_id, g.payment_intent_id, g.charge_id, g.balance_transaction_id, g.fee_pence, g.fee_posted_at,
       a.version as appeal_version, a.purpose, a.on_shortfall, a.on_surplus, a.part_choice,
       d.given_at as declared_at, d.cancelled_at as declaration_cancelled_at, d.covers as declaration_covers,
       w.version as declaration_version, w.words as declaration_wording, ${personal}
     from gifts g
     join gift_intents i on i.id = g.intent_id
     join supporters s on s.id = g.supporter_id
     join appeal_wordings a on a.id = g.appeal_wording_id
     left join parts p on p.id = g.part_id
     left join declarations d on d.id = g.declaration_id
     left join wordings w on w.id = d.wording_id
     where g.number = ?`,
    [number],
  );
  if (!head) throw new NotFound(`There is no gift ${number}.`);
  return head;
}

const shareSchema = z.object({ name: text, fund: z.string(), amount_pence: sum, part_id: text });

export async function listGiftShares(db: Db, head: GiftHead): Promise<GiftChain['shares']> {
  const rows = await queryRows(
    db,
    shareSchema,
    `select p.name, f.name as fund, x.amount_pence, x.part_id
     from gift_shares x join funds f on f.id = x.fund_id left join parts p on p.id = x.part_id
     where x.gift_id = ? order by x.id`,
    [head.id],
  );
  return rows.map((row) => ({
    name: row.name ?? 'the whole figure',
    fund: row.fund,
    amountPence: row.amount_pence,
    isMeant: row.part_id === head.part_id,
  }));
}

export const giftAidOf = (head: GiftHead): GiftChain['giftAidPence'] =>
  head.declared_at !== null && head.declaration_cancelled_at === null
    ? giftAidOn(head.amount_pence, head.received_on)
    : NOTHING;

function toDeclaration(head: GiftHead): GiftChain['declaration'] {
  if (head.declared_at === null || head.declaration_version === null || head.declaration_covers === null)
    return null;
  return {
    version: head.declaration_version,
    wording: head.declaration_wording ?? '',
    name: nameOrWithheld(head.declared_name),
    address: head.declared_address,
    covers: head.declaration_covers,
    givenAt: head.declared_at.toISOString(),
    cancelledAt: head.declaration_cancelled_at?.toISOString() ?? null,
  };
}

/** What of the chain stands on the gift's own row and its nearest neighbours. */
export function toChainHead(
  head: GiftHead,
): Omit<GiftChain, 'shares' | 'consents' | 'entries' | 'words' | 'mails' | 'steps' | 'history'> {
  return {
    number: head.number,
    day: head.received_on,
    receivedAt: head.received_at.toISOString(),
    sumPence: head.amount_pence,
    giftAidPence: giftAidOf(head),
    isWithheld: head.is_withheld,
    nameShown: head.name_shown,
    giver: {
      name: nameOrWithheld(head.giver),
      number: head.giver_number,
      greeting: head.greeting,
      email: head.email,
      phone: head.phone,
      address: head.address,
    },
    towards: head.part_name ?? 'the whole figure',
    appeal: {
      version: head.appeal_version,
      purpose: head.purpose,
      onShortfall: head.on_shortfall,
      onSurplus: head.on_surplus,
      partChoice: head.part_choice,
    },
    declaration: toDeclaration(head),
    payment: {
      sessionId: head.session_id,
      paymentIntentId: head.payment_intent_id,
      chargeId: head.charge_id,
      balanceTransactionId: head.balance_transaction_id,
      feePence: head.fee_pence,
      feePostedAt: head.fee_posted_at?.toISOString() ?? null,
    },
  };
}
