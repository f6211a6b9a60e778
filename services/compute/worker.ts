/**
 * What a calculation thread does. Bundled to dist/workers/compute.mjs by scripts/build-workers.mjs and run by the pool
 * in pool.ts; nothing else imports it.
 */
import type { MessagePort } from "node:worker_threads";
import { move, transferableSymbol, valueSymbol } from "piscina";
import { ConvergenceError, DomainError } from "@/analytics/errors";
import { summariseField } from "@/analytics/portfolio/field-summary";
import { viewFieldTrials, type AlignmentOptions } from "@/analytics/portfolio/field-trials";
import {
  computeLedger,
  type FieldFigures,
  type Ledger,
  type LedgerField,
  type LedgerOptions,
} from "@/analytics/portfolio/ledger";
import { alignPieces, type FieldPiece } from "@/analytics/portfolio/roll-up";
import { explainChange, type ChangeQuestion } from "@/analytics/sensitivity/explain-change";
import { computeSensitivity, type SensitivityOptions } from "@/analytics/sensitivity/sensitivity";
import type {
  ChangeExplanation,
  SensitivityAnswer,
} from "@/analytics/sensitivity/sensitivity-schema";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import type { QuantitySummary, VectorName } from "@/analytics/volumetrics/results-schema";
import {
  DEFAULT_TRIALS,
  simulate as simulateReservoir,
  type Simulation,
  type SimulationOptions,
} from "@/analytics/volumetrics/simulate";
import {
  simulateUntilSettled,
  type SettledSimulation,
  type SettleOptions,
} from "@/analytics/volumetrics/until-settled";
import { createWorkspace, type SimulationWorkspace } from "@/analytics/volumetrics/workspace";
import { fluidTasks, type FluidAnswer, type FluidTask, type FluidTaskName } from "../fluids/tasks";

export interface SimulationTask {
  inputs: EstimateInputs;
  options: Omit<SimulationOptions, "workspace">;
}

export interface SettleTask {
  inputs: EstimateInputs;
  options: Omit<SettleOptions, "onStep">;
  /** each step is posted here */
  progress: MessagePort;
}

export interface SensitivityTask {
  inputs: EstimateInputs;
  options: SensitivityOptions;
}

export interface SummaryTask {
  /** a field's trials in the order of the portfolio, shared */
  buffer: SharedArrayBuffer;
  trials: number;
}

export interface AlignmentTask {
  /** their buffers are shared, so that the caller has what the thread writes */
  pieces: FieldPiece[];
  options: AlignmentOptions;
}

export interface LedgerTask {
  /** with the buffers of their trials, shared */
  fields: (Omit<LedgerField, "trials"> & { buffer: SharedArrayBuffer })[];
  options: LedgerOptions & { trials: number };
}

/** An error of analytics keeps its class only as data: a thrown one arrives as a plain Error. */
export type Outcome<Value> =
  | { ok: true; value: Value }
  | {
      ok: false;
      kind: "domain" | "convergence";
      message: string;
      details: Record<string, unknown>;
    };

/** The arrays of the last run that was not large, reused while the number of trials stays the same. */
let kept: SimulationWorkspace | null = null;

/** Larger workspaces (13 MB and more, 200 MB for the longest run) are made for one run and let go. */
const MOST_TRIALS_KEPT = 65_536;

function workspaceOf(trials: number): SimulationWorkspace {
  if (kept?.trials === trials) return kept;
  const made = createWorkspace(trials);
  if (trials <= MOST_TRIALS_KEPT) kept = made;
  return made;
}

export function simulate({ inputs, options }: SimulationTask) {
  return answer<Simulation>(
    () => {
      const trials = options.trials ?? DEFAULT_TRIALS;
      return simulateReservoir(inputs, { ...options, trials, workspace: workspaceOf(trials) });
    },
    ({ vectors }) => Object.values(vectors).map(({ buffer }) => buffer as ArrayBuffer),
  );
}

/** More and more trials until the percentiles are known well enough. */
export function settle({ inputs, options, progress }: SettleTask) {
  return answer<SettledSimulation>(
    () => {
      try {
        return simulateUntilSettled(inputs, {
          ...options,
          onStep: (step) => progress.postMessage(step),
        });
      } finally {
        progress.close();
      }
    },
    ({ simulation }) =>
      Object.values(simulation.vectors).map(({ buffer }) => buffer as ArrayBuffer),
  );
}

/** What drives one result of an estimate. */
export function sensitivity({ inputs, options }: SensitivityTask) {
  return answer<SensitivityAnswer>(
    () => computeSensitivity(inputs, options),
    () => [],
  );
}

/** How much each difference between two estimates explains. */
export function change(question: ChangeQuestion) {
  return answer<ChangeExplanation>(
    () => explainChange(question),
    () => [],
  );
}

/** What a field's trials come to. */
export function summarise({ buffer, trials }: SummaryTask) {
  return answer<Record<VectorName, QuantitySummary>>(
    () => summariseField(viewFieldTrials(buffer, trials)),
    () => [],
  );
}

/** Stored trials into the order of the portfolio. */
export function align({ pieces, options }: AlignmentTask) {
  return answer<(FieldFigures | null)[]>(
    () => alignPieces(pieces, options),
    () => [],
  );
}

/** Summaries only: what comes back is small, and the summing up of many fields stays off the event loop. */
export function ledger({ fields, options: { trials, ...options } }: LedgerTask) {
  return answer<Ledger>(
    () =>
      computeLedger(
        fields.map(({ buffer, ...field }) => ({
          ...field,
          trials: viewFieldTrials(buffer, trials),
        })),
        options,
      ),
    () => [],
  );
}

/** Any of the calculations on fluids, by its name. */
export function fluid<Name extends FluidTaskName>({ name, question }: FluidTask<Name>) {
  const calculate = fluidTasks[name] as (asked: typeof question) => FluidAnswer<Name>;
  return answer(
    () => calculate(question),
    () => [],
  );
}

/** Runs a task and hands its arrays over without copying them. */
function answer<Value>(
  run: () => Value,
  buffersOf: (value: Value) => ArrayBuffer[],
): Outcome<Value> {
  try {
    const value = run();
    return handOver({ ok: true, value }, buffersOf(value));
  } catch (error) {
    if (!(error instanceof DomainError || error instanceof ConvergenceError)) throw error;
    const kind = error instanceof DomainError ? "domain" : "convergence";
    return { ok: false, kind, message: error.message, details: error.details };
  }
}

function handOver<Value extends object>(value: Value, buffers: ArrayBuffer[]): Value {
  // Piscina unwraps this on the other side, so its type there is the value's.
  return move({
    get [transferableSymbol]() {
      return buffers;
    },
    get [valueSymbol]() {
      return value;
    },
  } as never) as unknown as Value;
}
