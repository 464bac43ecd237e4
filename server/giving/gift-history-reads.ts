// The audit trail of gifts, told in words. It holds ids and money only, so nobody is named but the desk's own people.
import { z } from 'zod';
import type { HistoryLine } from '#shared/giving/desk-schemas.ts';
import { formatPence, penceSchema } from '#shared/money.ts';
import { queryRows, type Db } from '#server/platform/db.ts';

const lineSchema = z.object({
  at: z.date(),
  action: z.string(),
  actor_kind: z.enum(['desk', 'giver', 'system']),
  actor: z.string().nullable(),
  detail: z.record(z.string(), z.unknown()),
  gift_number: z.int().nullable(),
});
type Line = z.output<typeof lineSchema>;

const DEEDS: Record<string, string> = {
  'gift-received': 'Received',
  'gift-posted': 'Posted in the books',
  'gift-fee-posted': 'Card fee posted',
  'card-fee-posted': 'Card fee posted',
  'words-passed': 'Words passed',
  'words-held': 'Words held back',
  'mail-sent-again': 'Letter sent again',
  'mail-left': 'Letter left as it is',
  'payment-looked-at': 'Payment looked at and settled',
  'gifts-exported': 'List of gifts taken out as CSV',
};

/** An action without words of its own reads as it is written: `intent-mismatched` as “Intent mismatched”. */
const deedOf = (action: string): string =>
  DEEDS[action] ?? action.charAt(0).toUpperCase() + action.slice(1).replaceAll('-', ' ');

const moneyOf = (detail: Line['detail']): string[] =>
  Object.entries(detail).flatMap(([key, value]) => {
    const sum = penceSchema.safeParse(value);
    return key.endsWith('Pence') && sum.success ? [formatPence(sum.data)] : [];
  });

const byWhom = (line: Line): string =>
  line.actor_kind === 'desk' ? ` by ${line.actor ?? 'somebody at the desk'}` : '';

const toHistoryLine = (line: Line): HistoryLine => ({
  at: line.at.toISOString(),
  words: `${[deedOf(line.action), ...moneyOf(line.detail)].join(', ')}${byWhom(line)}.`,
  giftNumber: line.gift_number,
});

const LINES = `
  select l.at, l.action, l.actor_kind, a.name as actor, l.detail, g.number as gift_number
  from audit.lines l
  left join accounts a on l.actor_kind = 'desk' and a.id = l.actor_id
  left join public_words w on l.object_kind in ('words', 'public-words') and w.id::text = l.object_id
  left join mail_outbox m on l.object_kind = 'mail' and m.id::text = l.object_id
  left join public_words mw on m.subject_id = mw.id::text
  left join gifts g on g.id = coalesce(w.gift_id, mw.gift_id)
    or (l.object_kind = 'gift' and g.id::text = l.object_id)
    or (l.object_kind in ('gift-intent', 'intent') and g.intent_id::text = l.object_id)
    or (m.subject_kind = 'gift' and g.id::text = m.subject_id)`;

/** Newest first: every audit line about these things. */
export async function listHistoryOf(db: Db, objectIds: readonly string[]): Promise<HistoryLine[]> {
  const lines = await queryRows(db, lineSchema, `${LINES} where l.object_id = any(?) order by l.id desc`, [
    [...objectIds],
  ]);
  return lines.map(toHistoryLine);
}

const GIFT_KINDS = [
  'gift',
  'gift-intent',
  'intent',
  'payment-event',
  'words',
  'public-words',
  'mail',
  'gift-list',
];

/** Newest first: what was done to any gift since a moment. */
export async function listGiftHistory(db: Db, since: Date, limit: number): Promise<HistoryLine[]> {
  const lines = await queryRows(
    db,
    lineSchema,
    `${LINES} where l.at >= ? and l.object_kind = any(?) order by l.at desc, l.id desc limit ?`,
    [since, GIFT_KINDS, limit],
  );
  return lines.map(toHistoryLine);
}
