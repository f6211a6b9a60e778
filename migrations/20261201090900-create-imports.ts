import type { QueryInterface } from "sequelize";

/** What was brought in from a file, and what became of each row. */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table imports (
      id uuid primary key default gen_random_uuid(),
      file_name text not null check (btrim(file_name) <> ''),
      sha256 text not null check (sha256 ~ '^[0-9a-f]{64}$'),
      storage_key text not null,
      state text not null check (state in ('checking', 'checked', 'applying', 'applied', 'failed')),
      rows_total integer not null default 0 check (rows_total >= 0),
      rows_good integer not null default 0 check (rows_good >= 0),
      rows_bad integer not null default 0 check (rows_bad >= 0),
      rows_applied integer not null default 0 check (rows_applied >= 0),
      rows_unchanged integer not null default 0 check (rows_unchanged >= 0),
      progress double precision not null default 0 check (progress between 0 and 1),
      report jsonb,
      created_by uuid not null references users (id),
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now()
    );
    create index imports_sha256 on imports (sha256);
    create index imports_created_at on imports (created_at desc);
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`drop table imports;`);
}
