/** Fits the declared adjustments of a characterisation to a laboratory's dew point and depletion. */
import type { Stream } from "../composition/stream";
import { ConvergenceError, DomainError } from "../errors";
import { characterise } from "../equation-of-state/characterise";
import {
  tuningBounds,
  type Adjustments,
  type Characterisation,
  type TunableName,
} from "../equation-of-state/characterisation-schema";
import { fitLeastSquares } from "../numerics/least-squares";
import type { Warning } from "../warnings";
import type { DepletionTable } from "./depletion-table-schema";
import { psia } from "./findings";
import { depleteCell, type SimulatedDepletion } from "./simulate-depletion";

/**
 * What a miss counts: one unit of each. The dew point decides where liquid begins, so it weighs most; liquid and
 * produced wellstream weigh by what a laboratory repeats. Common practice, no source.
 */
const ONE_UNIT = { dewPointRelative: 0.001, liquidPoints: 1, producedPoints: 0.5 };
/** Of the sum of squares: a thirtieth of a unit in one figure. */
const NEGLIGIBLE_IMPROVEMENT = 1e-3;
/** Below this a cell is blown down rather than depleted step by step, psia. */
const BLOWDOWN_PSIA = 100;
const DEW_POINT_MISS = 0.01;
const STRONG_CHANGE = 0.1;

export interface FitRow {
  readonly pressurePsia: number;
  /** null where the equation of state is not asked, or has no answer */
  readonly liquidPercent: number | null;
  readonly cumulativeProducedMolePercent: number | null;
}

export interface Fit {
  readonly dewPointPsia: number;
  /** one for every row of the study */
  readonly rows: readonly FitRow[];
  /** sum of squares that was minimised */
  readonly objective: number;
  /** mean absolute, over the rows with a measured liquid below the dew point; null when there is none */
  readonly averageLiquidErrorPoints: number | null;
}

export interface Tuning {
  readonly characterisation: Characterisation;
  readonly before: Fit;
  readonly after: Fit;
  readonly changes: readonly {
    readonly name: TunableName;
    readonly from: number;
    readonly to: number;
    readonly atBound: boolean;
  }[];
  readonly iterations: number;
  readonly warnings: Warning[];
}

export interface TuningProblem {
  readonly stream: Stream;
  /** where the search begins; what is not among `tunables` stays as it is */
  readonly characterisation: Characterisation;
  readonly table: DepletionTable;
  readonly tunables: readonly TunableName[];
  /** called after every improvement with the sum of squares */
  readonly onProgress?: (progress: { iteration: number; objective: number }) => void;
}

/** A figure of the study that the fit is held against. */
interface Target {
  readonly row: number;
  readonly pressurePsia: number;
  readonly column: "liquidPercent" | "cumulativeProducedMolePercent";
  readonly measured: number;
}

function targetsOf(table: DepletionTable): Target[] {
  return table.rows.flatMap((values, row) => {
    const { pressurePsia } = values;
    if (pressurePsia >= table.dewPointPsia || pressurePsia < BLOWDOWN_PSIA) return [];
    return (["liquidPercent", "cumulativeProducedMolePercent"] as const).flatMap((column) => {
      const measured = values[column];
      return measured === null ? [] : [{ row, pressurePsia, column, measured }];
    });
  });
}

function withAdjustments(
  characterisation: Characterisation,
  tunables: readonly TunableName[],
  point: readonly number[],
): Characterisation {
  const adjustments: Adjustments = { ...characterisation.adjustments };
  tunables.forEach((name, i) => (adjustments[name] = point[i]));
  return { ...characterisation, adjustments };
}

/**
 * A figure of a simulated depletion at one of the study's pressures. Above the simulated dew point there is no liquid,
 * and the gas that would have to be put back counts as produced below nothing, so that the figure has no kink there.
 */
function figure(
  simulated: SimulatedDepletion,
  pressurePsia: number,
  column: Target["column"],
): number {
  const step = simulated.steps.find((at) => at.pressurePsia === pressurePsia);
  if (step) {
    return 100 * (column === "liquidPercent" ? step.liquidFraction : step.producedFraction);
  }
  return column === "liquidPercent" ? 0 : 100 * (1 - pressurePsia / simulated.dewPointPsia);
}

