// The filter of the gifts' list as SQL: one place for the screen, its sums and the CSV.
import type { GiftFilter } from '#shared/giving/desk-schemas.ts';

type Clause = { sql: string; bindings: (string | number)[] };

export const GIFT_TABLES = `
  from gifts g
  join supporters s on s.id = g.supporter_id
  left join parts p on p.id = g.part_id
  left join declarations d on d.id = g.declaration_id
  left join mail_outbox m on m.kind = 'gift-thanks' and m.subject_kind = 'gift' and m.subject_id = g.id::text`;

export const THANKS_SQL = `
  case
    when m.id is null then 'not-written'
    when m.state = 'sent' then 'thanked'
    when m.settled_by is not null then 'left'
    when m.state = 'hard_failed' then 'failed'
    when m.state = 'uncertain' then 'uncertain'
    when m.state = 'soft_failed' then 'trying-again'
    when m.state = 'suppressed' then 'held-back'
    else 'on-its-way'
  end`;

export const IS_DECLARED_SQL = '(d.id is not null and d.cancelled_at is null)';

function towardsClause(towards: string): Clause | undefined {
  if (towards === 'any') return undefined;
  if (towards === 'whole') return { sql: 'g.part_id is null', bindings: [] };
  return { sql: 'p.slug = ?', bindings: [towards] };
}

export function filterClause(filter: GiftFilter): Clause {
  const clauses: (Clause | undefined)[] = [
    towardsClause(filter.towards),
    filter.from === '' ? undefined : { sql: 'g.received_on >= ?', bindings: [filter.from] },
    filter.to === '' ? undefined : { sql: 'g.received_on <= ?', bindings: [filter.to] },
    filter.thanks === 'thanked' ? { sql: `m.state = 'sent'`, bindings: [] } : undefined,
    filter.thanks === 'not-yet-thanked'
      ? { sql: `m.state is distinct from 'sent'`, bindings: [] }
      : undefined,
    filter.words === 'unread'
      ? {
          sql: 'exists (select 1 from public_words w where w.gift_id = g.id and w.read_at is null)',
          bindings: [],
        }
      : undefined,
  ];
  const used = clauses.filter((clause): clause is Clause => clause !== undefined);
  return {
    sql: used.map((clause) => ` and ${clause.sql}`).join(''),
    bindings: used.flatMap((clause) => clause.bindings),
  };
}

/** Number last in each order: no two gifts share a place, so no page can skip or repeat one. */
const ORDERS: Record<GiftFilter['sort'], { columns: readonly string[]; direction: 'asc' | 'desc' }> = {
  newest: { columns: ['received_on', 'received_at', 'number'], direction: 'desc' },
  oldest: { columns: ['received_on', 'received_at', 'number'], direction: 'asc' },
  largest: { columns: ['amount_pence', 'number'], direction: 'desc' },
};

export function orderClause(sort: GiftFilter['sort']): string {
  const { columns, direction } = ORDERS[sort];
  return `order by ${columns.map((column) => `g.${column} ${direction}`).join(', ')}`;
}

/** What comes after the gift with this number in the chosen order. */
export function afterClause(sort: GiftFilter['sort'], after: string): Clause {
  if (after === '') return { sql: '', bindings: [] };
  const { columns, direction } = ORDERS[sort];
  const place = `(${columns.map((column) => `g.${column}`).join(', ')})`;
  const sign = direction === 'desc' ? '<' : '>';
  return {
    sql: ` and ${place} ${sign} (select ${columns.join(', ')} from gifts where number = ?)`,
    bindings: [Number(after)],
  };
}
