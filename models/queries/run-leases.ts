import { QueryTypes, type Transaction } from "sequelize";
import { RunItem } from "../associations";
import { sequelize } from "../sequelize";
import type { RunStep } from "../run-item";
import type { RunKind } from "../vocabulary";

/**
 * How workers share the items of runs. Leases are dated by the database's clock, so that the clocks of machines do not
 * matter.
 */

/**
 * Whose item it is: nobody else may end it while this claim stands. Every claim has an id that was never used before,
 * so a token that was lost never becomes valid again, whoever takes the item next and however often it was tried.
 */
export interface LeaseToken {
  runId: string;
  position: number;
  claimId: string;
}

export interface ClaimedItem extends LeaseToken {
  /** with this one */
  attempts: number;
  estimateId: string;
  estimateVersion: number;
}

/**
 * Take the next item that waits, or whose worker has not been heard of since its lease ended. Workers pass over each
 * other's choices instead of queueing behind them. A claim whose answer is lost on the way is renewed by nobody, so its
 * item is free again when the lease ends.
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
      set state = 'running', worker = :worker, claim_id = gen_random_uuid(),
        attempts = attempts + 1, progress = null,
        leased_until = now() + make_interval(secs => :leaseSeconds)
      from next
      where run_items.run_id = next.run_id and run_items.position = next.position
      returning run_items.run_id as "runId", run_items.position,
        claim_id as "claimId", attempts, estimate_id as "estimateId", estimate_version as "estimateVersion"`,
    {
      replacements: { runId, worker, leaseSeconds, mostAttempts },
      type: QueryTypes.SELECT,
    },
  );
  return claimed ?? null;
}

/** Renew the leases of these claims, and of no other. @returns the claims that still stand */
export async function renewLeases(
  claimIds: readonly string[],
  leaseSeconds: number,
): Promise<string[]> {
  if (claimIds.length === 0) return [];
  const renewed = await sequelize.query<{ claimId: string }>(
    `update run_items set leased_until = now() + make_interval(secs => :leaseSeconds)
      where claim_id in (:claimIds)
      returning claim_id as "claimId"`,
    { replacements: { claimIds: [...claimIds], leaseSeconds }, type: QueryTypes.SELECT },
  );
  return renewed.map(({ claimId }) => claimId);
}

/** The item, held until the transaction ends, or null when it is no longer the token's. */
export async function lockLeasedItem(
  { runId, position, claimId }: LeaseToken,
  transaction: Transaction,
): Promise<RunItem | null> {
  return RunItem.findOne({ where: { runId, position, claimId }, transaction, lock: true });
}

/** Let others have the item at once. An attempt that was broken off from outside is not counted. */
export async function giveItemBack(token: LeaseToken, { counted }: { counted: boolean }) {
  await sequelize.query(
    `update run_items
      set state = 'waiting', claim_id = null, leased_until = null, progress = null,
        attempts = attempts - case when :counted then 0 else 1 end
      where run_id = :runId and position = :position and claim_id = :claimId`,
    { replacements: { ...token, counted } },
  );
}

/** Write how far an item is, if it is still the token's. */
export async function saveItemProgress(token: LeaseToken, steps: RunStep[]): Promise<void> {
  const { runId, position, claimId } = token;
  await RunItem.update({ progress: steps }, { where: { runId, position, claimId } });
}

/** Fail the items that were tried often enough and whose worker is gone. @returns how many */
export async function failExhaustedItems(mostAttempts: number, reason: string): Promise<number> {
  const failed = await sequelize.query(
    `update run_items
      set state = 'failed', claim_id = null, leased_until = null, reason = :reason,
        finished_at = now()
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
