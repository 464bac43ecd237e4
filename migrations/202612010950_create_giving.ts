// Giving: drafts, intents to give, gifts and how each was shared out, and what the payment service told us.
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table give_drafts (
      id uuid primary key default gen_random_uuid(),
      token_hash text not null constraint give_drafts_token_key unique,
      -- What was typed, field by field, right or wrong, so that nothing typed is ever lost.
      answers jsonb not null default '{}',
      is_complete boolean not null default false,
      begun_at timestamptz not null,
      updated_at timestamptz not null
    );
    create index give_drafts_updated on give_drafts (updated_at);

    create table gift_intents (
      id uuid primary key default gen_random_uuid(),
      draft_id uuid references give_drafts on delete set null,
      amount_pence bigint not null check (amount_pence >= 30 and amount_pence <= 9999999),
      currency text not null default 'gbp' check (currency = 'gbp'),
      part_id uuid references parts,
      appeal_wording_id uuid not null references appeal_wordings,
      declaration_wording_id uuid references wordings,
      consent_wording_id uuid not null references wordings,
      answers jsonb not null,
      state text not null default 'started'
        check (state in ('started','asked','confirming','paid','expired','failed','mismatched')),
      session_id text constraint gift_intents_session_key unique,
      session_url text,
      session_expires_at timestamptz,
      last_fault text,
      checked_at timestamptz,
      created_at timestamptz not null,
      -- The treasurer looked at a payment that does not agree and says how it was put right.
      settled_at timestamptz,
      settled_by uuid references accounts,
      settled_reason text,
      constraint gift_intents_settled check ((settled_at is null) = (settled_by is null) and (settled_at is null) = (settled_reason is null))
    );
    create index gift_intents_open on gift_intents (created_at) where state in ('started','asked','confirming');

    create table gifts (
      id uuid primary key default gen_random_uuid(),
      number integer generated always as identity constraint gifts_number_key unique,
      receipt_token text not null constraint gifts_receipt_token_key unique,
      intent_id uuid not null constraint gifts_intent_key unique references gift_intents,
      supporter_id uuid not null references supporters,
      appeal_wording_id uuid not null references appeal_wordings,
      fund_id uuid not null references funds,
      method text not null check (method in ('card')),
      amount_pence bigint not null check (amount_pence > 0),
      part_id uuid references parts,
      declaration_id uuid references declarations,
      name_shown text not null check (name_shown in ('wall','not-public','treasurer-only')),
      session_id text not null,
      payment_intent_id text not null constraint gifts_payment_intent_key unique,
      charge_id text,
      balance_transaction_id text,
      fee_pence bigint check (fee_pence >= 0),
      fee_posted_at timestamptz,
      received_at timestamptz not null,
      received_on date not null
    );
    create index gifts_received on gifts (received_at, id);
    create index gifts_supporter on gifts (supporter_id);
    create index gifts_without_fee on gifts (received_at) where fee_posted_at is null;

    -- A gift meant for a part that filled meanwhile is split: the rest is free money (no part).
    create table gift_shares (
      id bigint generated always as identity primary key,
      gift_id uuid not null references gifts,
      part_id uuid references parts,
      fund_id uuid not null references funds,
      amount_pence bigint not null check (amount_pence > 0)
    );
    create unique index gift_shares_one_a_part on gift_shares (gift_id, coalesce(part_id, '00000000-0000-0000-0000-000000000000'));
    create index gift_shares_part on gift_shares (part_id);

    -- Words from the public: read by a person before anybody else sees them.
    create table public_words (
      id uuid primary key default gen_random_uuid(),
      gift_id uuid not null references gifts,
      kind text not null check (kind in ('wall-name','memory','honour','message')),
      words text not null,
      contact_name text,
      contact_email text,
      may_tell_sum boolean not null default false,
      written_at timestamptz not null,
      read_at timestamptz,
      read_by uuid references accounts,
      verdict text check (verdict in ('passed','held')),
      constraint public_words_kind_key unique (gift_id, kind),
      constraint public_words_read check ((read_at is null) = (verdict is null))
    );
    create index public_words_unread on public_words (written_at) where read_at is null;

    -- Inbox of what the payment service told us: kept first, worked later, each once.
    create table payment_events (
      id text primary key,
      type text not null,
      object_kind text not null,
      object_id text not null,
      happened_at timestamptz not null,
      received_at timestamptz not null,
      payload jsonb not null,
      state text not null default 'waiting' check (state in ('waiting','worked','ignored','refused')),
      tries integer not null default 0,
      lease_until timestamptz,
      worked_at timestamptz,
      fault text,
      settled_at timestamptz,
      settled_by uuid references accounts,
      settled_reason text,
      constraint payment_events_settled check ((settled_at is null) = (settled_by is null) and (settled_at is null) = (settled_reason is null))
    );
    create index payment_events_waiting on payment_events (received_at) where state = 'waiting';
    create index payment_events_object on payment_events (object_id);
  `);
  for (const table of ['gifts', 'gift_shares']) {
    await knex.raw(
      `create trigger ${table}_tell after insert or update or delete on ${table} for each statement execute function tell_campaign_changed()`,
    );
  }
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table payment_events, public_words, gift_shares, gifts, gift_intents, give_drafts;`);
}
