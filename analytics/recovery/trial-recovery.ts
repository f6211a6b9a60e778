import type { Pseudocriticals } from "../gas/pseudocritical";
import { degreesRankine } from "../units/conversions";
import { fillZFactors } from "../volumetrics/trial-z";
import type { CompiledPlan } from "./compile-plan";
import { createCyclingOutcome, cycle, type CyclingCase } from "./cycling";
import {
  contentsAboveDewPoint,
  contentsBelowDewPoint,
  createContents,
  producedAboveDewPoint,
  type Reservoir,
} from "./depletion";
import type { PlanInputName } from "./recovery-plan-schema";
import { createTotals, type RecoveryTotals, type RefusalName } from "./recovery-totals";
import { sweptByWater } from "./water-drive";

/** What recoveries are worked out from: an element per trial. */
export interface RecoveryTrials {
  readonly pressurePsia: Float64Array;
  readonly temperatureDegF: Float64Array;
  readonly zFactor: Float64Array;
  readonly reducedPressure: Float64Array;
  readonly reducedTemperature: Float64Array;
  readonly dryGasFraction: Float64Array;
  readonly dryGasInPlaceScf: Float64Array;
  readonly condensateInPlaceStb: Float64Array;
  /** those that the plan does not use are not looked at */
  readonly plan: Readonly<Record<PlanInputName, Float64Array>>;
  /** of the separator's gas, which is what is injected */
  readonly injectedGas: Pseudocriticals;
}

/** Results and scratch of {@link fillRecoveries}. */
export interface RecoveryColumns {
  readonly gasRecovery: Float64Array;
  readonly condensateRecovery: Float64Array;
  readonly scratchPressure: Float64Array;
  readonly scratchTemperature: Float64Array;
  readonly dewPointZ: Float64Array;
  readonly startZ: Float64Array;
  readonly injectedStartZ: Float64Array;
  readonly injectedEndZ: Float64Array;
}

export function createRecoveryColumns(count: number): RecoveryColumns {
  const numbers = () => new Float64Array(count);
  return {
    gasRecovery: numbers(),
    condensateRecovery: numbers(),
    scratchPressure: numbers(),
    scratchTemperature: numbers(),
    dewPointZ: numbers(),
    startZ: numbers(),
    injectedStartZ: numbers(),
    injectedEndZ: numbers(),
  };
}

/**
 * Gas and condensate recovery of every trial by a plan, as fractions of the dry gas and condensate in place.
 *
 * @param count    number of trials
 * @param columns  overwritten; recoveries of a refused trial are NaN
 * @returns  sums over the trials, with the number refused for each reason
 */
export function fillRecoveries(
  compiled: CompiledPlan,
  trials: RecoveryTrials,
  count: number,
  columns: RecoveryColumns,
): RecoveryTotals {
  fillDewPointZ(compiled, trials, count, columns);
  if (compiled.cycling) fillCyclingZ(compiled, trials, count, columns);
  return compiled.cycling
    ? fillCycled(compiled, trials, count, columns)
    : fillDepleted(compiled, trials, count, columns);
}

function fillDewPointZ(
  { curve }: CompiledPlan,
  { pressurePsia, reducedPressure, reducedTemperature }: RecoveryTrials,
  count: number,
  { scratchPressure, dewPointZ }: RecoveryColumns,
): void {
  for (let t = 0; t < count; t += 1) {
    scratchPressure[t] = (reducedPressure[t] * curve.dewPointPsia) / pressurePsia[t];
  }
  fillZFactors(scratchPressure, reducedTemperature, count, dewPointZ);
}

