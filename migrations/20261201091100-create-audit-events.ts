import type { QueryInterface } from "sequelize";

/** Who did what, when, from what to what. Rows are added and never touched again; the database itself refuses. */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create table audit_events (
      id bigint generated always as identity primary key,
      actor_id uuid references users (id),
      action text not null,
      entity text not null,
      entity_id text not null,
      before jsonb,
      after jsonb,
      request_id text,
      at timestamptz not null default now()
    );
    create index audit_events_entity on audit_events (entity, entity_id, id desc);
    create index audit_events_at on audit_events (at desc, id desc);
    create index audit_events_actor on audit_events (actor_id, id desc);

    create function refuse_audit_change() returns trigger language plpgsql as $body$
    begin
      raise exception 'audit events are append-only'
        using errcode = 'check_violation', constraint = 'audit_events_append_only';
    end
    $body$;
    create trigger refuse_audit_change before update or delete on audit_events
      for each row execute function refuse_audit_change();
    create trigger refuse_audit_truncate before truncate on audit_events
      for each statement execute function refuse_audit_change();
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`drop table audit_events; drop function refuse_audit_change();`);
}
