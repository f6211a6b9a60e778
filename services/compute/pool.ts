/** Calculations on threads, so that a request never waits for somebody else's simulation. */
import fs from "node:fs";
import { availableParallelism } from "node:os";
import path from "node:path";
import { MessageChannel, receiveMessageOnPort, type MessagePort } from "node:worker_threads";
import { Piscina } from "piscina";
import { ConvergenceError, DomainError } from "@/analytics/errors";
import type { AlignmentOptions } from "@/analytics/portfolio/field-trials";
import type { FieldFigures, Ledger } from "@/analytics/portfolio/ledger";
import type { FieldPiece } from "@/analytics/portfolio/roll-up";
import type { ChangeQuestion } from "@/analytics/sensitivity/explain-change";
import type { SensitivityOptions } from "@/analytics/sensitivity/sensitivity";
import type {
  ChangeExplanation,
  SensitivityAnswer,
} from "@/analytics/sensitivity/sensitivity-schema";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import type { QuantitySummary, VectorName } from "@/analytics/volumetrics/results-schema";
import type { Simulation, SimulationOptions } from "@/analytics/volumetrics/simulate";
import type {
  SettledSimulation,
  SettleOptions,
  SettleStep,
} from "@/analytics/volumetrics/until-settled";
import { ServiceBusyError } from "../errors";
import type { FluidAnswer, FluidQuestion, FluidTask, FluidTaskName } from "../fluids/tasks";
import { Turns } from "../turns";
import type {
  AlignmentTask,
  LedgerTask,
  Outcome,
  SensitivityTask,
  SettleTask,
  SimulationTask,
  SummaryTask,
} from "./worker";

/** Threads for calculations. There are always two, so that a short one finds a thread while a long one runs. */
const THREADS = Math.max(2, availableParallelism() - 1);

/** Tasks that may wait for a thread. More would wait longer than anybody does, each with its inputs in memory. */
export const MAXIMUM_QUEUE = 64;

const program = path.join(
  /* turbopackIgnore: true */ process.cwd(),
  "dist",
  "workers",
  "compute.mjs",
);

interface OpenPool {
  threads: Piscina;
  /** of tasks that take seconds: they never have every thread, so that a preview or a total does not wait for them */
  long: Turns;
  /** when its program was bundled; one that was bundled again since replaces it, without a restart */
  bundledAt: number;
}

/** One pool a process, kept across hot reloads in development. */
const holder = globalThis as typeof globalThis & { dewledgerCompute?: OpenPool };

function pool(): OpenPool {
  const bundledAt = fs.statSync(program).mtimeMs;
  if (holder.dewledgerCompute?.bundledAt !== bundledAt) {
    void holder.dewledgerCompute?.threads.close();
    const threads = new Piscina({
      filename: program,
      minThreads: 1,
      maxThreads: THREADS,
      idleTimeout: 60_000,
      maxQueue: MAXIMUM_QUEUE,
    });
    const long = new Turns(THREADS - 1, MAXIMUM_QUEUE);
    holder.dewledgerCompute = { threads, long, bundledAt };
  }
  return holder.dewledgerCompute;
}

export interface ComputeOptions {
  /** gives up the task, and its thread when it runs already */
  signal?: AbortSignal;
}

/** What a thread can do, by the name of the function of worker.ts. */
interface Tasks {
  simulate: SimulationTask;
  settle: SettleTask;
  sensitivity: SensitivityTask;
  change: ChangeQuestion;
  summarise: SummaryTask;
  align: AlignmentTask;
  ledger: LedgerTask;
  fluid: FluidTask;
}

/** What takes seconds rather than tenths of one. */
const longTasks: ReadonlySet<keyof Tasks> = new Set(["settle", "sensitivity", "change"]);

/** @throws {ServiceBusyError} when the queue of such tasks is full */
async function run<Value, Name extends keyof Tasks = keyof Tasks>(
  name: Name,
  task: Tasks[Name],
  options: ComputeOptions & { transferList?: (ArrayBuffer | MessagePort)[] },
): Promise<Value> {
  const work = async () => {
    const { threads } = pool();
    if (threads.queueSize >= MAXIMUM_QUEUE) throw new ServiceBusyError();
    return valueOf<Value>(await threads.run(task, { name, ...options }));
  };
  // Long tasks wait in a queue of their own: however many there are, short ones are not turned away for them.
  return longTasks.has(name) ? pool().long.take(work, options.signal) : work();
}

/**
 * `simulate` on a thread: the same bytes as on the calling one.
 *
 * @throws {DomainError} as `simulate`
 * @throws {ServiceBusyError} when too many wait already
 */
export async function runSimulation(
  inputs: EstimateInputs,
  options: Omit<SimulationOptions, "workspace">,
  { signal }: ComputeOptions = {},
): Promise<Simulation> {
  const task: SimulationTask = { inputs, options };
  return run<Simulation>("simulate", task, { signal });
}

