import { DomainError } from "../errors";
import type { SeparatorTest } from "../fluid/separator-test-schema";
import { recombine, type Wellstream } from "../fluid/wellstream";
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
/** What the correlation missed on two published studies. */
export const STATED_ERROR_FRACTION = 0.12;

/**
 * Shape of a depletion by the laboratory's tables of the third comparative solution project: `fallen` is the share of
 * the way from the dew point (3,443 psia) to 500 psig, `recovered` the share of the condensate recovered by 500 psig,
 * `liquid` the liquid's share of the pore volume with 148 STB/MMscf, `inRock` the liquid's share of the condensate not
 * produced. The last row continues the last two straight.
 *
 * @see D. E. Kenyon, G. A. Behie, J. Pet. Technol. 39 (August 1987) 981-997, tables from memory
 */
const SHAPE = [
  { fallen: 0, recovered: 0, liquid: 0, inRock: 0 },
  { fallen: 0.1462, recovered: 0.2379, liquid: 0.15, inRock: 0.5105 },
  { fallen: 0.3511, recovered: 0.48, liquid: 0.199, inRock: 0.7679 },
  { fallen: 0.556, recovered: 0.6613, liquid: 0.192, inRock: 0.8795 },
  { fallen: 0.7609, recovered: 0.8137, liquid: 0.171, inRock: 0.9325 },
  { fallen: 0.9317, recovered: 0.9468, liquid: 0.152, inRock: 0.9569 },
  { fallen: 1, recovered: 1, liquid: 0.144, inRock: 0.9666 },
] as const;
const SHAPE_YIELD_STB_PER_MMSCF = 148;

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
 *     condensate  Eaton and Jacoby's recovery at 500 psig, spread over pressure by the shape of a published study
 *     moles       1 - (p / z) / (pd / zd), with the gas's own z
 *     gas         (moles - (1 - fg) condensate) / fg, the balance of the wellstream
 *
 * Below the dew point the gas's own z counts the liquid's moles as produced: on the published study gas recovery comes
 * out 8 points too high at 700 psig.
 *
 * @param test   figures of the surface; with the dew point unless it is given
 * @param state  `dewPointPsia` null takes the sheet's
 * @throws {DomainError} when no dew point is known, it is below 1,000 psia, or the correlation gives no recovery, one
 *   above the gas's, or more gas than there is
 */
export function correlationCurve(
  test: SeparatorTest,
  state: { readonly temperatureDegF: number; readonly dewPointPsia: number | null },
): CorrelationCurve {
  const { temperatureDegF } = state;
  const dewPointPsia = dewPointOf(test, state.dewPointPsia);
  const wellstream = recombine(test);
  const critical = pseudocritical(wellstream.wellstreamGravity, test);
  const reducedTemperature = degreesRankine(temperatureDegF) / critical.temperatureDegR;
  const zAt = (pressure: number) => zFactor(pressure / critical.pressurePsia, reducedTemperature);
  const dewPointZ = zAt(dewPointPsia);
  const recovery = condensateRecovery(test, wellstream, temperatureDegF, {
    pressurePsia: dewPointPsia,
    z: dewPointZ,
  });
  const { dryGasFraction, condensateYieldStbPerMmscf: initialYield } = wellstream;
  const points: RecoveryPoint[] = [];
  for (const { fallen, recovered, liquid, inRock } of SHAPE) {
    const pressurePsia = dewPointPsia - fallen * (dewPointPsia - LOWEST_PSIA);
    const z = zAt(pressurePsia);
    const before = points[points.length - 1];
    const wellstreamProduced = before ? 1 - pressurePsia / z / (dewPointPsia / dewPointZ) : 0;
    const condensateProduced = recovered * recovery;
    const gasProduced =
      (wellstreamProduced - (1 - dryGasFraction) * condensateProduced) / dryGasFraction;
    points.push({
      pressurePsia,
      wellstreamProduced,
      gasProduced,
      condensateProduced,
      condensateInGas: (1 - condensateProduced) * (1 - inRock),
      liquidSaturation: (liquid * initialYield) / SHAPE_YIELD_STB_PER_MMSCF,
      gasZ: z,
      twoPhaseZ: z,
      producingYieldStbPerMmscf: before
        ? (initialYield * (condensateProduced - before.condensateProduced)) /
          (gasProduced - before.gasProduced)
        : initialYield,
    });
  }
  refuseImpossible(points[points.length - 1]);
  return {
    curve: { route: "correlation", temperatureDegF, dewPointPsia, points },
    warnings: [
      ...SCREENING,
      ...wellstream.warnings,
      ...pseudocriticalWarnings(wellstream.wellstreamGravity, test),
      ...zFactorWarnings(dewPointPsia / critical.pressurePsia, reducedTemperature),
    ],
  };
}

const SCREENING: readonly Warning[] = [
  {
    code: "correlation_recovery",
    severity: "warning",
    message:
      "The recovery comes from a correlation of surface figures, quoted from memory and off by about 12 % on two " +
      "published fluids: for screening only. A composition and a depletion study replace it.",
  },
  {
    code: "single_phase_z",
    severity: "warning",
    message:
      "Gas recovery comes from p/z with the gas's own z. Below the dew point it is too high, by 8 points on a rich gas.",
  },
];

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

/** Of the condensate in place at the dew point, to 500 psig. */
function condensateRecovery(
  { condensateApi }: SeparatorTest,
  wellstream: Wellstream,
  temperatureDegF: number,
  { pressurePsia, z }: { pressurePsia: number; z: number },
): number {
  const { surfaceGasOilRatioScfPerStb: gasOilRatio, condensateYieldStbPerMmscfWellstream } =
    wellstream;
  const wetScfPerBarrel =
    CUBIC_FEET_PER_BARREL / gasFormationVolumeFactorCfPerScf(pressurePsia, temperatureDegF, z);
  const inPlace = wetScfPerBarrel * condensateYieldStbPerMmscfWellstream * 1e-6;
  const recovered = condensateByCorrelationStbPerBarrel(
    gasOilRatio,
    temperatureDegF,
    condensateApi,
  );
  if (recovered > 0) return recovered / inPlace;
  throw new DomainError(
    `The correlation gives no recovery for ${Math.round(gasOilRatio)} scf/STB, ${temperatureDegF} °F and ` +
      `${condensateApi} °API: the fluid lies outside its data.`,
    { input: "condensateApi", value: condensateApi },
  );
}

function refuseImpossible({ condensateProduced, gasProduced }: RecoveryPoint): void {
  if (gasProduced > 1) {
    throw new DomainError(
      `The correlation gives ${(100 * gasProduced).toFixed(1)} % of the gas at 500 psig, more than there is: below the ` +
        "dew point it counts the liquid's moles as produced. The fluid is too rich for it.",
      { input: "fluid", value: gasProduced },
    );
  }
  if (condensateProduced <= gasProduced) return;
  throw new DomainError(
    `The correlation gives ${Math.round(100 * condensateProduced)} % of the condensate and ` +
      `${Math.round(100 * gasProduced)} % of the gas at 500 psig. By depletion condensate recovers less than gas: the ` +
      "fluid is too lean for it.",
    { input: "fluid", value: condensateProduced },
  );
}
