import type { QueryInterface } from "sequelize";

/**
 * The sheet is kept whole as the laboratory wrote it; the columns beside it are what people filter, sort and compare
 * by, computed from the sheet when it is saved.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table fluid_samples (
      id uuid primary key default gen_random_uuid(),
      reservoir_id uuid not null references reservoirs (id),
      name text not null check (btrim(name) <> ''),
      sampled_on date not null,
      laboratory text not null default '',
      separator_test jsonb not null,
      condensate_api double precision not null,
      gas_oil_ratio_scf_per_stb double precision not null check (gas_oil_ratio_scf_per_stb > 0),
      condensate_yield_stb_per_mmscf double precision not null
        check (condensate_yield_stb_per_mmscf > 0),
      wellstream_gravity double precision not null check (wellstream_gravity > 0),
      hydrogen_sulphide double precision not null check (hydrogen_sulphide between 0 and 1),
      dew_point_psia double precision check (dew_point_psia > 0),
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now()
    );
    create unique index fluid_samples_name_unique on fluid_samples (reservoir_id, lower(name));
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`drop table fluid_samples;`);
}
