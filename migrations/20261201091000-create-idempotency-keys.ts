import type { QueryInterface } from "sequelize";

/**
 * Answers already given, so that a POST repeated after a lost connection is answered again and not done again.
 * `status` is null while the first request is still at work.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table idempotency_keys (
      user_id uuid not null references users (id),
      key text not null check (length(key) between 1 and 200),
      request_hash text not null,
      status integer,
      response jsonb,
      etag text,
      created_at timestamptz not null default now(),
      primary key (user_id, key)
    );
    create index idempotency_keys_created_at on idempotency_keys (created_at);
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`drop table idempotency_keys;`);
}
