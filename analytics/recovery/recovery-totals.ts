import type { RecoveryPhaseName, RecoverySummary } from "../volumetrics/results-schema";
import type { CompiledPlan } from "./compile-plan";

/** Why a trial can have no recovery, with what to do about it. */
export const refusals = {
  noState: {
    input: "uncertain",
    message:
      "have no z factor at the dew point, or none of the gas at injection: pressure, temperature and gravity lie where " +
      "it has no value. Narrow the ranges of temperature or condensate yield.",
  },
  abandonmentAboveInitial: {
    input: "recoveryPlan.abandonmentPressurePsia",
    message: "are abandoned above their initial pressure. Narrow one of the two ranges.",
  },
  condensateAboveAll: {
    input: "recoveryPlan.condensateCurveFactor",
    message:
      "recover more condensate than there is: the factor times the curve's recovery is above 1. Give the factor a " +
      "lower maximum.",
  },
  abandonmentAboveCycling: {
    input: "recoveryPlan.cycling.pressurePsia",
    message:
      "are abandoned above the pressure at which injection begins. Give the abandonment pressure a lower maximum.",
  },
  sweepAboveInjected: {
    input: "recoveryPlan.cycling.injectedPoreVolumes",
    message:
      "displace more gas than is injected. Inject more pore volumes, or give the efficiencies a lower maximum.",
  },
  endBelowAbandonment: {
    input: "recoveryPlan.cycling.injectedPoreVolumes",
    message:
      "fall below their abandonment pressure, or past the end of the curve, while gas is still injected. Inject fewer " +
      "pore volumes, use less fuel, or keep the pressure up.",
  },
  noNetGas: {
    input: "recoveryPlan.cycling.fuelFraction",
    message: "burn or leave behind more gas than they produce. Use less fuel.",
  },
} as const satisfies Record<string, { input: string; message: string }>;
export type RefusalName = keyof typeof refusals;

/** Sums over trials. Condensate is weighted by the condensate in place of each trial, gas by its dry gas. */
export interface RecoveryTotals {
  trials: number;
  condensateInPlaceStb: number;
  dryGasInPlaceScf: number;
  leftInRockStb: number;
  leftInGasStb: number;
  condensateStb: Record<RecoveryPhaseName, number>;
  gasScf: Record<RecoveryPhaseName, number>;
  injectedScf: number;
  producedWhileCyclingScf: number;
  fuelScf: number;
  makeUpScf: number;
  pressureAtEndPsia: number;
  saturatedTrials: number;
  refused: Partial<Record<RefusalName, number>>;
}

const noPhases = (): Record<RecoveryPhaseName, number> => ({
  aboveDewPoint: 0,
  belowDewPoint: 0,
  cycling: 0,
  blowdown: 0,
});

export function createTotals(): RecoveryTotals {
  return {
    trials: 0,
    condensateInPlaceStb: 0,
    dryGasInPlaceScf: 0,
    leftInRockStb: 0,
    leftInGasStb: 0,
    condensateStb: noPhases(),
    gasScf: noPhases(),
    injectedScf: 0,
    producedWhileCyclingScf: 0,
    fuelScf: 0,
    makeUpScf: 0,
    pressureAtEndPsia: 0,
    saturatedTrials: 0,
    refused: {},
  };
}

/** Sums over the trials of two parts of a run. */
export function addTotals(a: RecoveryTotals, b: RecoveryTotals): RecoveryTotals {
  const phases = (x: Record<RecoveryPhaseName, number>, y: Record<RecoveryPhaseName, number>) => ({
    aboveDewPoint: x.aboveDewPoint + y.aboveDewPoint,
    belowDewPoint: x.belowDewPoint + y.belowDewPoint,
    cycling: x.cycling + y.cycling,
    blowdown: x.blowdown + y.blowdown,
  });
  const refused = { ...a.refused };
  for (const [name, count] of Object.entries(b.refused) as [RefusalName, number][]) {
    refused[name] = (refused[name] ?? 0) + count;
  }
  return {
    trials: a.trials + b.trials,
    condensateInPlaceStb: a.condensateInPlaceStb + b.condensateInPlaceStb,
    dryGasInPlaceScf: a.dryGasInPlaceScf + b.dryGasInPlaceScf,
    leftInRockStb: a.leftInRockStb + b.leftInRockStb,
    leftInGasStb: a.leftInGasStb + b.leftInGasStb,
    condensateStb: phases(a.condensateStb, b.condensateStb),
    gasScf: phases(a.gasScf, b.gasScf),
    injectedScf: a.injectedScf + b.injectedScf,
    producedWhileCyclingScf: a.producedWhileCyclingScf + b.producedWhileCyclingScf,
    fuelScf: a.fuelScf + b.fuelScf,
    makeUpScf: a.makeUpScf + b.makeUpScf,
    pressureAtEndPsia: a.pressureAtEndPsia + b.pressureAtEndPsia,
    saturatedTrials: a.saturatedTrials + b.saturatedTrials,
    refused,
  };
}

const DEPLETION_PHASES = ["aboveDewPoint", "belowDewPoint"] as const;
const CYCLING_PHASES = [...DEPLETION_PHASES, "cycling", "blowdown"] as const;

/**
 * What a plan did over the trials, as shares of mean volumes.
 *
 * @param totals  of trials none of which was refused
 * @param inputs  percentiles of the plan's inputs as sampled
 */
export function summariseRecovery(
  { plan, cycling }: CompiledPlan,
  totals: RecoveryTotals,
  inputs: RecoverySummary["inputs"],
): RecoverySummary {
  const { trials } = totals;
  const ofCondensate = (stb: number) =>
    totals.condensateInPlaceStb > 0 ? stb / totals.condensateInPlaceStb : 0;
  const ofGas = (scf: number) => scf / totals.dryGasInPlaceScf;
  const phases = (cycling ? CYCLING_PHASES : DEPLETION_PHASES).map((name) => ({
    name,
    condensateShare: ofCondensate(totals.condensateStb[name]),
    gasShare: ofGas(totals.gasScf[name]),
  }));
  return {
    concept: plan.concept,
    route: plan.curve.route,
    inputs,
    shares: {
      toTank: phases.reduce((sum, { condensateShare }) => sum + condensateShare, 0),
      leftInRock: ofCondensate(totals.leftInRockStb),
      leftInGas: ofCondensate(totals.leftInGasStb),
    },
    phases,
    gasBalance: cycling && {
      injectedScf: totals.injectedScf / trials,
      producedWhileCyclingScf: totals.producedWhileCyclingScf / trials,
      fuelScf: totals.fuelScf / trials,
      makeUpScf: totals.makeUpScf / trials,
      pressureAtEndPsia: totals.pressureAtEndPsia / trials,
    },
    saturatedShare: totals.saturatedTrials / trials,
  };
}