/**
 * `simulateUntilSettled` on a thread.
 *
 * @param onStep  called as the thread gets there, once a doubling, and for the last one before the promise resolves
 * @throws {DomainError} as `simulateUntilSettled`
 * @throws {ServiceBusyError} when too many wait already
 */
export async function runUntilSettled(
  inputs: EstimateInputs,
  options: Omit<SettleOptions, "onStep">,
  { signal, onStep }: ComputeOptions & { onStep?: (step: SettleStep) => void } = {},
): Promise<SettledSimulation> {
  const { port1: here, port2: there } = new MessageChannel();
  const tell = (step: SettleStep) => onStep?.(step);
  here.on("message", tell);
  // Progress alone keeps no process alive.
  here.unref();
  try {
    const task: SettleTask = { inputs, options, progress: there };
    const settled = await run<SettledSimulation>("settle", task, { signal, transferList: [there] });
    // The answer may overtake the last steps.
    here.off("message", tell);
    for (let left = receiveMessageOnPort(here); left; left = receiveMessageOnPort(here)) {
      tell(left.message as SettleStep);
    }
    return settled;
  } finally {
    here.close();
    there.close();
  }
}

/**
 * `computeSensitivity` on a thread.
 *
 * @throws {DomainError} as `computeSensitivity`
 * @throws {ServiceBusyError} when too many wait already
 */
export async function runSensitivity(
  inputs: EstimateInputs,
  options: SensitivityOptions,
  { signal }: ComputeOptions = {},
): Promise<SensitivityAnswer> {
  return run<SensitivityAnswer>("sensitivity", { inputs, options }, { signal });
}

/**
 * `explainChange` on a thread.
 *
 * @throws {DomainError} as `explainChange`
 * @throws {ServiceBusyError} when too many wait already
 */
export async function runChange(
  question: ChangeQuestion,
  { signal }: ComputeOptions = {},
): Promise<ChangeExplanation> {
  return run<ChangeExplanation>("change", question, { signal });
}

/**
 * Percentiles, moments and curve of each quantity of a field, on a thread, from trials that it shares with the caller.
 *
 * @throws {ServiceBusyError} when too many wait already
 */
export async function runFieldSummary(
  task: SummaryTask,
  { signal }: ComputeOptions = {},
): Promise<Record<VectorName, QuantitySummary>> {
  return run<Record<VectorName, QuantitySummary>>("summarise", task, { signal });
}

/** Some reservoirs of a field whose trials the caller shares with the thread. */
export type SharedFieldPiece = FieldPiece & { buffer: SharedArrayBuffer };

/**
 * `alignPieces` on a thread, into buffers that the caller keeps. The reservoirs' arrays are handed over, not copied:
 * the caller must not use them again.
 *
 * @throws {DomainError} as `alignPieces`
 * @throws {ServiceBusyError} when too many wait already
 */
export async function runAlignment(
  pieces: SharedFieldPiece[],
  options: AlignmentOptions,
  { signal }: ComputeOptions = {},
): Promise<(FieldFigures | null)[]> {
  const task: AlignmentTask = { pieces, options };
  const buffers = new Set(
    pieces.flatMap(({ reservoirs }) =>
      reservoirs.flatMap(({ vectors }) =>
        Object.values(vectors).map(({ buffer }) => buffer as ArrayBuffer),
      ),
    ),
  );
  return run<(FieldFigures | null)[]>("align", task, { signal, transferList: [...buffers] });
}

/**
 * `computeLedger` on a thread, from trials that it shares with the caller.
 *
 * @throws {DomainError} as `computeLedger`
 * @throws {ServiceBusyError} when too many wait already
 */
export async function runLedger(
  fields: LedgerTask["fields"],
  options: LedgerTask["options"],
  { signal }: ComputeOptions = {},
): Promise<Ledger> {
  const task: LedgerTask = { fields, options };
  return run<Ledger>("ledger", task, { signal });
}

/**
 * One of the calculations on fluids, on a thread.
 *
 * @throws {DomainError} with a path into the question
 * @throws {ConvergenceError} as the calculation
 * @throws {ServiceBusyError} when too many wait already
 */
export async function runOnFluid<Name extends FluidTaskName>(
  name: Name,
  question: FluidQuestion<Name>,
  { signal }: ComputeOptions = {},
): Promise<FluidAnswer<Name>> {
  const task: FluidTask<Name> = { name, question };
  return run<FluidAnswer<Name>>("fluid", task as FluidTask, { signal });
}

/** Ends the threads; for a process that is about to stop, and for tests. */
export async function closePool(): Promise<void> {
  const open = holder.dewledgerCompute;
  holder.dewledgerCompute = undefined;
  open?.long.dismiss(new Error("The calculation threads were closed."));
  await open?.threads.destroy();
}

function valueOf<Value>(outcome: Outcome<Value>): Value {
  if (outcome.ok) return outcome.value;
  const { kind, message, details } = outcome;
  throw kind === "domain"
    ? new DomainError(message, details)
    : new ConvergenceError(message, details);
}
