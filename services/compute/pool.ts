/** Calculations on threads, so that a request never waits for somebody else's simulation. */
import { availableParallelism } from "node:os";
import path from "node:path";
import { Piscina } from "piscina";
import { ConvergenceError, DomainError } from "@/analytics/errors";
import type { Ledger, LedgerMember, LedgerOptions } from "@/analytics/portfolio/ledger";
import type { RollUp, RollUpMember, RollUpOptions } from "@/analytics/portfolio/roll-up";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import type { Simulation, SimulationOptions } from "@/analytics/volumetrics/simulate";
import type { LedgerTask, Outcome, RollUpTask, SimulationTask } from "./worker";

/** One pool a process, kept across hot reloads in development. */
const holder = globalThis as typeof globalThis & { dewledgerComputePool?: Piscina };

function pool(): Piscina {
  holder.dewledgerComputePool ??= new Piscina({
    filename: path.join(
      /* turbopackIgnore: true */ process.cwd(),
      "dist",
      "workers",
      "compute.mjs",
    ),
    minThreads: 1,
    maxThreads: Math.max(1, availableParallelism() - 1),
    idleTimeout: 60_000,
  });
  return holder.dewledgerComputePool;
}

export interface ComputeOptions {
  /** gives up the task, and its thread when it runs already */
  signal?: AbortSignal;
}

/**
 * `simulate` on a thread: the same bytes as on the calling one.
 *
 * @throws {DomainError} as `simulate`
 */
export async function runSimulation(
  inputs: EstimateInputs,
  options: Omit<SimulationOptions, "workspace">,
  { signal }: ComputeOptions = {},
): Promise<Simulation> {
  const task: SimulationTask = { inputs, options };
  return valueOf<Simulation>(await pool().run(task, { name: "simulate", signal }));
}

/**
 * `rollUp` on a thread. The members' arrays are copied, so the caller may keep using them.
 *
 * @throws {DomainError} as `rollUp`
 */
export async function runRollUp(
  members: RollUpMember[],
  options: RollUpOptions,
  { signal }: ComputeOptions = {},
): Promise<RollUp> {
  const task: RollUpTask = { members, options };
  return valueOf<RollUp>(await pool().run(task, { name: "rollUp", signal }));
}

/**
 * `computeLedger` on a thread. The members' arrays are handed over, not copied: the caller must not use them again.
 *
 * @throws {DomainError} as `computeLedger`
 */
export async function runLedger(
  members: LedgerMember[],
  options: LedgerOptions,
  { signal }: ComputeOptions = {},
): Promise<Ledger> {
  const task: LedgerTask = { members, options };
  const buffers = new Set(
    members.flatMap(({ vectors }) =>
      Object.values(vectors).map(({ buffer }) => buffer as ArrayBuffer),
    ),
  );
  return valueOf<Ledger>(
    await pool().run(task, { name: "ledger", signal, transferList: [...buffers] }),
  );
}

/** Ends the threads; for a process that is about to stop, and for tests. */
export async function closePool(): Promise<void> {
  const open = holder.dewledgerComputePool;
  holder.dewledgerComputePool = undefined;
  await open?.destroy();
}

function valueOf<Value>(outcome: Outcome<Value>): Value {
  if (outcome.ok) return outcome.value;
  const { kind, message, details } = outcome;
  throw kind === "domain"
    ? new DomainError(message, details)
    : new ConvergenceError(message, details);
}
