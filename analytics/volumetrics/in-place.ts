import { DomainError } from "../errors";
import type { Wellstream } from "../fluid/wellstream";
import { assertGasState, gasFormationVolumeFactorCfPerScf } from "../gas/formation-volume-factor";
import { pseudocritical, pseudocriticalWarnings, type Impurities } from "../gas/pseudocritical";
import { zFactor, zFactorWarnings } from "../gas/z-factor";
import { degreesRankine, SQUARE_FEET_PER_ACRE } from "../units/conversions";
import type { Warning } from "../warnings";

/** What in-place volumes need to know of the fluid; a `Wellstream` has it. */
export type InPlaceFluid = Pick<
  Wellstream,
  "condensateYieldStbPerMmscf" | "vapourEquivalentScfPerStb" | "wellstreamGravity"
>;

export interface InPlaceInput {
  readonly areaAcres: number;
  readonly netThicknessFt: number;
  readonly porosity: number;
  readonly waterSaturation: number;
  readonly pressurePsia: number;
  readonly temperatureDegF: number;
  readonly wellstream: InPlaceFluid;
  /** mole fractions of the wellstream */
  readonly impurities: Impurities;
  /** a measured z at reservoir conditions; without it the correlations give one */
  readonly measuredZFactor?: number;
}

export interface InPlace {
  readonly hydrocarbonPoreVolumeCubicFeet: number;
  /** `null` when z was measured */
  readonly reducedPressure: number | null;
  readonly reducedTemperature: number | null;
  readonly zFactor: number;
  readonly gasFormationVolumeFactorCfPerScf: number;
  readonly dryGasFraction: number;
  readonly wetGasInPlaceScf: number;
  readonly dryGasInPlaceScf: number;
  readonly condensateInPlaceStb: number;
  readonly wetGasPerAcreFootScf: number;
  readonly dryGasPerAcreFootScf: number;
  readonly condensatePerAcreFootStb: number;
  readonly warnings: Warning[];
}

function assertRock(input: InPlaceInput): void {
  const { areaAcres, netThicknessFt, porosity, waterSaturation } = input;
  const refuse = (name: string, value: number, reason: string) => {
    throw new DomainError(reason, { input: name, value });
  };
  if (!(areaAcres > 0 && areaAcres < Infinity))
    refuse("areaAcres", areaAcres, `An area is above zero, not ${areaAcres} acres`);
  if (!(netThicknessFt > 0 && netThicknessFt < Infinity))
    refuse("netThicknessFt", netThicknessFt, `A thickness is above zero, not ${netThicknessFt} ft`);
  if (!(porosity > 0 && porosity <= 0.47))
    refuse(
      "porosity",
      porosity,
      `A porosity lies above 0 and at most at 0.47 (loosest packing of sand), not at ${porosity}`,
    );
  if (!(waterSaturation >= 0 && waterSaturation < 1))
    refuse(
      "waterSaturation",
      waterSaturation,
      `A water saturation lies from 0 to below 1, not at ${waterSaturation}`,
    );
}

function assertFluid({
  condensateYieldStbPerMmscf: condensateYield,
  vapourEquivalentScfPerStb: vapourEquivalent,
}: InPlaceFluid): void {
  if (!(condensateYield >= 0 && condensateYield < Infinity)) {
    throw new DomainError(`A condensate yield is not negative: ${condensateYield} STB/MMscf`, {
      input: "condensateYieldStbPerMmscf",
      value: condensateYield,
    });
  }
  if (!(vapourEquivalent > 0 && vapourEquivalent < Infinity)) {
    throw new DomainError(`A vapour equivalent is above zero, not ${vapourEquivalent} scf/STB`, {
      input: "vapourEquivalentScfPerStb",
      value: vapourEquivalent,
    });
  }
}

/**
 * Gas and condensate originally in place, by volumetrics, of one reservoir with single values.
 *
 *     G = 43,560 A h phi (1 - Sw) / Bg          Bg = (psc/Tsc) z T / p
 *     dry gas = G fg                            fg = 1 / (1 + Veq Y / 1e6)
 *     condensate = dry gas Y / 1e6              so that dry gas + Veq condensate = G
 *
 * The fluid is one gas phase at the pressure given: at or above the dew point.
 *
 * @returns  gas at 14.696 psia and 60 degF, condensate at stock tank
 * @throws {DomainError} when an input is impossible
 * @throws {ConvergenceError} when z does not converge
 * @example inPlace({ areaAcres: 2500, netThicknessFt: 80, porosity: 0.15, waterSaturation: 0.25,
 *   pressurePsia: 6500, temperatureDegF: 260, measuredZFactor: 1.12,
 *   impurities: { nitrogen: 0, carbonDioxide: 0, hydrogenSulphide: 0 }, wellstream: {
 *   condensateYieldStbPerMmscf: 80.3213, vapourEquivalentScfPerStb: 825.781, wellstreamGravity: 0.914422 } })
 *   .condensateInPlaceStb // => 21052360
 */
export function inPlace(input: InPlaceInput): InPlace {
  const { pressurePsia, temperatureDegF, wellstream, impurities } = input;
  assertRock(input);
  assertFluid(wellstream);
  assertGasState(pressurePsia, temperatureDegF, input.measuredZFactor ?? 1);

  const warnings: Warning[] = [];
  let reducedPressure: number | null = null;
  let reducedTemperature: number | null = null;
  let z: number;
  if (input.measuredZFactor === undefined) {
    const critical = pseudocritical(wellstream.wellstreamGravity, impurities);
    reducedPressure = pressurePsia / critical.pressurePsia;
    reducedTemperature = degreesRankine(temperatureDegF) / critical.temperatureDegR;
    z = zFactor(reducedPressure, reducedTemperature);
    warnings.push(
      ...pseudocriticalWarnings(wellstream.wellstreamGravity, impurities),
      ...zFactorWarnings(reducedPressure, reducedTemperature),
    );
  } else {
    z = input.measuredZFactor;
  }

  const acreFeet = input.areaAcres * input.netThicknessFt;
  const hydrocarbonPoreVolumeCubicFeet =
    SQUARE_FEET_PER_ACRE * acreFeet * input.porosity * (1 - input.waterSaturation);
  const formationVolumeFactor = gasFormationVolumeFactorCfPerScf(pressurePsia, temperatureDegF, z);
  const wetGasInPlaceScf = hydrocarbonPoreVolumeCubicFeet / formationVolumeFactor;
  const barrelsPerScf = wellstream.condensateYieldStbPerMmscf * 1e-6;
  const dryGasFraction = 1 / (1 + barrelsPerScf * wellstream.vapourEquivalentScfPerStb);
  const dryGasInPlaceScf = wetGasInPlaceScf * dryGasFraction;
  const condensateInPlaceStb = dryGasInPlaceScf * barrelsPerScf;
  return {
    hydrocarbonPoreVolumeCubicFeet,
    reducedPressure,
    reducedTemperature,
    zFactor: z,
    gasFormationVolumeFactorCfPerScf: formationVolumeFactor,
    dryGasFraction,
    wetGasInPlaceScf,
    dryGasInPlaceScf,
    condensateInPlaceStb,
    wetGasPerAcreFootScf: wetGasInPlaceScf / acreFeet,
    dryGasPerAcreFootScf: dryGasInPlaceScf / acreFeet,
    condensatePerAcreFootStb: condensateInPlaceStb / acreFeet,
    warnings,
  };
}