/** z of the reservoir's gas when injection begins, and of the injected gas then and at abandonment. */
function fillCyclingZ(
  { cycling }: CompiledPlan,
  trials: RecoveryTrials,
  count: number,
  { scratchPressure, scratchTemperature, startZ, injectedStartZ, injectedEndZ }: RecoveryColumns,
): void {
  const { pressurePsia, reducedPressure, reducedTemperature, temperatureDegF } = trials;
  const { injectedGas, plan } = trials;
  const beginsAt = cycling?.pressurePsia ?? 0;
  for (let t = 0; t < count; t += 1) {
    scratchPressure[t] = reducedPressure[t] * Math.min(1, beginsAt / pressurePsia[t]);
  }
  fillZFactors(scratchPressure, reducedTemperature, count, startZ);
  for (let t = 0; t < count; t += 1) {
    scratchTemperature[t] = degreesRankine(temperatureDegF[t]) / injectedGas.temperatureDegR;
    scratchPressure[t] = Math.min(beginsAt, pressurePsia[t]) / injectedGas.pressurePsia;
  }
  fillZFactors(scratchPressure, scratchTemperature, count, injectedStartZ);
  for (let t = 0; t < count; t += 1) {
    scratchPressure[t] = plan.abandonmentPressurePsia[t] / injectedGas.pressurePsia;
  }
  fillZFactors(scratchPressure, scratchTemperature, count, injectedEndZ);
}

const reservoir: Reservoir = {
  initialPressurePsia: 0,
  initialPressureOverZ: 0,
  dewPointPressureOverZ: 0,
  condensateCurveFactor: 1,
};
const abandoned = createContents();
const start = createContents();
const cycled = createCyclingOutcome();

/** Sets `reservoir` and its contents at abandonment to those of one trial. */
function takeTrial(
  { curve }: CompiledPlan,
  { pressurePsia, zFactor, plan }: RecoveryTrials,
  { dewPointZ }: RecoveryColumns,
  t: number,
): void {
  reservoir.initialPressurePsia = pressurePsia[t];
  reservoir.initialPressureOverZ = pressurePsia[t] / zFactor[t];
  reservoir.dewPointPressureOverZ = curve.dewPointPsia / dewPointZ[t];
  reservoir.condensateCurveFactor = plan.condensateCurveFactor[t];
  contentsBelowDewPoint(curve, reservoir, plan.abandonmentPressurePsia[t], abandoned);
}

function fillDepleted(
  compiled: CompiledPlan,
  trials: RecoveryTrials,
  count: number,
  columns: RecoveryColumns,
): RecoveryTotals {
  const { curve, plan } = compiled;
  const { condensateInPlaceStb, dryGasInPlaceScf } = trials;
  const totals = createTotals();
  for (let t = 0; t < count; t += 1) {
    takeTrial(compiled, trials, columns, t);
    const above = producedAboveDewPoint(curve, reservoir);
    const water = sweptByWater(plan.waterDrive, abandoned);
    const condensate = abandoned.condensateProduced + water * abandoned.condensateInGas;
    const gas = abandoned.gasProduced + water * abandoned.gasInGas;
    const refusal = refusalOfDepletion(trials, t);
    if (refusal) refuse(totals, refusal);
    const stb = condensateInPlaceStb[t];
    const scf = dryGasInPlaceScf[t];
    columns.condensateRecovery[t] = refusal ? NaN : condensate;
    columns.gasRecovery[t] = refusal ? NaN : gas;
    addTrial(compiled, trials, t, totals);
    totals.condensateStb.aboveDewPoint += stb * above;
    totals.condensateStb.belowDewPoint += stb * (condensate - above);
    totals.gasScf.aboveDewPoint += scf * above;
    totals.gasScf.belowDewPoint += scf * (gas - above);
    totals.leftInRockStb += stb * abandoned.condensateInRock;
    totals.leftInGasStb += stb * (1 - water) * abandoned.condensateInGas;
  }
  return totals;
}

