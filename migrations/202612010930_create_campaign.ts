// The campaign: its wording by version, the figure and its parts, what is met in kind, and the stages.
import type { Knex } from 'knex';

export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
    create table campaigns (
      id uuid primary key default gen_random_uuid(),
      slug text not null constraint campaigns_slug_key unique,
      name text not null,
      pronoun text not null default 'her',
      lead text not null,
      place text not null,
      -- What common sums buy, told beside the sums.
      what_sums_buy text not null default '',
      goal_pence bigint not null check (goal_pence > 0),
      fund_id uuid not null references funds,
      published_at timestamptz
    );

    create table appeal_wordings (
      id uuid primary key default gen_random_uuid(),
      campaign_id uuid not null references campaigns,
      version integer not null check (version > 0),
      purpose text not null,
      on_shortfall text not null,
      on_surplus text not null,
      -- Whether choosing a part is a wish within the one appeal, or makes the gift a fund of its own.
      part_choice text not null check (part_choice in ('wish','fund')),
      from_at timestamptz not null,
      constraint appeal_wordings_version_key unique (campaign_id, version)
    );
    create function appeal_wordings_keep_words() returns trigger language plpgsql as $$
    begin
      raise exception 'an appeal wording is kept as givers saw it; add a new version' using errcode = '23514', constraint = 'append_only';
    end $$;
    create trigger appeal_wordings_kept before update or delete on appeal_wordings
      for each row execute function appeal_wordings_keep_words();

    create table figures (
      id uuid primary key default gen_random_uuid(),
      campaign_id uuid not null references campaigns,
      version integer not null check (version > 0),
      -- Inner drawing of an elevation: 1 unit is 10 mm, the ground at y = 740.
      drawing text not null,
      published_at timestamptz,
      constraint figures_version_key unique (campaign_id, version)
    );

    create table parts (
      id uuid primary key default gen_random_uuid(),
      campaign_id uuid not null references campaigns,
      slug text not null,
      name text not null,
      building_order integer not null,
      cost_pence bigint not null check (cost_pence > 0),
      -- A cost without height (lifting, insurance, contingency) has neither.
      bottom_mm integer,
      top_mm integer,
      work_state text not null default 'waiting' check (work_state in ('waiting','making','placed')),
      maker text,
      fund_id uuid references funds,
      constraint parts_slug_key unique (campaign_id, slug),
      constraint parts_order_key unique (campaign_id, building_order) deferrable initially deferred,
      constraint parts_height check (
        (bottom_mm is null and top_mm is null) or (bottom_mm >= 0 and top_mm > bottom_mm)
      )
    );

    create table in_kind_shares (
      id uuid primary key default gen_random_uuid(),
      part_id uuid not null references parts,
      firm text not null,
      amount_pence bigint not null check (amount_pence > 0),
      agreed_on date not null
    );

    create table stages (
      id uuid primary key default gen_random_uuid(),
      campaign_id uuid not null references campaigns,
      stage_order integer not null,
      slug text not null,
      name text not null,
      mark text not null check (mark in ('footing','frame','carving','lifting','lighting')),
      expected_on date not null,
      done_on date,
      remark text,
      constraint stages_slug_key unique (campaign_id, slug)
    );
    create table stage_changes (
      id uuid primary key default gen_random_uuid(),
      stage_id uuid not null references stages,
      from_day date not null,
      to_day date not null,
      reason text not null check (length(reason) > 0),
      changed_at timestamptz not null
    );

    -- Every web process hears of a change and draws the public page once more.
    create function tell_campaign_changed() returns trigger language plpgsql as $$
    begin
      perform pg_notify('campaign_changed', '');
      return null;
    end $$;
  `);
  for (const table of [
    'campaigns',
    'appeal_wordings',
    'figures',
    'parts',
    'in_kind_shares',
    'stages',
    'stage_changes',
    'society',
  ]) {
    await knex.raw(
      `create trigger ${table}_tell after insert or update or delete on ${table} for each statement execute function tell_campaign_changed()`,
    );
  }
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
    drop trigger society_tell on society;
    drop table stage_changes, stages, in_kind_shares, parts, figures, appeal_wordings, campaigns;
    drop function appeal_wordings_keep_words(), tell_campaign_changed();
  `);
}
