import { CANONICAL_CONSTANTS } from "../units/standard-conditions";
import { degreesRankine, SQUARE_FEET_PER_ACRE } from "../units/conversions";
import {
  dryGasFractionAtYield,
  wellstreamGravityAtYield,
  yieldConstants,
  type Wellstream,
  type YieldConstants,
} from "../fluid/wellstream";
import {
  pseudocriticalConstants,
  pseudocriticalPressurePsia,
  pseudocriticalTemperatureDegR,
  type Impurities,
  type PseudocriticalConstants,
  type Pseudocriticals,
} from "../gas/pseudocritical";
import type { CompiledPlan } from "../recovery/compile-plan";
import type { PlanInputName } from "../recovery/recovery-plan-schema";
import type { RecoveryTotals } from "../recovery/recovery-totals";
import { fillRecoveries, type RecoveryColumns } from "../recovery/trial-recovery";
import type { InputName } from "./inputs-schema";
import type { DerivedName, RecoveryName, ResultName } from "./results-schema";
import { fillZFactors } from "./trial-z";

/** What stays the same in every trial of one reservoir. */
export interface FluidConstants {
  readonly pseudocritical: PseudocriticalConstants;
  readonly yield: YieldConstants;
}

export function fluidConstants(wellstream: Wellstream, impurities: Impurities): FluidConstants {
  return {
    pseudocritical: pseudocriticalConstants(impurities),
    yield: yieldConstants(wellstream),
  };
}

/** One array per quantity, an element per trial. */
export type TrialColumns<Name extends string> = Record<Name, Float64Array>;

/** Scratch of {@link evaluateTrials}: one array per name. */
export interface TrialScratch {
  readonly reducedPressure: Float64Array;
  readonly reducedTemperature: Float64Array;
}

/** A recovery plan with the columns that its trials need. */
export interface TrialPlan {
  readonly compiled: CompiledPlan;
  readonly inputs: TrialColumns<PlanInputName>;
  readonly columns: RecoveryColumns;
}

export interface EvaluatedTrials {
  /** trials with no possible volume in place (their values are not finite) */
  readonly impossible: number;
  /** null without a plan */
  readonly recovery: RecoveryTotals | null;
}

/**
 * Wet gas, dry gas and condensate of every trial, from its ten inputs.
 *
 * The sampled yield y (STB per scf of surface gas) sets how much of a standard volume of wellstream is liquid, so
 * gravity, dry-gas fraction and everything after them follow it trial by trial:
 *
 *     gamma_w = (gamma_g + m y) / (1 + Veq y)         fg = 1 / (1 + Veq y)
 *     z = DAK(p / Ppc(gamma_w), T / Tpc(gamma_w))     Bg = (psc / Tsc) z T / p
 *     G = 43,560 A h phi (1 - Sw) / Bg                dry = fg G        condensate = y fg G
 *
 * so that dry + Veq x condensate = G. With Veq the vapour equivalent and m the mass of a barrel (gravity x scf).
 * The equations are those of `inPlace`, which this agrees with to rounding and 1e-8 in z.
 *
 * Recoveries are the sampled ones, or those of the plan.
 *
 * @param inputs  sampled columns, units as their names say
 * @param count   number of trials
 * @param out     overwritten
 */
export function evaluateTrials(
  fluid: FluidConstants,
  inputs: TrialColumns<InputName>,
  plan: TrialPlan | null,
  count: number,
  scratch: TrialScratch,
  out: TrialColumns<ResultName | DerivedName>,
): EvaluatedTrials {
  fillFluid(fluid, inputs, count, scratch, out);
  fillZFactors(scratch.reducedPressure, scratch.reducedTemperature, count, out.zFactor);
  const impossible = fillInPlace(inputs, count, out);
  const recovery =
    plan &&
    fillRecoveries(
      plan.compiled,
      { ...scratch, ...inputs, ...out, plan: plan.inputs, injectedGas: injectedGas(fluid) },
      count,
      plan.columns,
    );
  fillRecoverable(inputs, plan ? plan.columns : inputs, count, out);
  return { impossible, recovery };
}

/** What goes back into the reservoir is the separators' gas. */
function injectedGas({ pseudocritical, yield: constants }: FluidConstants): Pseudocriticals {
  const gravity = wellstreamGravityAtYield(0, constants);
  return {
    temperatureDegR: pseudocriticalTemperatureDegR(gravity, pseudocritical),
    pressurePsia: pseudocriticalPressurePsia(gravity, pseudocritical),
  };
}

