// What a giver wrote with a gift and who read it, and the letters that went out for it.
import { z } from 'zod';
import { MAIL_STATES, TRIES_TO_TELL } from '#shared/mail-states.ts';
import { VERDICTS, WORDS_KINDS, type GiftMail, type GiftWords } from '#shared/giving/desk-schemas.ts';
import { NAME_WITHHELD } from '#shared/roles.ts';
import { queryRows, type Db } from '#server/platform/db.ts';
import type { GiftHead } from './gift-chain-reads.ts';
import { allUnlessWithheld, mayAct, type Reader } from './withheld-names.ts';

const wordsSchema = z.object({
  id: z.uuid(),
  kind: z.enum(WORDS_KINDS),
  words: z.string().nullable(),
  contact_name: z.string().nullable(),
  contact_email: z.string().nullable(),
  has_contact: z.boolean(),
  may_tell_sum: z.boolean(),
  written_at: z.date(),
  read_at: z.date().nullable(),
  read_by: z.string().nullable(),
  verdict: z.enum(VERDICTS).nullable(),
});

/** The words on a hidden gift may themselves name the giver, so they are hidden with the name. */
export async function listGiftWords(db: Db, head: GiftHead, reader: Reader): Promise<GiftWords[]> {
  const personal = allUnlessWithheld(reader, {
    words: 'w.words',
    contact_name: 'w.contact_name',
    contact_email: 'w.contact_email',
  });
  const rows = await queryRows(
    db,
    wordsSchema,
    `select w.id, w.kind, w.contact_email is not null as has_contact, w.may_tell_sum, w.written_at, w.read_at,
       a.name as read_by, w.verdict, ${personal}
     from public_words w
     join gifts g on g.id = w.gift_id
     join supporters s on s.id = g.supporter_id
     left join accounts a on a.id = w.read_by
     where w.gift_id = ? order by w.written_at, w.kind`,
    [head.id],
  );
  return rows.map((row) => ({
    id: row.id,
    kind: row.kind,
    words: row.words,
    contactName: row.contact_name,
    contactEmail: row.contact_email,
    hasContact: row.has_contact,
    mayTellSum: row.may_tell_sum,
    writtenAt: row.written_at.toISOString(),
    readAt: row.read_at?.toISOString() ?? null,
    readBy: row.read_by,
    verdict: row.verdict,
    mayJudge: row.verdict === null && mayAct(reader, head.is_withheld),
  }));
}

const mailSchema = z.object({
  id: z.uuid(),
  kind: z.string(),
  state: z.enum(MAIL_STATES),
  created_at: z.date(),
  sent_at: z.date().nullable(),
  tries: z.int(),
  settled_by: z.string().nullable(),
  to_name: z.string().nullable(),
  to_address: z.string().nullable(),
  subject: z.string().nullable(),
  plain: z.string().nullable(),
  answer: z.string().nullable(),
});

const isOpen = (row: { state: string; tries: number; settled_by: string | null }): boolean =>
  row.settled_by === null &&
  (['hard_failed', 'uncertain'].includes(row.state) ||
    (row.state === 'soft_failed' && row.tries >= TRIES_TO_TELL));

/** Letters about the gift itself and about the words given with it. */
export async function listGiftMails(db: Db, head: GiftHead, reader: Reader): Promise<GiftMail[]> {
  const personal = allUnlessWithheld(reader, {
    to_name: 'm.to_name',
    to_address: 'm.to_address',
    subject: 'm.subject',
    // The key in the receipt's address is the giver's alone.
    plain: `replace(m.plain, g.receipt_token, '…')`,
    answer: 'm.response',
  });
  const rows = await queryRows(
    db,
    mailSchema,
    `select m.id, m.kind, m.state, m.created_at, m.sent_at, m.tries, a.name as settled_by, ${personal}
     from gifts g
     join supporters s on s.id = g.supporter_id
     join mail_outbox m on m.subject_id = g.id::text
       or m.subject_id in (select w.id::text from public_words w where w.gift_id = g.id)
     left join accounts a on a.id = m.settled_by
     where g.id = ? order by m.created_at, m.id`,
    [head.id],
  );
  return rows.map((row) => ({
    id: row.id,
    kind: row.kind,
    state: row.state,
    createdAt: row.created_at.toISOString(),
    sentAt: row.sent_at?.toISOString() ?? null,
    tries: row.tries,
    toName: row.to_name ?? NAME_WITHHELD,
    toAddress: row.to_address,
    subject: row.subject,
    plain: row.plain,
    answer: row.answer,
    settledBy: row.settled_by,
    maySettle: isOpen(row) && mayAct(reader, head.is_withheld),
  }));
}
