import type { QueryInterface } from "sequelize";

/**
 * Where the reservoirs lie and what share of them is the company's. A basin carries the rank correlation its
 * reservoirs share, because a regional trap, seal or charge question moves them together.
 * The pairs of class and sub-class are those of PRMS 2018, table 1.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table basins (
      id uuid primary key default gen_random_uuid(),
      slug text not null constraint basins_slug_unique unique
        check (slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$'),
      name text not null check (btrim(name) <> ''),
      rank_correlation double precision not null default 0 check (rank_correlation between 0 and 1),
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now()
    );
    create unique index basins_name_unique on basins (lower(name));

    create table fields (
      id uuid primary key default gen_random_uuid(),
      slug text not null constraint fields_slug_unique unique
        check (slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$'),
      name text not null check (btrim(name) <> ''),
      basin_id uuid not null references basins (id),
      operator text not null check (btrim(operator) <> ''),
      latitude double precision check (latitude between -90 and 90),
      longitude double precision check (longitude between -180 and 180),
      water_depth_ft double precision check (water_depth_ft >= 0),
      working_interest double precision not null check (working_interest between 0 and 1),
      net_revenue_interest double precision not null check (net_revenue_interest between 0 and 1),
      prms_class text not null,
      prms_sub_class text not null,
      chance_of_commerciality double precision not null
        check (chance_of_commerciality between 0 and 1),
      responsible_engineer_id uuid references users (id),
      notes text not null default '',
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      constraint fields_location_whole check ((latitude is null) = (longitude is null)),
      constraint fields_prms_pair check (
        (prms_class = 'reserves' and prms_sub_class in
          ('on_production', 'approved_for_development', 'justified_for_development'))
        or (prms_class = 'contingent' and prms_sub_class in
          ('development_pending', 'development_on_hold', 'development_unclarified',
           'development_not_viable'))
        or (prms_class = 'prospective' and prms_sub_class in ('prospect', 'lead', 'play'))
      )
    );
    create unique index fields_name_unique on fields (lower(name));
    create index fields_basin_id on fields (basin_id);
    create index fields_responsible_engineer_id on fields (responsible_engineer_id);

    create table reservoirs (
      id uuid primary key default gen_random_uuid(),
      field_id uuid not null references fields (id),
      slug text not null check (slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$'),
      name text not null check (btrim(name) <> ''),
      depth_ft double precision check (depth_ft > 0),
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now(),
      constraint reservoirs_slug_unique unique (field_id, slug)
    );
    create unique index reservoirs_name_unique on reservoirs (field_id, lower(name));
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`drop table reservoirs; drop table fields; drop table basins;`);
}
