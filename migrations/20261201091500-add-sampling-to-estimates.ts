import type { QueryInterface } from "sequelize";

/**
 * How an estimate's trials are chosen. Those from before were Latin hypercubes. What lies with a reviewer keeps its
 * method too; approved revisions are held whole already. A run may have 2^20 trials, the next power of two.
 */
export async function up({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    alter table estimates
      add column sampling text not null default 'latinHypercube'
        check (sampling in ('latinHypercube', 'sobol')),
      drop constraint estimates_trials_check,
      add constraint estimates_trials_check check (trials between 100 and 1048576);
    alter table estimates alter column sampling drop default;
    ${protectDecidedEstimate("or new.seed <> old.seed or new.trials <> old.trials or new.sampling <> old.sampling")}
  `);
}

/**
 * Puts the former limit back for what is written from then on. Estimates that have more trials keep them (`not valid`),
 * because a number of trials that somebody chose is not changed by going down; a draft of them takes changes again with
 * fewer trials, and an approved one, which nothing changes, after going up.
 */
export async function down({ context }: { context: QueryInterface }): Promise<void> {
  await context.sequelize.query(`
    ${protectDecidedEstimate("or new.seed <> old.seed or new.trials <> old.trials")}
    alter table estimates
      drop column sampling,
      drop constraint estimates_trials_check,
      add constraint estimates_trials_check check (trials between 100 and 1000000) not valid;
  `);
}

/** The trigger's function with what, besides inputs and summary, stands still while a reviewer reads. */
function protectDecidedEstimate(alsoStill: string): string {
  return `
    create or replace function protect_decided_estimate() returns trigger language plpgsql as $body$
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
        ${alsoStill})
      then
        raise exception 'estimate % lies with a reviewer; its inputs cannot be changed', old.id
          using errcode = 'check_violation', constraint = 'estimates_immutable';
      end if;
      return new;
    end
    $body$;
  `;
}
