import type { QueryInterface } from "sequelize";

/**
 * The trials of a revision, one column a quantity, little-endian float32. They are kept so that a total never has to
 * run an engine that has moved on. Stored out of line and uncompressed: sampled floats do not compress, and a roll-up
 * reads one column of many revisions without touching the others.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table estimate_trials (
      estimate_id uuid primary key references estimates (id) on delete cascade,
      trials integer not null check (trials > 0),
      wet_gas_in_place_scf bytea not null,
      dry_gas_in_place_scf bytea not null,
      condensate_in_place_stb bytea not null,
      sales_gas_scf bytea not null,
      condensate_recoverable_stb bytea not null,
      constraint estimate_trials_lengths check (
        octet_length(wet_gas_in_place_scf) = 4 * trials
        and octet_length(dry_gas_in_place_scf) = 4 * trials
        and octet_length(condensate_in_place_stb) = 4 * trials
        and octet_length(sales_gas_scf) = 4 * trials
        and octet_length(condensate_recoverable_stb) = 4 * trials)
    );
    alter table estimate_trials
      alter column wet_gas_in_place_scf set storage external,
      alter column dry_gas_in_place_scf set storage external,
      alter column condensate_in_place_stb set storage external,
      alter column sales_gas_scf set storage external,
      alter column condensate_recoverable_stb set storage external;
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`drop table estimate_trials;`);
}
