import type { QueryInterface } from "sequelize";

/**
 * Numbered revisions of a reservoir's inputs with what was computed from them. At most one is approved and at most one
 * is open, so "the estimate" of a reservoir is never a matter of opinion. Who decided is never who wrote or submitted,
 * whatever the program above does.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table estimates (
      id uuid primary key default gen_random_uuid(),
      reservoir_id uuid not null references reservoirs (id),
      revision integer not null check (revision > 0),
      state text not null
        check (state in ('draft', 'submitted', 'approved', 'returned', 'superseded')),
      inputs jsonb not null,
      schema_version integer not null,
      fluid_sample_id uuid references fluid_samples (id),
      seed integer not null check (seed >= 0),
      trials integer not null check (trials between 100 and 1000000),
      engine_version text,
      summary jsonb,
      computed_at timestamptz,
      note text not null default '',
      created_by uuid not null references users (id),
      submitted_by uuid references users (id),
      submitted_at timestamptz,
      decided_by uuid references users (id),
      decided_at timestamptz,
      decision_note text not null default '',
      effective_on date,
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      constraint estimates_revision_unique unique (reservoir_id, revision),
      constraint estimates_computed_whole check (
        (summary is null) = (computed_at is null) and (summary is null) = (engine_version is null)),
      constraint estimates_submitted_computed check (
        state in ('draft', 'returned')
        or (summary is not null and submitted_by is not null and submitted_at is not null)),
      constraint estimates_decided_whole check (
        state not in ('approved', 'superseded', 'returned')
        or (decided_by is not null and decided_at is not null)),
      constraint estimates_effective_when_approved check (
        (state in ('approved', 'superseded')) = (effective_on is not null)),
      constraint estimates_not_own_decision check (
        decided_by is null or (decided_by <> submitted_by and decided_by <> created_by))
    );
    create unique index estimates_one_approved on estimates (reservoir_id)
      where state = 'approved';
    create unique index estimates_one_open on estimates (reservoir_id)
      where state in ('draft', 'submitted', 'returned');
    create index estimates_state on estimates (state, submitted_at);
    create index estimates_fluid_sample_id on estimates (fluid_sample_id);
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`drop table estimates;`);
}
