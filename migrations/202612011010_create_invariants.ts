// What must always hold, one view each: a row in any of them is a fault. Run nightly and by every money test.
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create schema checks;

    create view checks.entries_balance as
      select e.id::text as id, 'entry does not balance in fund ' || l.fund_id as fault
      from books.entries e join books.lines l on l.entry_id = e.id
      group by e.id, l.fund_id having sum(l.amount_pence) <> 0;

    create view checks.entries_have_lines as
      select e.id::text as id, 'entry has fewer than two lines' as fault
      from books.entries e left join books.lines l on l.entry_id = e.id
      group by e.id having count(l.id) < 2;

    create view checks.trial_balance as
      select fund_id::text as id, 'fund is out by ' || sum(amount_pence) || ' pence' as fault
      from books.lines group by fund_id having sum(amount_pence) <> 0;

    create view checks.gifts_posted_once as
      select g.id::text as id, 'gift has ' || count(e.id) || ' entries of its own' as fault
      from gifts g left join books.entries e on e.source = 'gift' and e.source_id = g.id::text and e.kind = 'received'
      group by g.id having count(e.id) <> 1;

    create view checks.entries_have_gifts as
      select e.id::text as id, 'entry names a gift that does not exist' as fault
      from books.entries e
      where e.source = 'gift' and not exists (select 1 from gifts g where g.id::text = e.source_id);

    create view checks.gift_amounts as
      select g.id::text as id, 'gift and its income differ' as fault
      from gifts g
      left join books.entries e on e.source = 'gift' and e.source_id = g.id::text and e.kind = 'received'
      left join books.lines l on l.entry_id = e.id and l.account_code like 'income:gifts:%'
      group by g.id having coalesce(sum(l.amount_pence), 0) <> -g.amount_pence;

    create view checks.gift_shares_sum as
      select g.id::text as id, 'shares do not add up to the gift' as fault
      from gifts g left join gift_shares s on s.gift_id = g.id
      group by g.id having coalesce(sum(s.amount_pence), 0) <> g.amount_pence;

    create view checks.shown_total as
      select 'given' as id, 'the total shown and the income in the books differ' as fault
      where (select coalesce(sum(amount_pence), 0) from gifts)
        <> (select -coalesce(sum(amount_pence), 0) from books.lines
            where account_code like 'income:gifts:%' or account_code = 'refunds:gifts');

    create view checks.income_by_fund as
      select f.id::text as id, 'the income of the fund and the shares of gifts in it differ' as fault
      from funds f
      left join (select fund_id, sum(amount_pence) as pence from gift_shares group by fund_id) s on s.fund_id = f.id
      left join (
        select fund_id, -sum(amount_pence) as pence from books.lines where account_code like 'income:gifts:%' group by fund_id
      ) l on l.fund_id = f.id
      where coalesce(s.pence, 0) <> coalesce(l.pence, 0);

    create view checks.fees_posted as
      select g.id::text as id, 'the fee on the gift and in the books differ' as fault
      from gifts g
      left join books.entries e on e.source = 'gift' and e.source_id = g.id::text and e.kind = 'card-fee'
      left join books.lines l on l.entry_id = e.id and l.account_code = 'expense:card-fees'
      where g.fee_posted_at is not null
      group by g.id having coalesce(sum(l.amount_pence), 0) <> g.fee_pence;

    create view checks.paid_intents_have_gifts as
      -- Never the intent's own id: it opens what the giver was told.
      select coalesce(i.session_id, 'no card page') as id, 'intent is paid but has no gift' as fault
      from gift_intents i where i.state = 'paid' and not exists (select 1 from gifts g where g.intent_id = i.id);

    create view checks.parts_not_overfilled as
      select p.id::text as id, 'more is meant for the part than it needs' as fault
      from parts p join gift_shares s on s.part_id = p.id
      group by p.id
      having sum(s.amount_pence) > greatest(0, p.cost_pence
        - (select coalesce(sum(k.amount_pence), 0) from in_kind_shares k where k.part_id = p.id));

    create view checks.gifts_thanked as
      select g.id::text as id, 'gift has no thank-you in the outbox' as fault
      from gifts g
      where not exists (
        select 1 from mail_outbox m where m.kind = 'gift-thanks' and m.subject_kind = 'gift' and m.subject_id = g.id::text
      );

    -- By the clock of the machine. One received "later" than now, by a clock set forward, is left alone.
    create view checks.events_worked as
      select e.id, 'event has waited longer than an hour' as fault
      from payment_events e
      where e.state = 'waiting' and e.received_at < now() - interval '1 hour';

    create view checks.rounding_is_nothing as
      select 'rounding' as id, 'the rounding account holds money' as fault
      from books.lines where account_code = 'rounding' having sum(amount_pence) <> 0;

    create view checks.published_goal as
      select c.id::text as id, 'the goal is not the sum of the costs' as fault
      from campaigns c join parts p on p.campaign_id = c.id
      where c.published_at is not null
      group by c.id having sum(p.cost_pence) <> c.goal_pence;
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop schema checks cascade;`);
}
