import type { QueryInterface } from "sequelize";

/**
 * Composition, depletion table, separators and equation of state of a sample, as one document that is read and written
 * whole. Samples from before have only their separator test, and it was measured.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    alter table fluid_samples
      add column study jsonb not null default '{
        "composition": null,
        "depletion": null,
        "stages": null,
        "characterisation": null,
        "tuning": null,
        "separatorTestOrigin": "measured"
      }';
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`alter table fluid_samples drop column study;`);
}
