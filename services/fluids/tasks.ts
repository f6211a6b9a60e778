import { readLabSheet } from "../lab-sheets/read-lab-sheet";
import { describeDepletion } from "./depletion";
import { describePhases } from "./equation-of-state";
import { describeNearWell } from "./near-well";
import { compareRecoveries } from "./recovery";
import { proposeTuning } from "./tuning";

/**
 * Calculations on fluids that are heavy enough for a thread: each takes one plain question and gives one plain answer.
 * Adding one here is all it takes to run it on the pool.
 */
export const fluidTasks = {
  depletion: describeDepletion,
  tuning: proposeTuning,
  equationOfState: describePhases,
  recovery: compareRecoveries,
  nearWell: describeNearWell,
  labSheet: ({ text }: { text: string }) => readLabSheet(text),
};

export type FluidTasks = typeof fluidTasks;
export type FluidTaskName = keyof FluidTasks;
export type FluidQuestion<Name extends FluidTaskName> = Parameters<FluidTasks[Name]>[0];
export type FluidAnswer<Name extends FluidTaskName> = ReturnType<FluidTasks[Name]>;

export interface FluidTask<Name extends FluidTaskName = FluidTaskName> {
  name: Name;
  question: FluidQuestion<Name>;
}
