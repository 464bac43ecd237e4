// The society's own details, its dated settings, and every wording the public is shown, by version.
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    -- One row: a product for one society.
    create table society (
      is_only boolean primary key default true check (is_only),
      name text not null,
      address_line text not null,
      phone text not null,
      email text not null,
      charity_number text not null,
      registration_statement text not null,
      -- Gift Aid may be offered only once the tax authority has recognised the charity.
      gift_aid_recognised_on date,
      gift_aid_reference text,
      complaints text not null
    );

    -- A setting holds from a day on; the earlier value stays, so that any day can be explained.
    create table settings (
      key text not null,
      from_day date not null,
      value jsonb not null,
      primary key (key, from_day)
    );

    -- Statutory and consent wordings as they were shown; each use keeps the id of what was seen.
    create table wordings (
      id uuid primary key default gen_random_uuid(),
      kind text not null check (kind in ('declaration','consent')),
      version integer not null check (version > 0),
      words text not null,
      from_at timestamptz not null,
      constraint wordings_version_key unique (kind, version)
    );

    create function wordings_keep_words() returns trigger language plpgsql as $$
    begin
      raise exception 'a wording that was shown is kept as it was; add a new version' using errcode = '23514', constraint = 'append_only';
    end $$;
    create trigger wordings_kept before update or delete on wordings for each row execute function wordings_keep_words();
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table wordings, settings, society; drop function wordings_keep_words();`);
}