function fillFluid(
  fluid: FluidConstants,
  inputs: TrialColumns<InputName>,
  count: number,
  { reducedPressure, reducedTemperature }: TrialScratch,
  out: TrialColumns<ResultName | DerivedName>,
): void {
  const { pressurePsia, temperatureDegF, condensateYieldStbPerMmscf } = inputs;
  const { wellstreamGravity, dryGasFraction, condensateYieldStbPerMmscfWellstream } = out;
  const { pseudocritical } = fluid;
  for (let trial = 0; trial < count; trial += 1) {
    const yieldStbPerMmscf = condensateYieldStbPerMmscf[trial];
    const surfaceFraction = dryGasFractionAtYield(yieldStbPerMmscf, fluid.yield);
    const gravity = wellstreamGravityAtYield(yieldStbPerMmscf, fluid.yield);
    wellstreamGravity[trial] = gravity;
    dryGasFraction[trial] = surfaceFraction;
    condensateYieldStbPerMmscfWellstream[trial] = yieldStbPerMmscf * surfaceFraction;
    reducedTemperature[trial] =
      degreesRankine(temperatureDegF[trial]) /
      pseudocriticalTemperatureDegR(gravity, pseudocritical);
    reducedPressure[trial] =
      pressurePsia[trial] / pseudocriticalPressurePsia(gravity, pseudocritical);
  }
}

function fillInPlace(
  inputs: TrialColumns<InputName>,
  count: number,
  out: TrialColumns<ResultName | DerivedName>,
): number {
  const { areaAcres, netThicknessFt, porosity, waterSaturation } = inputs;
  const { pressurePsia, temperatureDegF, condensateYieldStbPerMmscf } = inputs;
  const { zFactor, dryGasFraction, gasFormationVolumeFactorCfPerScf } = out;
  const { wetGasPerAcreFootScf, condensatePerAcreFootStb } = out;
  const { wetGasInPlaceScf, dryGasInPlaceScf, condensateInPlaceStb } = out;
  const { volumeFactorCfPerScf } = CANONICAL_CONSTANTS;
  let impossible = 0;
  for (let trial = 0; trial < count; trial += 1) {
    const formationVolumeFactor =
      (volumeFactorCfPerScf * zFactor[trial] * degreesRankine(temperatureDegF[trial])) /
      pressurePsia[trial];
    const wetPerAcreFoot =
      (SQUARE_FEET_PER_ACRE * porosity[trial] * (1 - waterSaturation[trial])) /
      formationVolumeFactor;
    const dryFraction = dryGasFraction[trial];
    const stbPerScf = condensateYieldStbPerMmscf[trial] * 1e-6 * dryFraction;
    const wet = areaAcres[trial] * netThicknessFt[trial] * wetPerAcreFoot;
    const dry = wet * dryFraction;
    const condensate = wet * stbPerScf;
    gasFormationVolumeFactorCfPerScf[trial] = formationVolumeFactor;
    wetGasPerAcreFootScf[trial] = wetPerAcreFoot;
    condensatePerAcreFootStb[trial] = wetPerAcreFoot * stbPerScf;
    wetGasInPlaceScf[trial] = wet;
    dryGasInPlaceScf[trial] = dry;
    condensateInPlaceStb[trial] = condensate;
    // One comparison catches NaN, infinity and a negative volume in any factor.
    if (!(wet >= 0 && condensate >= 0 && dry + condensate < Infinity)) impossible += 1;
  }
  return impossible;
}

function fillRecoverable(
  { salesGasFraction }: TrialColumns<InputName>,
  { gasRecovery, condensateRecovery }: Readonly<Record<RecoveryName, Float64Array>>,
  count: number,
  out: TrialColumns<ResultName | DerivedName>,
): void {
  const { dryGasInPlaceScf, condensateInPlaceStb } = out;
  const { salesGasScf, condensateRecoverableStb, condensateLeftStb } = out;
  for (let trial = 0; trial < count; trial += 1) {
    const condensate = condensateInPlaceStb[trial];
    const recoverable = condensate * condensateRecovery[trial];
    salesGasScf[trial] = dryGasInPlaceScf[trial] * gasRecovery[trial] * salesGasFraction[trial];
    condensateRecoverableStb[trial] = recoverable;
    condensateLeftStb[trial] = condensate - recoverable;
  }
}
