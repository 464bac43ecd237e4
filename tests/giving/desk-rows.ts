// Rows for the tests of the desk's gifts, written straight into the tables with the parents they need.
import { randomUUID } from 'node:crypto';
import { dayOf } from '#shared/dates.ts';
import type { Pence } from '#shared/money.ts';
import { pence } from '#shared/money.ts';
import type { Db } from '#server/platform/db.ts';
import { postGiftReceived } from '#server/books/index.ts';

export type World = {
  fundId: string;
  partIds: { footing: string; lantern: string };
  appealId: string;
  consentWordingId: string;
  declarationWordingId: string;
};

const oneId = async (rows: Promise<{ id: string }[]>): Promise<string> => {
  const [row] = await rows;
  if (!row) throw new Error('no row was written');
  return row.id;
};

async function addPart(
  db: Db,
  campaignId: string,
  slug: string,
  name: string,
  order: number,
): Promise<string> {
  return oneId(
    db('parts')
      .insert({
        campaign_id: campaignId,
        slug,
        name,
        building_order: order,
        cost_pence: 4_200_000,
        bottom_mm: order * 3600,
        top_mm: (order + 1) * 3600,
      })
      .returning<{ id: string }[]>('id'),
  );
}

async function addWordings(db: Db, at: Date) {
  const add = (kind: string, words: string) =>
    oneId(db('wordings').insert({ kind, version: 3, words, from_at: at }).returning<{ id: string }[]>('id'));
  return {
    consentWordingId: await add('consent', 'May we write to you?'),
    declarationWordingId: await add('declaration', 'I am a taxpayer and understand the rule.'),
  };
}

export async function addWorld(db: Db): Promise<World> {
  const at = new Date('2026-01-01T09:00:00Z');
  await db('society').insert({
    name: 'Brackenhythe Heritage Society',
    address_line: '1 Hythe Green, Brackenhythe',
    phone: '01632 960100',
    email: 'post@brackenhythe.example',
    charity_number: '0000000',
    registration_statement: 'A charity',
    complaints: 'Write to the chair.',
    gift_aid_recognised_on: '2025-01-01',
    gift_aid_reference: 'XX00000',
  });
  const fundId = await oneId(
    db('funds')
      .insert({ slug: 'figure', name: 'The figure', restriction: 'restricted', purpose: 'To build her' })
      .returning<{ id: string }[]>('id'),
  );
  const campaignId = await oneId(
    db('campaigns')
      .insert({
        slug: 'lampwoman',
        name: 'The Lampwoman',
        lead: 'A figure',
        place: 'Hythe Green',
        goal_pence: 8_400_000,
        fund_id: fundId,
        published_at: at,
      })
      .returning<{ id: string }[]>('id'),
  );
  const partIds = {
    footing: await addPart(db, campaignId, 'footing', 'Footing', 0),
    lantern: await addPart(db, campaignId, 'lantern', 'Lantern', 1),
  };
  const appealId = await oneId(
    db('appeal_wordings')
      .insert({
        campaign_id: campaignId,
        version: 2,
        purpose: 'To raise her',
        on_shortfall: 'We build lower',
        on_surplus: 'We keep her',
        part_choice: 'wish',
        from_at: at,
      })
      .returning<{ id: string }[]>('id'),
  );
  return { fundId, partIds, appealId, ...(await addWordings(db, at)) };
}

export type GiftWish = {
  at?: Date;
  sumPence?: Pence;
  name?: string;
  email?: string;
  nameShown?: 'wall' | 'not-public' | 'treasurer-only';
  isSupporterWithheld?: boolean;
  part?: keyof World['partIds'];
  isDeclared?: boolean;
  thanks?: string | null;
  words?: {
    kind: 'wall-name' | 'memory' | 'honour' | 'message';
    words: string;
    contactEmail?: string;
    contactName?: string;
    mayTellSum?: boolean;
  }[];
};
export type AddedGift = {
  id: string;
  number: number;
  intentId: string;
  supporterId: string;
  wordIds: string[];
  mailId: string | null;
  paymentIntentId: string;
  sessionId: string;
  receiptToken: string;
};

const ADDRESS = { address_line1: '14 Sluice Row', town: 'Brackenhythe', postcode: 'BK4 7HY', country: 'GB' };

async function addGiver(
  db: Db,
  world: World,
  wish: Required<Pick<GiftWish, 'at' | 'name' | 'email'>> & GiftWish,
  intentId: string,
) {
  const supporterId = await oneId(
    db('supporters')
      .insert({
        name: wish.name,
        greeting: 'Judith',
        email: wish.email,
        phone: '01632 960417',
        ...ADDRESS,
        is_name_withheld: wish.isSupporterWithheld ?? false,
        created_at: wish.at,
      })
      .returning<{ id: string }[]>('id'),
  );
  await db('consents').insert(
    ['email', 'post', 'phone'].map((channel) => ({
      supporter_id: supporterId,
      channel,
      is_given: channel === 'email',
      wording_id: world.consentWordingId,
      source_kind: 'gift-intent',
      source_id: intentId,
      recorded_at: wish.at,
    })),
  );
  const declarationId = wish.isDeclared
    ? await oneId(
        db('declarations')
          .insert({
            supporter_id: supporterId,
            wording_id: world.declarationWordingId,
            full_name: wish.name,
            ...ADDRESS,
            covers: 'past-present-future',
            is_own_money: true,
            given_at: wish.at,
            source_kind: 'gift-intent',
            source_id: intentId,
          })
          .returning<{ id: string }[]>('id'),
      )
    : null;
  return { supporterId, declarationId };
}

