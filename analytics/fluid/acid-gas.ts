import type { Warning } from "../warnings";

/** Partial pressure from which equipment counts as in sour service, psia (0.34 kPa): ISO 15156 / NACE MR0175. */
export const SOUR_SERVICE_PARTIAL_PRESSURE_PSIA = 0.05;
/** Concentration immediately dangerous to life or health, ppm: NIOSH. */
export const HYDROGEN_SULPHIDE_IDLH_PPM = 100;

/**
 * Cautions about hydrogen sulphide (people) and a warning about carbon dioxide (steel) at a stated pressure.
 *
 *     ppm = 1e6 y,  partial pressure = y p
 *
 * Carbon dioxide: corrosion of carbon steel is likely above 30 psi and possible from 7 psi of partial pressure where
 * water is present; rule of thumb, common practice, from memory.
 *
 * @param hydrogenSulphide  mole fraction
 * @param carbonDioxide     mole fraction
 * @param where             what the pressure is, such as "at reservoir pressure"
 */
export function acidGasWarnings(
  hydrogenSulphide: number,
  carbonDioxide: number,
  pressurePsia: number,
  where: string,
): Warning[] {
  const warnings: Warning[] = [];
  if (hydrogenSulphide > 0) {
    const ppm = hydrogenSulphide * 1e6;
    const partialPressure = hydrogenSulphide * pressurePsia;
    const danger =
      ppm >= HYDROGEN_SULPHIDE_IDLH_PPM
        ? ` ${HYDROGEN_SULPHIDE_IDLH_PPM} ppm in air is immediately dangerous to life (NIOSH).`
        : " NIOSH limits exposure to 10 ppm for ten minutes.";
    const service =
      partialPressure >= SOUR_SERVICE_PARTIAL_PRESSURE_PSIA
        ? ` Its partial pressure ${where} is ${figure(partialPressure)} psia: sour service, from ` +
          `${SOUR_SERVICE_PARTIAL_PRESSURE_PSIA} psia (ISO 15156).`
        : ` Its partial pressure ${where} is ${figure(partialPressure)} psia, below sour service.`;
    warnings.push({
      code: "sour_gas",
      severity: "caution",
      input: "fluid.hydrogenSulphide",
      message: `The gas holds ${figure(ppm)} ppm of hydrogen sulphide.${danger}${service}`,
    });
  }
  const carbonDioxidePressure = carbonDioxide * pressurePsia;
  if (carbonDioxidePressure >= 7) {
    warnings.push({
      code: "corrosive_gas",
      severity: "warning",
      input: "fluid.carbonDioxide",
      message:
        `Carbon dioxide has a partial pressure of ${figure(carbonDioxidePressure)} psia ${where}: corrosion of ` +
        `carbon steel is ${carbonDioxidePressure > 30 ? "likely" : "possible"} where water is present.`,
    });
  }
  return warnings;
}

const figure = (value: number) => Number(value.toPrecision(3)).toLocaleString("en-GB");
