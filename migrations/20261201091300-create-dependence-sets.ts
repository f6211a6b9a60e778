import type { QueryInterface } from "sequelize";

/**
 * Named answers to how reservoirs move together; exactly one of them is what totals stand on unless a page says
 * otherwise. The rank correlation that each basin carried becomes the first default. A basin that was at 1, where no
 * trial of one reservoir could differ from another's, comes to 0.99, the most a set takes, and its note says so.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table dependence_sets (
      id uuid primary key default gen_random_uuid(),
      name text not null check (btrim(name) <> ''),
      note text not null default '',
      is_default boolean not null default false,
      dependence jsonb not null check (jsonb_typeof(dependence) = 'object'),
      updated_by uuid references users (id),
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now()
    );
    create unique index dependence_sets_name_unique on dependence_sets (lower(name));
    create unique index dependence_sets_one_default on dependence_sets (is_default) where is_default;

    insert into dependence_sets (name, note, is_default, dependence)
    select case when max(rank_correlation) > 0 then 'By basin' else 'Independent' end,
           case when max(rank_correlation) > 0.99
                then 'A basin at 1 was brought to 0.99, the most that a set takes.' else '' end,
           true,
           jsonb_build_object(
             'portfolioRank', 0,
             'basinRanks', coalesce(
               jsonb_object_agg(id::text, least(rank_correlation, 0.99))
                 filter (where rank_correlation > 0), '{}'::jsonb),
             'otherBasinsRank', 0,
             'sharedFactors', '[]'::jsonb)
      from basins;

    alter table basins drop column rank_correlation;
  `);
}

/** The default set's ranks go back to the basins; other sets, and whatever reaches beyond a basin, have no place there. */
export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    alter table basins add column rank_correlation double precision not null default 0
      check (rank_correlation between 0 and 1);
    update basins b
       set rank_correlation = coalesce(
             (s.dependence #>> array['basinRanks', b.id::text])::double precision,
             (s.dependence ->> 'otherBasinsRank')::double precision)
      from dependence_sets s
     where s.is_default;
    drop table dependence_sets;
  `);
}