/** The answers that the sheet keeps, as far as letters read them. */
const answersOf = (wish: GiftWish & { name: string; email: string }) => ({
  amount: '20',
  other: '',
  towards: 'whole',
  dedication: 'none',
  dedicationName: '',
  contactName: '',
  contactEmail: '',
  contactSum: '',
  wall: wish.nameShown ?? 'not-public',
  wallWords: '',
  name: wish.name,
  greeting: 'Judith',
  email: wish.email,
  address1: '',
  address2: '',
  town: '',
  postcode: '',
  country: 'GB',
  phone: '',
  declare: '',
  byEmail: '',
  byPost: '',
  byPhone: '',
  message: '',
});

export async function addMail(
  db: Db,
  mail: {
    subjectId: string;
    kind?: string;
    subjectKind?: string;
    state?: string;
    toName?: string;
    at: Date;
    tries?: number;
    address?: string;
    more?: string;
  },
): Promise<string> {
  const id = randomUUID();
  const toName = mail.toName ?? 'Judith Hargreaves';
  await db('mail_outbox').insert({
    id,
    message_id: `<${id}@brackenhythe.example>`,
    kind: mail.kind ?? 'gift-thanks',
    subject_kind: mail.subjectKind ?? 'gift',
    subject_id: mail.subjectId,
    to_name: toName,
    to_address: mail.address ?? 'judith@sluice.example',
    subject: `Thank you, ${toName}`,
    html: `<p>Dear ${toName}</p>`,
    plain: `Dear ${toName},\n\nThank you.\n\n${mail.more ?? ''}`,
    state: mail.state ?? 'sent',
    tries: mail.tries ?? 1,
    sent_at: mail.state === undefined || mail.state === 'sent' ? mail.at : null,
    response: mail.state === 'queued' ? null : '250 taken for judith@sluice.example',
    created_at: mail.at,
  });
  return id;
}

async function addIntent(
  db: Db,
  world: World,
  wish: GiftWish & { at: Date; name: string; email: string; sumPence: Pence },
) {
  const sessionId = `cs_test_${randomUUID()}`;
  const partId = wish.part ? world.partIds[wish.part] : null;
  const id = await oneId(
    db('gift_intents')
      .insert({
        amount_pence: wish.sumPence,
        part_id: partId,
        appeal_wording_id: world.appealId,
        consent_wording_id: world.consentWordingId,
        answers: JSON.stringify(answersOf(wish)),
        state: 'paid',
        session_id: sessionId,
        created_at: wish.at,
      })
      .returning<{ id: string }[]>('id'),
  );
  return { id, sessionId, partId };
}

export async function addGift(db: Db, world: World, given: GiftWish = {}): Promise<AddedGift> {
  const wish = {
    at: new Date('2026-05-04T11:00:00Z'),
    name: 'Judith Hargreaves',
    email: 'judith@sluice.example',
    sumPence: pence(2000),
    ...given,
  };
  const intent = await addIntent(db, world, wish);
  const { supporterId, declarationId } = await addGiver(db, world, wish, intent.id);
  const paymentIntentId = `pi_${randomUUID()}`;
  const receiptToken = randomUUID();
  const [gift] = await db('gifts')
    .insert({
      receipt_token: receiptToken,
      intent_id: intent.id,
      supporter_id: supporterId,
      appeal_wording_id: world.appealId,
      fund_id: world.fundId,
      method: 'card',
      amount_pence: wish.sumPence,
      part_id: intent.partId,
      declaration_id: declarationId,
      name_shown: wish.nameShown ?? 'not-public',
      session_id: intent.sessionId,
      payment_intent_id: paymentIntentId,
      charge_id: `ch_${randomUUID()}`,
      received_at: wish.at,
      received_on: dayOf(wish.at),
    })
    .returning<{ id: string; number: number }[]>(['id', 'number']);
  if (!gift) throw new Error('no gift was written');
  await db('gift_shares').insert({
    gift_id: gift.id,
    part_id: intent.partId,
    fund_id: world.fundId,
    amount_pence: wish.sumPence,
  });
  await db.transaction((trx) =>
    postGiftReceived(trx, { giftId: gift.id, at: wish.at, recordedAt: wish.at }, [
      { fundId: world.fundId, amountPence: wish.sumPence },
    ]),
  );
  const wordIds: string[] = [];
  for (const one of wish.words ?? [])
    wordIds.push(
      await oneId(
        db('public_words')
          .insert({
            gift_id: gift.id,
            kind: one.kind,
            words: one.words,
            contact_name: one.contactName ?? null,
            contact_email: one.contactEmail ?? null,
            may_tell_sum: one.mayTellSum ?? false,
            written_at: wish.at,
          })
          .returning<{ id: string }[]>('id'),
      ),
    );
  const mailId =
    wish.thanks === null
      ? null
      : await addMail(db, {
          subjectId: gift.id,
          state: wish.thanks ?? 'sent',
          toName: wish.name,
          at: wish.at,
          address: wish.email,
          more: `Your receipt: https://lampwoman.example/receipts/${receiptToken}`,
        });
  return {
    ...gift,
    intentId: intent.id,
    supporterId,
    wordIds,
    mailId,
    paymentIntentId,
    sessionId: intent.sessionId,
    receiptToken,
  };
}