function fillCycled(
  compiled: CompiledPlan,
  trials: RecoveryTrials,
  count: number,
  columns: RecoveryColumns,
): RecoveryTotals {
  const { curve, cycling } = compiled;
  const totals = createTotals();
  if (!cycling) return totals;
  const { condensateInPlaceStb, dryGasInPlaceScf, plan, pressurePsia } = trials;
  const one: CyclingCase = {
    displaced: 0,
    injectedDensityAtStart: 0,
    injectedDensityAtEnd: 0,
    dryGasFraction: 0,
    pseudocriticalPressurePsia: 0,
    reducedTemperature: 0,
  };
  for (let t = 0; t < count; t += 1) {
    takeTrial(compiled, trials, columns, t);
    const initialOverZ = reservoir.initialPressureOverZ;
    // Injection begins at once where the reservoir never had the pressure at which it should.
    const beginsAt = Math.min(cycling.pressurePsia, pressurePsia[t]);
    const above = beginsAt >= curve.dewPointPsia;
    if (above) {
      contentsAboveDewPoint(beginsAt, beginsAt / columns.startZ[t] / initialOverZ, start);
    } else contentsBelowDewPoint(curve, reservoir, beginsAt, start);
    const abandonment = plan.abandonmentPressurePsia[t];
    one.displaced = plan.sweepEfficiency[t] * plan.displacementEfficiency[t];
    one.injectedDensityAtStart = beginsAt / columns.injectedStartZ[t] / initialOverZ;
    one.injectedDensityAtEnd = abandonment / columns.injectedEndZ[t] / initialOverZ;
    one.dryGasFraction = trials.dryGasFraction[t];
    one.pseudocriticalPressurePsia = pressurePsia[t] / trials.reducedPressure[t];
    one.reducedTemperature = trials.reducedTemperature[t];
    cycle(curve, reservoir, cycling, one, start, abandoned, cycled);

    const { injectedDensityAtStart, injectedDensityAtEnd } = one;
    const hasStates = start.wellstreamLeft + injectedDensityAtStart + injectedDensityAtEnd > 0;
    const refusal =
      refusalOfDepletion(trials, t) ??
      (hasStates ? null : "noState") ??
      (abandonment < beginsAt ? null : "abandonmentAboveCycling") ??
      cycled.refusal;
    if (refusal) refuse(totals, refusal);
    const { condensateWhileCycling, condensateInBlowdown, gasWhileCycling, gasInBlowdown } = cycled;
    columns.condensateRecovery[t] = refusal
      ? NaN
      : start.condensateProduced + condensateWhileCycling + condensateInBlowdown;
    columns.gasRecovery[t] = refusal ? NaN : start.gasProduced + gasWhileCycling + gasInBlowdown;
    addTrial(compiled, trials, t, totals);
    const stb = condensateInPlaceStb[t];
    const scf = dryGasInPlaceScf[t];
    const beforeDew = above ? start.gasProduced : producedAboveDewPoint(curve, reservoir);
    totals.condensateStb.aboveDewPoint += stb * beforeDew;
    totals.condensateStb.belowDewPoint += stb * (start.condensateProduced - beforeDew);
    totals.condensateStb.cycling += stb * condensateWhileCycling;
    totals.condensateStb.blowdown += stb * condensateInBlowdown;
    totals.gasScf.aboveDewPoint += scf * beforeDew;
    totals.gasScf.belowDewPoint += scf * (start.gasProduced - beforeDew);
    totals.gasScf.cycling += scf * gasWhileCycling;
    totals.gasScf.blowdown += scf * gasInBlowdown;
    totals.leftInRockStb += stb * cycled.condensateInRock;
    totals.leftInGasStb += stb * cycled.condensateInGas;
    totals.injectedScf += scf * cycled.injected;
    totals.producedWhileCyclingScf += scf * cycled.producedWhileCycling;
    totals.fuelScf += scf * cycled.fuel;
    totals.makeUpScf += scf * cycled.makeUp;
    totals.pressureAtEndPsia += cycled.pressureAtEndPsia;
  }
  return totals;
}

function refusalOfDepletion(
  { pressurePsia, plan }: RecoveryTrials,
  t: number,
): "abandonmentAboveInitial" | "condensateAboveAll" | "noState" | null {
  if (!(plan.abandonmentPressurePsia[t] <= pressurePsia[t])) return "abandonmentAboveInitial";
  if (Number.isNaN(abandoned.condensateProduced)) return "noState";
  return abandoned.condensateProduced <= 1 ? null : "condensateAboveAll";
}

function refuse(totals: RecoveryTotals, refusal: RefusalName): void {
  totals.refused[refusal] = (totals.refused[refusal] ?? 0) + 1;
}

function addTrial(
  { curve }: CompiledPlan,
  { condensateInPlaceStb, dryGasInPlaceScf, pressurePsia }: RecoveryTrials,
  t: number,
  totals: RecoveryTotals,
): void {
  totals.trials += 1;
  totals.condensateInPlaceStb += condensateInPlaceStb[t];
  totals.dryGasInPlaceScf += dryGasInPlaceScf[t];
  if (pressurePsia[t] < curve.dewPointPsia) totals.saturatedTrials += 1;
}
