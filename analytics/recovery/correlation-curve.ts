import { DomainError } from "../errors";
import type { SeparatorTest } from "../fluid/separator-test-schema";
import {
  recombine,
  wellstreamGravityAtYield,
  yieldConstants,
  type Wellstream,
} from "../fluid/wellstream";
import { gasFormationVolumeFactorCfPerScf } from "../gas/formation-volume-factor";
import { pseudocritical, pseudocriticalWarnings } from "../gas/pseudocritical";
import { zFactor, zFactorWarnings } from "../gas/z-factor";
import { CUBIC_FEET_PER_BARREL, degreesRankine } from "../units/conversions";
import type { Warning } from "../warnings";
import type { RecoveryCurve, RecoveryPoint } from "./recovery-curve-schema";

/** The correlation ends at 500 psig. */
const LOWEST_PSIA = 514.7;
/** A dew point closer to that leaves nothing to correlate. */
const LEAST_DEW_POINT_PSIA = 1000;

/**
 * A depletion by the laboratory's tables of the third comparative solution project, 148 STB/MMscf. `fallen` is the share
 * of the way from the dew point (3,443 psia) to 500 psig, `yield` that of the gas produced there over the first; of the
 * liquid in the rock `solutionGas` is its gas, scf/STB, and `shrinkage` its reservoir barrels per stock-tank barrel, from
 * the tables by balance. The last row continues the last two straight.
 *
 * @see D. E. Kenyon, G. A. Behie, J. Pet. Technol. 39 (August 1987) 981-997, tables from memory
 */
const SHAPE = [
  { fallen: 0, yield: 1, solutionGas: 0, shrinkage: 0 },
  { fallen: 0.1462, yield: 0.5908, solutionGas: 1724, shrinkage: 1.842 },
  { fallen: 0.3511, yield: 0.3399, solutionGas: 1304, shrinkage: 1.729 },
  { fallen: 0.556, yield: 0.2258, solutionGas: 887, shrinkage: 1.53 },
  { fallen: 0.7609, yield: 0.1853, solutionGas: 534, shrinkage: 1.342 },
  { fallen: 0.9317, yield: 0.1983, solutionGas: 242, shrinkage: 1.21 },
  { fallen: 1, yield: 0.1983, solutionGas: 125, shrinkage: 1.157 },
] as const;
/** Exponents of the shape that still give a gas condensate: the gas at the end has 4 % of its first yield. */
const STEEPEST = 2;

/**
 * Condensate recovered by depletion from the dew point to 500 psig, STB per barrel of hydrocarbon pore space.
 *
 *     -0.061743 + 143.55 / R + 0.00012184 T + 0.0010114 API
 *
 * From memory and not verified against the paper; its range is not known. On two published depletion studies it is 12 %
 * off either way.
 *
 * @param gasOilRatioScfPerStb  R, gas of all separators, scf/STB
 * @returns  not above zero where the correlation says nothing
 * @see B. A. Eaton, R. H. Jacoby, A new depletion-performance correlation for gas-condensate reservoir fluids, J. Pet.
 *      Technol. 17 (July 1965) 852-856; R. H. Jacoby, R. C. Koeller, V. J. Berry, Trans. AIME 216 (1959) 406-411
 * @example condensateByCorrelationStbPerBarrel(6754, 200, 60) // => 0.044563
 */
export function condensateByCorrelationStbPerBarrel(
  gasOilRatioScfPerStb: number,
  temperatureDegF: number,
  condensateApi: number,
): number {
  return (
    -0.061743 +
    143.55 / gasOilRatioScfPerStb +
    0.00012184 * temperatureDegF +
    0.0010114 * condensateApi
  );
}

export interface CorrelationCurve {
  readonly curve: RecoveryCurve;
  readonly warnings: Warning[];
}

