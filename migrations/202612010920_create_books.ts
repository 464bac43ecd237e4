// The double-entry books: append-only, and balanced per entry and per fund by the database itself.
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table funds (
      id uuid primary key default gen_random_uuid(),
      slug text not null constraint funds_slug_key unique,
      name text not null,
      restriction text not null check (restriction in ('restricted','unrestricted')),
      purpose text not null
    );

    create schema books;
    create table books.accounts (
      code text primary key,
      name text not null,
      kind text not null check (kind in ('asset','income','expense','contra-income','suspense'))
    );
    create table books.entries (
      id uuid primary key default gen_random_uuid(),
      day date not null,
      recorded_at timestamptz not null,
      source text not null,
      source_id text not null,
      kind text not null,
      constraint entries_source_key unique (source, source_id, kind)
    );
    create index entries_day on books.entries (day);
    create table books.lines (
      id bigint generated always as identity primary key,
      entry_id uuid not null references books.entries,
      account_code text not null references books.accounts,
      fund_id uuid not null references public.funds,
      -- Debit is positive, credit negative.
      amount_pence bigint not null constraint lines_amount_not_zero check (amount_pence <> 0)
    );
    create index lines_entry on books.lines (entry_id);
    create index lines_account on books.lines (account_code, fund_id);

    create function books.refuse_change() returns trigger language plpgsql as $$
    begin
      raise exception 'the books are never changed or cut: post a new entry' using errcode = '23514', constraint = 'append_only';
    end $$;
    create trigger entries_append_only before update or delete on books.entries for each row execute function books.refuse_change();
    create trigger lines_append_only before update or delete on books.lines for each row execute function books.refuse_change();
    create trigger entries_no_truncate before truncate on books.entries for each statement execute function books.refuse_change();
    create trigger lines_no_truncate before truncate on books.lines for each statement execute function books.refuse_change();

    create function books.check_entry() returns trigger language plpgsql as $$
    declare
      wanted uuid;
    begin
      -- Two statements: a single expression would look for both columns in either table.
      if tg_table_name = 'entries' then wanted := new.id; else wanted := new.entry_id; end if;
      if (select count(*) from books.lines where entry_id = wanted) < 2 then
        raise exception 'entry % has fewer than two lines', wanted using errcode = '23514', constraint = 'entry_has_lines';
      end if;
      if exists (select 1 from books.lines where entry_id = wanted group by fund_id having sum(amount_pence) <> 0) then
        raise exception 'entry % does not balance in each of its funds', wanted using errcode = '23514', constraint = 'entry_balances';
      end if;
      return null;
    end $$;
    -- Two triggers: a check on the lines alone never fires for an entry that has none.
    create constraint trigger entries_balanced after insert on books.entries
      deferrable initially deferred for each row execute function books.check_entry();
    create constraint trigger lines_balanced after insert on books.lines
      deferrable initially deferred for each row execute function books.check_entry();

    insert into books.accounts (code, name, kind) values
      ('bank:current', 'Current account', 'asset'),
      ('cash:in-hand', 'Cash in hand', 'asset'),
      ('cheques:undeposited', 'Cheques not yet banked', 'asset'),
      ('card:pending', 'Card service, not yet available', 'asset'),
      ('card:available', 'Card service, available', 'asset'),
      ('card:in-transit', 'Card service, on its way to the bank', 'asset'),
      ('disputes:held', 'Held back in disputes', 'asset'),
      ('income:gifts:card', 'Gifts by card', 'income'),
      ('refunds:gifts', 'Gifts given back', 'contra-income'),
      ('expense:card-fees', 'Card fees', 'expense'),
      ('expense:dispute-fees', 'Dispute fees', 'expense'),
      ('suspense:unpegged', 'Not yet pegged', 'suspense'),
      ('rounding', 'Rounding, always nothing', 'suspense');
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop schema books cascade; drop table funds;`);
}
