import { zAtReducedPressureOverZ } from "../gas/z-factor";
import {
  contentsAboveDewPoint,
  contentsAtMoles,
  createContents,
  producedAboveDewPoint,
  type Contents,
  type Reservoir,
} from "./depletion";
import type { FineCurve } from "./fine-curve";
import type { Cycling } from "./recovery-plan-schema";

/** One reservoir that is cycled. */
export interface CyclingCase {
  /** E = Es Ed: share of the gas phase whose condensate is displaced */
  displaced: number;
  /** (p / z of the injected gas) / (pi / zi) when injection begins */
  injectedDensityAtStart: number;
  /** the same at abandonment */
  injectedDensityAtEnd: number;
  /** surface gas in a scf of wellstream */
  dryGasFraction: number;
  /** of the reservoir's gas, for its z above the dew point */
  pseudocriticalPressurePsia: number;
  reducedTemperature: number;
}

/** What cycling and the blowdown after it give. Gas as shares of the dry gas in place, net of fuel and of bought gas. */
export interface CyclingOutcome {
  condensateWhileCycling: number;
  condensateInBlowdown: number;
  /** below zero when gas has to be bought */
  gasWhileCycling: number;
  gasInBlowdown: number;
  condensateInRock: number;
  condensateInGas: number;
  injected: number;
  producedWhileCycling: number;
  fuel: number;
  makeUp: number;
  pressureAtEndPsia: number;
  /** why the case cannot be; null when it can */
  refusal: "sweepAboveInjected" | "endBelowAbandonment" | "noNetGas" | null;
}

export function createCyclingOutcome(): CyclingOutcome {
  return {
    condensateWhileCycling: 0,
    condensateInBlowdown: 0,
    gasWhileCycling: 0,
    gasInBlowdown: 0,
    condensateInRock: 0,
    condensateInGas: 0,
    injected: 0,
    producedWhileCycling: 0,
    fuel: 0,
    makeUp: 0,
    pressureAtEndPsia: 0,
    refusal: null,
  };
}

const middle = createContents();
const final = createContents();
const average = createContents();
const contentNames = Object.keys(average) as (keyof Contents)[];

/**
 * Dry-gas cycling from one state of a reservoir, then blowdown to abandonment. With E = Es Ed, contents at the start
 * (c), on average while gas is displaced (m; the same as c when pressure is maintained, else over equal steps of moles
 * down to the end of injection, by Simpson's rule) and at abandonment (a):
 *
 *     condensate = produced(c) + E [produced(m) - produced(c) + in gas(m)] + (1 - E) [produced(a) - produced(c)]
 *     sales gas  = the same of surface gas - fuel - injected gas left at abandonment
 *
 * Only condensate in the gas phase is displaced. Of the liquid that has dropped out in the swept part, injected gas
 * takes up
 *
 *     r min(E in rock(m), I in gas(m) / gas in gas(m))
 *
 * no more than there is, and no more than saturates it; with r = 0 it stays, which is on the safe side and by much when
 * the pressure declines below the dew point. What is not displaced, swept or not, depletes by the curve.
 *
 * Gas balance, in shares of the dry gas in place. The injected volume V is counted in hydrocarbon pore volumes at the
 * pressure at which injection begins:
 *
 *     injected I = V (pc / z inj) / (pi / zi) / fg
 *     maintained: produced = E gas in gas(c) + I (V - E Sg) / V       make-up = what the produced gas less fuel lacks
 *     declining:  produced = I / (1 - fuel), no make-up; moles left = moles at start - fuel - condensate displaced
 *                 and taken up, which gives the pressure at the end by p / z with two-phase z
 *
 * @param start        contents when injection begins; `abandoned` at the end of depletion. Both unchanged
 * @param into         overwritten
 * @see C. H. Whitson, M. R. Brule, Phase Behavior, SPE Monograph 20 (2000), chapter 8 (gas cycling; the form with one
 *      sweep and one displacement efficiency is common practice, no source)
 */
