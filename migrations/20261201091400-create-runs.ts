import type { QueryInterface } from "sequelize";

/**
 * Long work: a run and its items, one an estimate. Each claim of an item has an id of its own, which stands for as long
 * as the item is the claimant's; a worker whose claim is gone stores nothing. Items have no foreign key to their
 * estimate, because a draft may be discarded and its run still tells what became of it.
 *
 * What imports kept of their runs in their reports becomes runs as well; those that were under way go on.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table runs (
      id uuid primary key default gen_random_uuid(),
      kind text not null check (kind in ('recalculation', 'untilSettled', 'import')),
      state text not null default 'waiting'
        check (state in ('waiting', 'running', 'finished', 'cancelled')),
      title text not null check (btrim(title) <> ''),
      options jsonb not null default '{}',
      import_id uuid references imports (id),
      created_by uuid not null references users (id),
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      started_at timestamptz,
      finished_at timestamptz,
      version integer not null default 1,
      constraint runs_one_per_import unique (import_id),
      constraint runs_import_known check ((kind = 'import') = (import_id is not null)),
      constraint runs_started_whole check (state <> 'running' or started_at is not null),
      constraint runs_finished_whole check (
        (state in ('finished', 'cancelled')) = (finished_at is not null))
    );
    create index runs_created_at on runs (created_at desc);
    create index runs_unfinished on runs (created_at) where state in ('waiting', 'running');

    create table run_items (
      run_id uuid not null references runs (id) on delete cascade,
      position integer not null check (position > 0),
      estimate_id uuid not null,
      estimate_version integer not null,
      revision integer not null,
      reservoir_id uuid not null references reservoirs (id),
      state text not null default 'waiting'
        check (state in ('waiting', 'running', 'done', 'failed', 'passedOver')),
      attempts integer not null default 0 check (attempts >= 0),
      worker text,
      claim_id uuid,
      leased_until timestamptz,
      progress jsonb,
      outcome jsonb,
      reason text,
      finished_at timestamptz,
      primary key (run_id, position),
      constraint run_items_estimate_once unique (run_id, estimate_id),
      constraint run_items_leased_whole check (
        (state = 'running') = (leased_until is not null)
        and (state = 'running') = (claim_id is not null)
        and (state <> 'running' or worker is not null)),
      constraint run_items_finished_whole check (
        (state in ('done', 'failed', 'passedOver')) = (finished_at is not null)),
      constraint run_items_reason_given check (
        (state in ('failed', 'passedOver')) = (reason is not null)),
      constraint run_items_outcome_of_done check (state = 'done' or outcome is null)
    );
    create index run_items_open on run_items (run_id, position)
      where state in ('waiting', 'running');
    create unique index run_items_claimed on run_items (claim_id) where claim_id is not null;

    insert into runs (kind, state, title, import_id, created_by, created_at, updated_at, finished_at)
      select 'import', case state when 'applying' then 'waiting' else 'finished' end,
        'Import of ' || file_name, id, created_by, created_at, updated_at,
        case state when 'applying' then null else updated_at end
      from imports
      where state in ('applying', 'applied')
        and jsonb_path_exists(report, '$.rows[*].estimateId ? (@ != null)');

    insert into run_items (run_id, position, estimate_id, estimate_version, revision, reservoir_id,
        state, reason, finished_at)
      select runs.id, row_number() over (partition by runs.id order by named.line),
        estimates.id, estimates.version, estimates.revision, estimates.reservoir_id, became.state,
        case became.state when 'failed' then imports.report #>> array['failedRuns', named.estimate] end,
        case became.state when 'waiting' then null else runs.updated_at end
      from runs
      join imports on imports.id = runs.import_id
      cross join lateral (
        select line.value ->> 'estimateId' as estimate, min(line.ordinality) as line
        from jsonb_array_elements(imports.report -> 'rows') with ordinality as line
        where line.value ->> 'estimateId' is not null
        group by 1
      ) as named
      join estimates on estimates.id::text = named.estimate
      cross join lateral (
        select case
          when imports.report -> 'failedRuns' ? named.estimate then 'failed'
          when runs.state = 'finished' or estimates.computed_at is not null then 'done'
          else 'waiting' end as state
      ) as became;

    update imports set report = report - 'failedRuns' where report is not null;
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    update imports set report = report || jsonb_build_object('failedRuns', coalesce((
      select jsonb_object_agg(run_items.estimate_id, run_items.reason)
      from run_items join runs on runs.id = run_items.run_id
      where runs.import_id = imports.id and run_items.state = 'failed'), '{}'))
    where report is not null;
    drop table run_items;
    drop table runs;
  `);
}