function residualsOf(
  simulated: SimulatedDepletion,
  table: DepletionTable,
  targets: readonly Target[],
): Float64Array {
  const residuals = new Float64Array(targets.length + 1);
  residuals[0] = (simulated.dewPointPsia / table.dewPointPsia - 1) / ONE_UNIT.dewPointRelative;
  targets.forEach(({ pressurePsia, column, measured }, index) => {
    const unit = column === "liquidPercent" ? ONE_UNIT.liquidPoints : ONE_UNIT.producedPoints;
    residuals[index + 1] = (figure(simulated, pressurePsia, column) - measured) / unit;
  });
  return residuals;
}

function fitOf(
  simulated: SimulatedDepletion,
  table: DepletionTable,
  targets: readonly Target[],
): Fit {
  const isBelow = (pressurePsia: number) =>
    simulated.steps.some((step) => step.pressurePsia === pressurePsia);
  const liquids = targets.filter(({ column }) => column === "liquidPercent");
  return {
    dewPointPsia: simulated.dewPointPsia,
    rows: table.rows.map(({ pressurePsia }) => {
      const isStep = isBelow(pressurePsia);
      return {
        pressurePsia,
        liquidPercent: isStep ? figure(simulated, pressurePsia, "liquidPercent") : null,
        cumulativeProducedMolePercent: isStep
          ? figure(simulated, pressurePsia, "cumulativeProducedMolePercent")
          : null,
      };
    }),
    objective: residualsOf(simulated, table, targets).reduce((sum, r) => sum + r * r, 0),
    averageLiquidErrorPoints:
      liquids.length === 0
        ? null
        : liquids.reduce(
            (sum, { pressurePsia, measured }) =>
              sum + Math.abs(figure(simulated, pressurePsia, "liquidPercent") - measured),
            0,
          ) / liquids.length,
  };
}

function assertTunables(characterisation: Characterisation, tunables: readonly TunableName[]) {
  if (tunables.length === 0) {
    throw new DomainError("A regression needs something it may move", { input: "tunables" });
  }
  if (new Set(tunables).size < tunables.length) {
    throw new DomainError("An adjustment is named twice", { input: "tunables" });
  }
  for (const name of tunables) {
    const value = characterisation.adjustments[name];
    const { lowest, highest } = tuningBounds[name];
    if (!(value >= lowest && value <= highest)) {
      throw new DomainError(
        `The regression keeps this adjustment between ${lowest} and ${highest}; it cannot begin at ${value}`,
        { input: `characterisation.adjustments.${name}`, value },
      );
    }
  }
}

function warningsOf(
  after: Fit,
  changes: Tuning["changes"],
  table: DepletionTable,
  figures: number,
): Warning[] {
  const warnings: Warning[] = [];
  const dewPoint = after.dewPointPsia;
  if (Math.abs(dewPoint / table.dewPointPsia - 1) > DEW_POINT_MISS) {
    warnings.push({
      code: "dew_point_missed",
      severity: "warning",
      input: "table.dewPointPsia",
      message:
        `The fitted dew point is ${psia(dewPoint)}, the measured one ${psia(table.dewPointPsia)}. ` +
        "Let more adjustments move, or split heptanes plus otherwise.",
    });
  }
  for (const { name, to, atBound } of changes) {
    if (!atBound) continue;
    warnings.push({
      code: "adjustment_at_bound",
      severity: "warning",
      input: `characterisation.adjustments.${name}`,
      message:
        `This adjustment ended at its bound of ${to}. The fit wanted to go farther than the properties of heptanes plus ` +
        "allow, which says that something else is wrong.",
    });
  }
  for (const { name, to } of changes) {
    if (name !== "heavyCriticalTemperatureFactor" && name !== "heavyAcentricFactorFactor") continue;
    if (Math.abs(to - 1) <= STRONG_CHANGE) continue;
    warnings.push({
      code: "strong_adjustment",
      severity: "warning",
      input: `characterisation.adjustments.${name}`,
      message:
        `This adjustment is ${to.toFixed(3)}, more than a tenth from untouched. Within the study's range the fluid follows the ` +
        "laboratory; beyond it, it is a curve fit.",
    });
  }
  const shift = changes.find(({ name }) => name === "heavyVolumeShiftFactor");
  if (shift && Math.abs(shift.to - 1) > STRONG_CHANGE) {
    warnings.push({
      code: "condensate_density_moved",
      severity: "warning",
      input: "characterisation.adjustments.heavyVolumeShiftFactor",
      message:
        `The volume shift of heptanes plus was multiplied by ${shift.to.toFixed(3)}, so its density at 60 °F is no longer the ` +
        "measured one. Stock-tank barrels change with it; compare the condensate's API gravity.",
    });
  }
  if (figures < changes.length) {
    warnings.push({
      code: "few_figures",
      severity: "warning",
      input: "tunables",
      message: `${changes.length} adjustments were fitted to ${figures} figures; many other sets would fit as well.`,
    });
  }
  return warnings;
}

