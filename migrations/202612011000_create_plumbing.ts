// The mail outbox, the nightly checks' results and the worker's sign of life.
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    -- One row a message and recipient, written in the transaction of what it tells of.
    create table mail_outbox (
      id uuid primary key default gen_random_uuid(),
      message_id text not null constraint mail_outbox_message_key unique,
      kind text not null,
      subject_kind text not null,
      subject_id text not null,
      to_name text not null,
      to_address text not null,
      subject text not null,
      html text not null,
      plain text not null,
      state text not null default 'queued' check (
        state in ('queued','claimed','handing_over','sent','soft_failed','hard_failed','suppressed','uncertain')
      ),
      tries integer not null default 0,
      lease_until timestamptz,
      next_try_at timestamptz,
      handing_over_at timestamptz,
      sent_at timestamptz,
      response text,
      settled_by uuid references accounts,
      created_at timestamptz not null,
      constraint mail_outbox_subject_key unique (kind, subject_kind, subject_id)
    );
    create index mail_outbox_due on mail_outbox (created_at)
      where state in ('queued','claimed','handing_over','soft_failed');
    create index mail_outbox_owed on mail_outbox (created_at) where state in ('hard_failed','uncertain','soft_failed');

    create table check_runs (
      id bigint generated always as identity primary key,
      ran_at timestamptz not null,
      name text not null,
      faults integer not null,
      detail jsonb not null default '[]'
    );
    create index check_runs_name on check_runs (name, ran_at desc);

    create table worker_beats (
      name text primary key,
      beat_at timestamptz not null
    );
  `);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop table worker_beats, check_runs, mail_outbox;`);
}