/**
 * A depletion curve when there is no composition: for screening only, and marked so wherever it goes.
 *
 * A tank is depleted from pressure to pressure. The yield of its gas falls as a published study's, raised to the power
 * at which the condensate recovered by 500 psig is Eaton and Jacoby's:
 *
 *     y = Y / Y0 = s(p) ^ k         k = 0 drops no liquid, k = 1 is the study's fluid
 *
 * Gas fills what liquid leaves, by p/z with z of a gas of that yield; liquid r has the study's solution gas and
 * shrinkage. With N STB in a barrel of pores, what a step produces makes condensate C and surface gas G balance:
 *
 *     r   = (1 - C - y (1 - G)) / (1 - Rs Y0 y)     C, G before the step
 *     gas = (1 - N Bo r) (p / z) / (pd / zd) / (fg + (1 - fg) y)
 *     dG  = 1 - G - gas - Rs Y0 r                   dC = y dG
 *
 * On that study, with its surface figures alone, moles produced come within half a point of the published.
 *
 * @param test   figures of the surface; with the dew point unless it is given
 * @param state  `dewPointPsia` null takes the sheet's
 * @throws {DomainError} when no dew point is known, it is below 1,000 psia, or the correlation does not fit such a fluid:
 *   it gives no recovery, one above the gas's, or one below every gas condensate's
 */
export function correlationCurve(
  test: SeparatorTest,
  state: { readonly temperatureDegF: number; readonly dewPointPsia: number | null },
): CorrelationCurve {
  const { temperatureDegF } = state;
  const dewPointPsia = dewPointOf(test, state.dewPointPsia);
  const wellstream = recombine(test);
  const tank = tankOf(test, wellstream, temperatureDegF, dewPointPsia);
  const recovered = condensateByCorrelationStbPerBarrel(
    wellstream.surfaceGasOilRatioScfPerStb,
    temperatureDegF,
    test.condensateApi,
  );
  const points = depleteTank(tank, shapeOf(tank, recovered / tank.condensateStbPerBarrel));
  points.forEach(refuseImpossible);
  const critical = pseudocritical(wellstream.wellstreamGravity, test);
  return {
    curve: { route: "correlation", temperatureDegF, dewPointPsia, points },
    warnings: [
      SCREENING,
      ...wellstream.warnings,
      ...pseudocriticalWarnings(wellstream.wellstreamGravity, test),
      ...zFactorWarnings(
        dewPointPsia / critical.pressurePsia,
        degreesRankine(temperatureDegF) / critical.temperatureDegR,
      ),
    ],
  };
}

/** Pore space full of one fluid at its dew point. */
interface Tank {
  readonly dewPointPsia: number;
  readonly dryGasFraction: number;
  readonly yieldStbPerMmscf: number;
  /** in place, per barrel */
  readonly condensateStbPerBarrel: number;
  /** z of a gas with this share of the first yield */
  readonly zOf: (pressurePsia: number, shareOfYield: number) => number;
}

function tankOf(
  test: SeparatorTest,
  wellstream: Wellstream,
  temperatureDegF: number,
  dewPointPsia: number,
): Tank {
  const { dryGasFraction, condensateYieldStbPerMmscf: yieldStbPerMmscf } = wellstream;
  const constants = yieldConstants(wellstream);
  const zOf = (pressurePsia: number, shareOfYield: number) => {
    const gravity = wellstreamGravityAtYield(shareOfYield * yieldStbPerMmscf, constants);
    const critical = pseudocritical(gravity, test);
    return zFactor(
      pressurePsia / critical.pressurePsia,
      degreesRankine(temperatureDegF) / critical.temperatureDegR,
    );
  };
  const wetScfPerBarrel =
    CUBIC_FEET_PER_BARREL /
    gasFormationVolumeFactorCfPerScf(dewPointPsia, temperatureDegF, zOf(dewPointPsia, 1));
  return {
    dewPointPsia,
    dryGasFraction,
    yieldStbPerMmscf,
    condensateStbPerBarrel:
      wetScfPerBarrel * wellstream.condensateYieldStbPerMmscfWellstream * 1e-6,
    zOf,
  };
}

