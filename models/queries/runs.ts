import { Op, QueryTypes, literal, type CreationAttributes, type Transaction } from "sequelize";
import { Field, Reservoir, Run, RunItem, User } from "../associations";
import { sequelize } from "../sequelize";
import type { EstimateState, RunItemState, RunKind, RunScope, RunState } from "../vocabulary";

interface Options {
  transaction?: Transaction;
  lock?: boolean;
}

const creator = { model: User, as: "creator", attributes: ["id", "name"] };

const unfinished: RunState[] = ["waiting", "running"];

/**
 * Recalculations, runs until settled and retries are begun one at a time, until the transaction ends, so that two people
 * do not begin the same. Imports begin theirs without this, and ending a run locks its row.
 */
export async function lockRuns(transaction: Transaction): Promise<void> {
  await sequelize.query("select pg_advisory_xact_lock(hashtext('dewledger.runs'))", {
    type: QueryTypes.SELECT,
    transaction,
  });
}

export async function createRunRow(
  values: CreationAttributes<Run>,
  options: { transaction: Transaction },
): Promise<Run> {
  return Run.create(values, options);
}

/** The bare row, for changing it. */
export async function findRun(id: string, options: Options = {}): Promise<Run | null> {
  return Run.findByPk(id, options);
}

export async function findRunWithCreator(id: string, options: Options = {}): Promise<Run | null> {
  return Run.findByPk(id, { ...options, include: [creator] });
}

export async function findRunOfImport(importId: string): Promise<Run | null> {
  return Run.findOne({ where: { importId } });
}

/** Runs newest first. */
export async function listRunsPage(
  filter: { state?: RunState },
  page: { limit: number; offset: number },
): Promise<{ rows: Run[]; count: number }> {
  return Run.findAndCountAll({
    where: { ...(filter.state && { state: filter.state }) },
    include: [creator],
    order: [
      ["createdAt", "DESC"],
      ["id", "ASC"],
    ],
    ...page,
  });
}

/** An unfinished recalculation that takes estimates of one of these scopes. */
export async function findUnfinishedRecalculation(
  scopes: readonly RunScope[],
  transaction: Transaction,
): Promise<Run | null> {
  return Run.findOne({
    where: {
      kind: "recalculation" satisfies RunKind,
      state: { [Op.in]: unfinished },
      options: { scope: { [Op.in]: [...scopes] } },
    },
    transaction,
  });
}

/** The unfinished run of an estimate until it is settled. */
export async function findUnfinishedSettling(
  estimateId: string,
  transaction: Transaction,
): Promise<Run | null> {
  return Run.findOne({
    where: { kind: "untilSettled" satisfies RunKind, state: { [Op.in]: unfinished } },
    include: [{ model: RunItem, as: "items", where: { estimateId }, attributes: [] }],
    transaction,
  });
}

/**
 * Give a run its items, in the order of fields and reservoirs: every estimate in one of the states, or those named.
 *
 * @returns how many there are
 */
export async function addRunItems(
  runId: string,
  which: { states: readonly EstimateState[] } | { estimateIds: readonly string[] },
  transaction: Transaction,
): Promise<number> {
  const [condition, values] =
    "states" in which
      ? ["estimates.state in (:values)", which.states]
      : ["estimates.id in (:values)", which.estimateIds];
  if (values.length === 0) return 0;
  const added = await sequelize.query(
    `insert into run_items (run_id, position, estimate_id, estimate_version, revision, reservoir_id)
      select :runId, row_number() over (order by fields.name, reservoirs.name, estimates.revision),
        estimates.id, estimates.version, estimates.revision, estimates.reservoir_id
      from estimates
      join reservoirs on reservoirs.id = estimates.reservoir_id
      join fields on fields.id = reservoirs.field_id
      where ${condition}
      returning position`,
    { replacements: { runId, values: [...values] }, type: QueryTypes.SELECT, transaction },
  );
  return added.length;
}

/** How the items of a run stand. */
export interface RunTally {
  counts: Record<RunItemState, number>;
  /** names of the workers that have had an item of it, in the order of their first items */
  workers: string[];
  /** items that ended by being computed, or failing, since work on the run last began: after a retry, since that */
  ended: number;
  /** of these, within the last minute */
  recentlyEnded: number;
  lastEndedAt: Date | null;
  /** whether a worker holds an item at this moment */
  held: boolean;
}

interface TallyRow {
  runId: string;
  state: RunItemState;
  count: number;
  ended: number;
  recent: number;
  lastEndedAt: Date | null;
  held: boolean;
}

