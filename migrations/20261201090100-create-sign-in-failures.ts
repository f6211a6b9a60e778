import type { QueryInterface } from "sequelize";

/**
 * Failed sign-ins, counted in the database rather than in memory so that a limit holds across web processes and
 * restarts. `subject` is a digest of an address, a network address or both; neither is kept in the clear.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table sign_in_failures (
      subject text primary key,
      failures integer not null check (failures > 0),
      window_started_at timestamptz not null
    );
    create index sign_in_failures_window on sign_in_failures (window_started_at);
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`drop table sign_in_failures;`);
}
