// Who may sign in, their sessions, the slowing of guesses, and the audit trail that nobody can alter.
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table accounts (
      id uuid primary key default gen_random_uuid(),
      name text not null check (length(name) between 1 and 200),
      email text not null check (length(email) <= 254),
      password_hash text not null,
      roles text[] not null check (roles <@ array['chair','treasurer','secretary','site','schools','examiner']),
      is_trustee boolean not null default false,
      is_demonstration boolean not null default false,
      totp_secret text,
      totp_confirmed_at timestamptz,
      totp_last_step bigint,
      switched_off_at timestamptz,
      created_at timestamptz not null
    );
    create unique index accounts_email_key on accounts (lower(email));

    create table recovery_codes (
      id bigint generated always as identity primary key,
      account_id uuid not null references accounts,
      code_hash text not null,
      used_at timestamptz,
      constraint recovery_codes_code_key unique (account_id, code_hash)
    );

    -- The session library's own columns.
    create table sessions (
      sid varchar primary key,
      sess json not null,
      expire timestamptz(6) not null
    );
    create index sessions_expire on sessions (expire);

    -- Counters of tries. Losing them in a crash costs nothing, so the table is not logged.
    create unlogged table rate_limit (
      key varchar(255) primary key,
      points integer not null default 0,
      expire bigint
    );

    create schema audit;
    -- Ids and money only: what a person is called stands in personal_values, which an erasure may clear.
    create table audit.lines (
      id bigint generated always as identity primary key,
      at timestamptz not null,
      actor_kind text not null check (actor_kind in ('desk','giver','system')),
      actor_id uuid,
      action text not null,
      object_kind text not null,
      object_id text not null,
      detail jsonb not null default '{}',
      request_id text
    );
    create index lines_object on audit.lines (object_kind, object_id);
    create index lines_at on audit.lines (at);

    create table personal_values (
      id bigint generated always as identity primary key,
      audit_line_id bigint not null references audit.lines,
      person_kind text not null check (person_kind in ('supporter','account')),
      person_id uuid not null,
      field text not null,
      before_value text,
      after_value text,
      erased_at timestamptz
    );
    create index personal_values_person on personal_values (person_kind, person_id);

    create function audit.refuse_change() returns trigger language plpgsql as $$
    begin
      raise exception 'a line of the % is never changed or taken away', tg_table_schema using errcode = '23514', constraint = 'append_only';
    end $$;
    create trigger lines_append_only before update or delete on audit.lines for each row execute function audit.refuse_change();
    create trigger lines_no_truncate before truncate on audit.lines for each statement execute function audit.refuse_change();
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop table personal_values;
    drop schema audit cascade;
    drop table rate_limit, sessions, recovery_codes, accounts;
  `);
}
