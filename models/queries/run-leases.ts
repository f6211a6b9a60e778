import { QueryTypes, type Transaction } from "sequelize";
import { RunItem } from "../associations";
import { sequelize } from "../sequelize";
import type { RunStep } from "../run-item";
import type { RunKind } from "../vocabulary";

/**
 * How workers share the items of runs. Leases are dated by the database's clock, so that the clocks of machines do not
 * matter.
 */

/** Whose item it is: nobody else may end it while worker and attempt are these. */
export interface LeaseToken {
  runId: string;
  position: number;
  worker: string;
  attempts: number;
}

export interface ClaimedItem extends LeaseToken {
  estimateId: string;
  estimateVersion: number;
}

/**
 * Take the next item that waits, or whose worker has not been heard of since its lease ended. Workers pass over each
 * other's choices instead of queueing behind them.
 */
export async function claimRunItem(
  runId: string,
  worker: string,
  { leaseSeconds, mostAttempts }: { leaseSeconds: number; mostAttempts: number },
): Promise<ClaimedItem | null> {
  const [claimed] = await sequelize.query<ClaimedItem>(
    `with next as materialized (
        select run_id, position from run_items
        where run_id = :runId and attempts < :mostAttempts
          and (state = 'waiting' or (state = 'running' and leased_until < now()))
        order by position limit 1
        for update skip locked
      )
      update run_items
      set state = 'running', worker = :worker, attempts = attempts + 1, progress = null,
        leased_until = now() + make_interval(secs => :leaseSeconds)
      from next
      where run_items.run_id = next.run_id and run_items.position = next.position
      returning run_items.run_id as "runId", run_items.position, worker, attempts,
        estimate_id as "estimateId", estimate_version as "estimateVersion"`,
    {
      replacements: { runId, worker, leaseSeconds, mostAttempts },
      type: QueryTypes.SELECT,
    },
  );
  return claimed ?? null;
}

/** Renew every lease of a worker. @returns the tokens that it still holds */
export async function renewLeases(worker: string, leaseSeconds: number): Promise<LeaseToken[]> {
  return sequelize.query<LeaseToken>(
    `update run_items set leased_until = now() + make_interval(secs => :leaseSeconds)
      where worker = :worker and state = 'running'
      returning run_id as "runId", position, worker, attempts`,
    { replacements: { worker, leaseSeconds }, type: QueryTypes.SELECT },
  );
}

/** The item, held until the transaction ends, or null when it is no longer the token's. */
export async function lockLeasedItem(
  { runId, position, worker, attempts }: LeaseToken,
  transaction: Transaction,
): Promise<RunItem | null> {
  return RunItem.findOne({
    where: { runId, position, worker, attempts, state: "running" },
    transaction,
    lock: true,
  });
}

/** Let others have the item at once. An attempt that was broken off from outside is not counted. */
export async function giveItemBack(token: LeaseToken, { counted }: { counted: boolean }) {
  await sequelize.query(
    `update run_items
      set state = 'waiting', leased_until = null, progress = null,
        attempts = attempts - case when :counted then 0 else 1 end
      where run_id = :runId and position = :position and worker = :worker
        and attempts = :attempts and state = 'running'`,
    { replacements: { ...token, counted } },
  );
}

/** Write how far an item is, if it is still the token's. */
export async function saveItemProgress(token: LeaseToken, steps: RunStep[]): Promise<void> {
  const { runId, position, worker, attempts } = token;
  await RunItem.update(
    { progress: steps },
    { where: { runId, position, worker, attempts, state: "running" } },
  );
}

/** Fail the items that were tried often enough and whose worker is gone. @returns how many */
export async function failExhaustedItems(mostAttempts: number, reason: string): Promise<number> {
  const failed = await sequelize.query(
    `update run_items
      set state = 'failed', leased_until = null, reason = :reason, finished_at = now()
      where attempts >= :mostAttempts and state = 'running' and leased_until < now()
      returning position`,
    { replacements: { mostAttempts, reason }, type: QueryTypes.SELECT },
  );
  return failed.length;
}

/** An unfinished run: how many items a worker could take now, and how many are open at all. */
export interface OpenRun {
  id: string;
  kind: RunKind;
  claimable: number;
  open: number;
}

export async function listOpenRuns(mostAttempts: number): Promise<OpenRun[]> {
  return sequelize.query<OpenRun>(
    `select runs.id, runs.kind, count(run_items.position)::integer as open,
        (count(*) filter (where run_items.attempts < :mostAttempts and (
          run_items.state = 'waiting'
          or (run_items.state = 'running' and run_items.leased_until < now()))))::integer as claimable
      from runs
      left join run_items on run_items.run_id = runs.id and run_items.state in ('waiting', 'running')
      where runs.state in ('waiting', 'running')
      group by runs.id, runs.kind
      order by min(runs.created_at)`,
    { replacements: { mostAttempts }, type: QueryTypes.SELECT },
  );
}

/** Note that work on a run has begun, the first time. */
export async function markRunStarted(runId: string): Promise<void> {
  await sequelize.query(
    `update runs
      set state = 'running', started_at = coalesce(started_at, now()), updated_at = now(),
        version = version + 1
      where id = :runId and state = 'waiting'`,
    { replacements: { runId } },
  );
}
