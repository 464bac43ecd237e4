// People who give: how to reach them, what they agreed to, and their Gift Aid declarations.
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table supporters (
      id uuid primary key default gen_random_uuid(),
      number integer generated always as identity constraint supporters_number_key unique,
      name text not null check (length(name) between 1 and 200),
      greeting text not null,
      email text check (length(email) <= 254),
      phone text,
      address_line1 text,
      address_line2 text,
      town text,
      postcode text,
      country text not null default 'GB',
      -- A giver who asked to be hidden from everybody but the treasurer.
      is_name_withheld boolean not null default false,
      merged_into uuid references supporters,
      erased_at timestamptz,
      created_at timestamptz not null
    );
    create index supporters_email on supporters (lower(email));

    create table consents (
      id bigint generated always as identity primary key,
      supporter_id uuid not null references supporters,
      channel text not null check (channel in ('email','post','phone')),
      is_given boolean not null,
      wording_id uuid not null references wordings,
      source_kind text not null,
      source_id text not null,
      recorded_at timestamptz not null,
      constraint consents_source_key unique (source_kind, source_id, channel)
    );

    create table declarations (
      id uuid primary key default gen_random_uuid(),
      supporter_id uuid not null references supporters,
      wording_id uuid not null references wordings,
      -- The name and home address as declared: a later move never rewrites what was signed.
      full_name text not null,
      address_line1 text not null,
      address_line2 text,
      town text not null,
      postcode text not null,
      country text not null,
      covers text not null check (covers in ('past-present-future','this-gift')),
      is_own_money boolean not null check (is_own_money),
      given_at timestamptz not null,
      cancelled_at timestamptz,
      source_kind text not null,
      source_id text not null,
      constraint declarations_source_key unique (source_kind, source_id)
    );
    create index declarations_supporter on declarations (supporter_id);
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table declarations, consents, supporters;`);
}