export function cycle(
  curve: FineCurve,
  reservoir: Reservoir,
  cycling: Cycling,
  one: CyclingCase,
  start: Contents,
  abandoned: Contents,
  into: CyclingOutcome,
): void {
  const { displaced, dryGasFraction } = one;
  const { pressure, injectedPoreVolumes, fuelFraction, revaporisation = 0 } = cycling;
  const densityAtStart = one.injectedDensityAtStart / dryGasFraction;
  const injected = injectedPoreVolumes * densityAtStart;
  let produced: number;
  let swept = start;
  let takenUp: number;
  if (pressure === "maintained") {
    produced =
      displaced * start.gasInGas +
      (injectedPoreVolumes - displaced * start.gasSaturation) * densityAtStart;
    takenUp = revaporisation * liquidTakenUp(displaced, injected, swept);
    into.pressureAtEndPsia = start.pressurePsia;
  } else {
    produced = injected / (1 - fuelFraction);
    const gasLost = dryGasFraction * fuelFraction * produced;
    const liquidLost = displaced * start.condensateInGas;
    fillDecline(curve, reservoir, one, start, gasLost + (1 - dryGasFraction) * liquidLost);
    takenUp = revaporisation * liquidTakenUp(displaced, injected, average);
    if (takenUp > 0) {
      // Once more with what was taken up: it is a few hundredths of the moles lost.
      const allLost = gasLost + (1 - dryGasFraction) * (liquidLost + takenUp);
      fillDecline(curve, reservoir, one, start, allLost);
      takenUp = revaporisation * liquidTakenUp(displaced, injected, average);
    }
    swept = average;
    into.pressureAtEndPsia = final.pressurePsia;
  }
  const fuel = fuelFraction * produced;
  const makeUp = pressure === "maintained" ? Math.max(0, injected - produced + fuel) : 0;
  const injectedLeft =
    (displaced * swept.gasSaturation * one.injectedDensityAtEnd) / dryGasFraction;
  const rest = 1 - displaced;
  const gas =
    displaced * (swept.gasProduced - start.gasProduced + swept.gasInGas) +
    rest * (abandoned.gasProduced - start.gasProduced) -
    fuel -
    injectedLeft;

  into.injected = injected;
  into.producedWhileCycling = produced;
  into.fuel = fuel;
  into.makeUp = makeUp;
  into.condensateWhileCycling =
    displaced * (swept.condensateProduced - start.condensateProduced + swept.condensateInGas) +
    takenUp;
  into.condensateInBlowdown = rest * (abandoned.condensateProduced - start.condensateProduced);
  into.gasWhileCycling = produced - fuel - injected;
  into.gasInBlowdown = gas - into.gasWhileCycling;
  into.condensateInRock =
    displaced * swept.condensateInRock - takenUp + rest * abandoned.condensateInRock;
  into.condensateInGas = rest * abandoned.condensateInGas;
  into.refusal = refusalOf(
    start.gasProduced + gas,
    injectedPoreVolumes < displaced * start.gasSaturation || produced < displaced * start.gasInGas,
    into.pressureAtEndPsia > abandoned.pressurePsia,
  );
}

/** No more than there is, and no more than saturates the injected gas. */
function liquidTakenUp(displaced: number, injected: number, swept: Contents): number {
  if (!(swept.gasInGas > 0)) return 0;
  const held = (injected * swept.condensateInGas) / swept.gasInGas;
  return Math.min(displaced * swept.condensateInRock, held);
}

/** Contents half-way and at the end of a loss of moles, and on average on the way. */
function fillDecline(
  curve: FineCurve,
  reservoir: Reservoir,
  one: CyclingCase,
  start: Contents,
  lost: number,
): void {
  contentsAtLeft(curve, reservoir, one, start.wellstreamLeft - lost / 2, middle);
  contentsAtLeft(curve, reservoir, one, start.wellstreamLeft - lost, final);
  fillAverage(start, middle, final);
}

function fillAverage(first: Contents, second: Contents, third: Contents): void {
  for (const name of contentNames) {
    average[name] = (first[name] + 4 * second[name] + third[name]) / 6;
  }
}

function refusalOf(
  netGas: number,
  sweepAboveInjected: boolean,
  endsAboveAbandonment: boolean,
): CyclingOutcome["refusal"] {
  if (sweepAboveInjected) return "sweepAboveInjected";
  if (!endsAboveAbandonment) return "endBelowAbandonment";
  return netGas >= 0 ? null : "noNetGas";
}

/** Contents with a share of the moles left, on either side of the dew point. */
function contentsAtLeft(
  curve: FineCurve,
  reservoir: Reservoir,
  { pseudocriticalPressurePsia, reducedTemperature }: CyclingCase,
  left: number,
  into: Contents,
): void {
  if (left >= 1 - producedAboveDewPoint(curve, reservoir)) {
    const pressureOverZ = left * reservoir.initialPressureOverZ;
    const z = zAtReducedPressureOverZ(
      pressureOverZ / pseudocriticalPressurePsia,
      reducedTemperature,
    );
    contentsAboveDewPoint(pressureOverZ * z, left, into);
  } else {
    contentsAtMoles(curve, reservoir, left, into);
  }
}
