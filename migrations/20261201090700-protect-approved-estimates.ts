import type { QueryInterface } from "sequelize";

/**
 * An approved revision never changes, not even by a slip in a console: the one thing that may happen to it is being
 * superseded. While one lies with the reviewer its inputs and results stand still too, so what is approved is what was
 * read.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    create function protect_decided_estimate() returns trigger language plpgsql as $body$
    begin
      if tg_op = 'DELETE' then
        if old.state in ('submitted', 'approved', 'superseded') then
          raise exception 'estimate % is % and cannot be deleted', old.id, old.state
            using errcode = 'check_violation', constraint = 'estimates_immutable';
        end if;
        return old;
      end if;

      if old.state = 'superseded'
        or (old.state = 'approved' and (
          new.state <> 'superseded'
          or to_jsonb(new) - '{state,version,updated_at}'::text[]
             is distinct from to_jsonb(old) - '{state,version,updated_at}'::text[]))
      then
        raise exception 'estimate % is % and cannot be changed', old.id, old.state
          using errcode = 'check_violation', constraint = 'estimates_immutable';
      end if;

      if old.state = 'submitted' and (
        new.inputs is distinct from old.inputs or new.summary is distinct from old.summary
        or new.seed <> old.seed or new.trials <> old.trials)
      then
        raise exception 'estimate % lies with a reviewer; its inputs cannot be changed', old.id
          using errcode = 'check_violation', constraint = 'estimates_immutable';
      end if;
      return new;
    end
    $body$;
    create trigger protect_decided_estimate before update or delete on estimates
      for each row execute function protect_decided_estimate();

    create function protect_decided_trials() returns trigger language plpgsql as $body$
    declare
      parent_id uuid := case when tg_op = 'INSERT' then new.estimate_id else old.estimate_id end;
      parent_state text;
    begin
      select state into parent_state from estimates where id = parent_id;
      if parent_state in ('submitted', 'approved', 'superseded') then
        raise exception 'the trials of estimate % belong to a % revision', parent_id, parent_state
          using errcode = 'check_violation', constraint = 'estimates_immutable';
      end if;
      return case when tg_op = 'DELETE' then old else new end;
    end
    $body$;
    create trigger protect_decided_trials before insert or update or delete on estimate_trials
      for each row execute function protect_decided_trials();
  `);
}

export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    drop trigger protect_decided_trials on estimate_trials;
    drop function protect_decided_trials();
    drop trigger protect_decided_estimate on estimates;
    drop function protect_decided_estimate();
  `);
}