/** The tallies of these runs, by their ids, in two grouped queries. */
export async function tallyRuns(
  runIds: readonly string[],
  transaction?: Transaction,
): Promise<Map<string, RunTally>> {
  const tallies = new Map<string, RunTally>(runIds.map((id) => [id, emptyTally()]));
  if (runIds.length === 0) return tallies;
  const rows = await sequelize.query<TallyRow>(
    `select run_id as "runId", run_items.state, count(*)::integer as count,
        (count(*) filter (where run_items.finished_at >= runs.updated_at))::integer as ended,
        (count(*) filter (where run_items.finished_at >=
          greatest(runs.updated_at, now() - interval '60 seconds')))::integer as recent,
        max(run_items.finished_at) as "lastEndedAt",
        coalesce(bool_or(leased_until > now()), false) as held
      from run_items join runs on runs.id = run_items.run_id
      where run_id in (:runIds)
      group by run_id, run_items.state`,
    { replacements: { runIds: [...runIds] }, type: QueryTypes.SELECT, transaction },
  );
  for (const row of rows) addToTally(tallies.get(row.runId) ?? emptyTally(), row);
  for (const { runId, worker } of await listWorkersOfRuns(runIds, transaction)) {
    tallies.get(runId)?.workers.push(worker);
  }
  return tallies;
}

/** Who has had items of these runs, in the order of their first items. */
export async function listWorkersOfRuns(
  runIds: readonly string[],
  transaction?: Transaction,
): Promise<{ runId: string; worker: string }[]> {
  return sequelize.query<{ runId: string; worker: string }>(
    `select run_id as "runId", worker from run_items
      where run_id in (:runIds) and worker is not null
      group by run_id, worker order by run_id, min(position)`,
    { replacements: { runIds: [...runIds] }, type: QueryTypes.SELECT, transaction },
  );
}

function emptyTally(): RunTally {
  return {
    counts: { waiting: 0, running: 0, done: 0, failed: 0, passedOver: 0 },
    workers: [],
    ended: 0,
    recentlyEnded: 0,
    lastEndedAt: null,
    held: false,
  };
}

function addToTally(tally: RunTally, row: TallyRow): void {
  tally.counts[row.state] = row.count;
  tally.held ||= row.held;
  if (row.state === "done" || row.state === "failed") {
    tally.ended += row.ended;
    tally.recentlyEnded += row.recent;
  }
  const last = row.lastEndedAt;
  if (last && (!tally.lastEndedAt || last > tally.lastEndedAt)) tally.lastEndedAt = last;
}

export interface RunItemFilter {
  state?: RunItemState;
  /** only those whose figures moved by more than this many standard errors */
  movedBeyond?: number;
}

/** Items of a run in their order, with their reservoirs and fields. */
export async function listRunItemsPage(
  runId: string,
  { state, movedBeyond }: RunItemFilter,
  page: { limit: number; offset: number },
): Promise<{ rows: RunItem[]; count: number }> {
  return RunItem.findAndCountAll({
    where: {
      runId,
      ...(state && { state }),
      ...(movedBeyond !== undefined && {
        [Op.and]: [
          literal(
            `("RunItem"."outcome" ->> 'movedStandardErrors')::float8 > ${Number(movedBeyond)}`,
          ),
        ],
      }),
    },
    include: [{ model: Reservoir, as: "reservoir", include: [{ model: Field, as: "field" }] }],
    order: [["position", "ASC"]],
    ...page,
  });
}

/** Why items failed, by their estimates. */
export async function listFailedRunItems(
  runId: string,
): Promise<{ estimateId: string; reason: string }[]> {
  const rows = await RunItem.findAll({
    attributes: ["estimateId", "reason"],
    where: { runId, state: "failed" },
  });
  return rows.map(({ estimateId, reason }) => ({ estimateId, reason: reason ?? "" }));
}

/** End every item that is not ended: the waiting ones and those that are being computed, which nobody owns after this. */
export async function passOverOpenItems(
  runId: string,
  reasons: { waiting: string; running: string },
  at: Date,
  transaction: Transaction,
): Promise<void> {
  await sequelize.query(
    `update run_items
      set reason = case state when 'running' then :running else :waiting end,
        state = 'passedOver', claim_id = null, leased_until = null, finished_at = :at
      where run_id = :runId and state in ('waiting', 'running')`,
    { replacements: { runId, ...reasons, at }, transaction },
  );
}

/**
 * Let what failed or was passed over wait again, as its estimate is now. Estimates that are gone stay as they ended.
 *
 * @returns how many wait again
 */
export async function returnEndedItems(runId: string, transaction: Transaction): Promise<number> {
  const returned = await sequelize.query(
    `update run_items
      set state = 'waiting', attempts = 0, worker = null, progress = null, reason = null,
        finished_at = null, estimate_version = estimates.version
      from estimates
      where run_items.run_id = :runId and run_items.state in ('failed', 'passedOver')
        and estimates.id = run_items.estimate_id
      returning run_items.position`,
    { replacements: { runId }, type: QueryTypes.SELECT, transaction },
  );
  return returned.length;
}

export async function countOpenItems(runId: string, transaction: Transaction): Promise<number> {
  return RunItem.count({
    where: { runId, state: { [Op.in]: ["waiting", "running"] } },
    transaction,
  });
}
