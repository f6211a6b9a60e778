import type { QueryInterface } from "sequelize";

/**
 * People and the two ways in: a password and API tokens. Nobody is ever deleted, because approvals and audit events
 * point at them; they are made inactive instead. `session_epoch` is what a cookie must match, so that raising it signs
 * a person out everywhere.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table users (
      id uuid primary key default gen_random_uuid(),
      email text not null check (email = btrim(email) and email like '%_@_%'),
      name text not null check (btrim(name) <> ''),
      password_hash text not null,
      role text not null
        check (role in ('engineer', 'reviewer', 'planner', 'executive', 'administrator')),
      active boolean not null default true,
      session_epoch integer not null default 0,
      last_sign_in_at timestamptz,
      version integer not null default 1,
      created_at timestamptz not null default now(),
      updated_at timestamptz not null default now()
    );
    create unique index users_email_unique on users (lower(email));

    create table api_tokens (
      id uuid primary key default gen_random_uuid(),
      user_id uuid not null references users (id),
      name text not null check (btrim(name) <> ''),
      token_hash text not null constraint api_tokens_hash_unique unique,
      last_used_at timestamptz,
      revoked_at timestamptz,
      created_at timestamptz not null default now()
    );
    create index api_tokens_user_id on api_tokens (user_id);
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`drop table api_tokens; drop table users;`);
}