/** Depletes by the shape to the power of `exponent`. */
function depleteTank(tank: Tank, exponent: number): RecoveryPoint[] {
  const { dewPointPsia, dryGasFraction, yieldStbPerMmscf, condensateStbPerBarrel } = tank;
  const firstZ = tank.zOf(dewPointPsia, 1);
  let gasProduced = 0;
  let condensateProduced = 0;
  return SHAPE.map((row, i) => {
    const y = row.yield ** exponent;
    const solutionGas = row.solutionGas * yieldStbPerMmscf * 1e-6;
    const pressurePsia = dewPointPsia - row.fallen * (dewPointPsia - LOWEST_PSIA);
    const gasZ = tank.zOf(pressurePsia, y);
    const density = pressurePsia / gasZ / (dewPointPsia / firstZ);
    const inRock = (1 - condensateProduced - y * (1 - gasProduced)) / (1 - solutionGas * y);
    const liquidSaturation = condensateStbPerBarrel * row.shrinkage * inRock;
    const gasInGas =
      ((1 - liquidSaturation) * density) / (dryGasFraction + (1 - dryGasFraction) * y);
    const step = i === 0 ? 0 : 1 - gasProduced - gasInGas - solutionGas * inRock;
    gasProduced += step;
    condensateProduced += y * step;
    const wellstreamProduced =
      dryGasFraction * gasProduced + (1 - dryGasFraction) * condensateProduced;
    return {
      pressurePsia,
      wellstreamProduced,
      gasProduced,
      condensateProduced,
      condensateInGas: y * gasInGas,
      liquidSaturation,
      gasZ,
      twoPhaseZ: (firstZ * pressurePsia) / dewPointPsia / (1 - wellstreamProduced),
      producingYieldStbPerMmscf: yieldStbPerMmscf * y,
    };
  });
}

/** The exponent at which the condensate recovered is as given, by bisection. */
function shapeOf(tank: Tank, recovered: number): number {
  const at = (exponent: number) => {
    const points = depleteTank(tank, exponent);
    return points[points.length - 1].condensateProduced;
  };
  const most = at(0);
  const least = at(STEEPEST);
  if (!(recovered > 0)) throw outside("gives no recovery of condensate", recovered);
  if (recovered > most) {
    throw outside(
      `gives ${percent(recovered)} of the condensate at 500 psig, where a gas that drops no liquid gives ` +
        `${percent(most)}: the fluid is too lean for it`,
      recovered,
    );
  }
  if (recovered < least) {
    throw outside(
      `gives ${percent(recovered)} of the condensate at 500 psig, where the richest gas condensate gives ` +
        `${percent(least)}: the fluid is too rich or too heavy for it`,
      recovered,
    );
  }
  let low = 0;
  let high = STEEPEST;
  while (high - low > 1e-12) {
    const middle = (low + high) / 2;
    if (at(middle) > recovered) low = middle;
    else high = middle;
  }
  return high;
}

const outside = (what: string, value: number) =>
  new DomainError(
    `The correlation does not fit this fluid: it ${what}. Enter recoveries, or a composition or a depletion study.`,
    { input: "fluid", value },
  );

/** Near the critical point the study's liquid, made as much as there would be, no longer fits into the pores. */
function refuseImpossible(point: RecoveryPoint, i: number, points: readonly RecoveryPoint[]) {
  const { pressurePsia, gasProduced, condensateInGas, liquidSaturation } = point;
  const rises = i === 0 || gasProduced > points[i - 1].gasProduced;
  if (rises && gasProduced <= 1 && condensateInGas >= 0 && liquidSaturation < 1) return;
  throw outside(
    `leaves nothing to produce at ${Math.round(pressurePsia)} psia beside liquid in ` +
      `${percent(liquidSaturation)} of the pores`,
    liquidSaturation,
  );
}

const percent = (share: number) => `${Number((100 * share).toPrecision(3))} %`;

const SCREENING: Warning = {
  code: "correlation_recovery",
  severity: "warning",
  message:
    "The recovery comes from a correlation of surface figures, quoted from memory and off by about 12 % on two " +
    "published fluids: for screening only. A composition and a depletion study replace it.",
};

function dewPointOf(test: SeparatorTest, given: number | null): number {
  const dewPointPsia = given ?? test.dewPointPsia;
  if (dewPointPsia === null) {
    throw new DomainError("The correlation needs a dew point: measured, or estimated.", {
      input: "dewPointPsia",
    });
  }
  if (!(dewPointPsia >= LEAST_DEW_POINT_PSIA && dewPointPsia < Infinity)) {
    throw new DomainError(
      `The correlation depletes to 500 psig; a dew point of ${dewPointPsia} psia is too low for it.`,
      { input: "dewPointPsia", value: dewPointPsia },
    );
  }
  return dewPointPsia;
}