/**
 * Regression of the chosen adjustments, and of nothing else, to the measured dew point, liquid curve and produced
 * wellstream, at the study's own pressures and temperature:
 *
 *     minimise  sum ((dew point error / 0.1 %)2 + (liquid error / 1 point)2 + (produced error / 0.5 points)2)
 *
 * within `tuningBounds`, by Levenberg and Marquardt's method. Rows below 100 psia are not fitted: a laboratory blows the
 * cell down from there. The outcome is a proposal: it changes nothing until somebody accepts it.
 *
 * @throws {DomainError} when nothing or something twice is to move, an adjustment begins outside its bounds, or the
 *   fluid has no dew point to begin with
 * @throws {ConvergenceError} when no set of these adjustments comes nearer to the laboratory, or the search does not
 *   settle
 * @see K. H. Coats, G. T. Smart, SPE Reservoir Eng. 1 (May 1986) 277-299, on regressing few heavy-end parameters
 */
export function tune(problem: TuningProblem): Tuning {
  const { stream, characterisation, table, tunables, onProgress } = problem;
  assertTunables(characterisation, tunables);
  if (stream.heptanesPlus === null) {
    throw new DomainError("The fluid has no heptanes plus, whose properties alone are tuned", {
      input: "sheet.stream.plus",
    });
  }
  const targets = targetsOf(table);
  const pressures = [...new Set(table.rows.map(({ pressurePsia }) => pressurePsia))].filter(
    (pressure) => pressure < table.dewPointPsia && pressure >= BLOWDOWN_PSIA,
  );
  if (pressures.length === 0) {
    throw new DomainError("The study has no row below its dew point to fit to", {
      input: "table.rows",
    });
  }
  const simulate = (point: readonly number[]) =>
    depleteCell(
      characterise(stream, withAdjustments(characterisation, tunables, point)),
      table.temperatureDegF,
      pressures,
    );

  const start = tunables.map((name) => characterisation.adjustments[name]);
  const before = fitOf(simulate(start), table, targets);
  const fit = fitLeastSquares({
    start,
    lowest: tunables.map((name) => tuningBounds[name].lowest),
    highest: tunables.map((name) => tuningBounds[name].highest),
    residuals: (point) => {
      try {
        return residualsOf(simulate(point), table, targets);
      } catch (error) {
        // On the way the fluid may lose its dew point; the search turns back there.
        if (error instanceof DomainError || error instanceof ConvergenceError) return null;
        throw error;
      }
    },
    negligibleImprovement: NEGLIGIBLE_IMPROVEMENT,
    onProgress,
  });
  if (!(fit.objective < before.objective)) {
    throw new ConvergenceError(
      "No change of the chosen adjustments brings the fluid nearer to the laboratory's figures",
      { objective: before.objective, tunables: tunables.join(", ") },
    );
  }
  const after = fitOf(simulate(fit.point), table, targets);
  const changes = tunables.map((name, i) => ({
    name,
    from: start[i],
    to: fit.point[i],
    atBound:
      fit.point[i] <= tuningBounds[name].lowest || fit.point[i] >= tuningBounds[name].highest,
  }));
  return {
    characterisation: withAdjustments(characterisation, tunables, fit.point),
    before,
    after,
    changes,
    iterations: fit.iterations,
    warnings: warningsOf(after, changes, table, targets.length + 1),
  };
}
