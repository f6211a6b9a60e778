import type { QueryInterface } from "sequelize";

/**
 * One row, so that there is one basis. The standard conditions are recorded beside the name because every volume in
 * the book is stated at them; they cannot be edited while the stored results are in them.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table settings (
      id integer primary key default 1 check (id = 1),
      organisation_name text not null check (btrim(organisation_name) <> ''),
      standard_pressure_psia double precision not null default 14.696
        check (standard_pressure_psia between 14 and 16),
      standard_temperature_deg_f double precision not null default 60
        check (standard_temperature_deg_f between 32 and 80),
      version integer not null default 1,
      updated_at timestamptz not null default now()
    );
    insert into settings (organisation_name) values ('Dewledger');
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`drop table settings;`);
}
