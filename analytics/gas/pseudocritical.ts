/**
 * Pseudocritical temperature and pressure of a natural gas from its gravity and its nitrogen, carbon dioxide and
 * hydrogen sulphide, for the z factor by corresponding states.
 */
import { DomainError } from "../errors";
import type { Warning } from "../warnings";

/** Mole fractions of the non-hydrocarbons. */
export interface Impurities {
  readonly nitrogen: number;
  readonly carbonDioxide: number;
  readonly hydrogenSulphide: number;
}

export interface Pseudocriticals {
  readonly temperatureDegR: number;
  readonly pressurePsia: number;
}

export const pseudocriticalMethods = [
  "sutton-2007-condensate",
  "sutton-1985",
  "piper-mccain-corredor",
] as const;
export type PseudocriticalMethod = (typeof pseudocriticalMethods)[number];
export type AcidGasCorrection = "sutton-2007" | "wichert-aziz-1972";

const NITROGEN = { temperatureDegR: 227.16, pressurePsia: 493.1, gravity: 0.9672 };
const CARBON_DIOXIDE = { temperatureDegR: 547.58, pressurePsia: 1071, gravity: 1.5195 };
const HYDROGEN_SULPHIDE = { temperatureDegR: 672.35, pressurePsia: 1306, gravity: 1.1767 };

interface Quadratic {
  readonly temperature: readonly [number, number, number];
  readonly pressure: readonly [number, number, number];
  readonly lowestGravity: number;
  readonly highestGravity: number;
  readonly source: string;
}

const SUTTON_2007_CONDENSATE: Quadratic = {
  temperature: [164.3, 357.7, -67.7],
  pressure: [744, -125.4, 5.9],
  lowestGravity: 0.554,
  highestGravity: 2.819,
  source: "Sutton (2007)",
};

const SUTTON_1985: Quadratic = {
  temperature: [169.2, 349.5, -74.0],
  pressure: [756.8, -131.0, -3.6],
  lowestGravity: 0.57,
  highestGravity: 1.68,
  source: "Sutton (1985)",
};

const evaluate = ([a, b, c]: readonly [number, number, number], gravity: number) =>
  a + gravity * (b + gravity * c);

const sumOf = ({ nitrogen, carbonDioxide, hydrogenSulphide }: Impurities) =>
  nitrogen + carbonDioxide + hydrogenSulphide;

/**
 * Refuses non-hydrocarbon fractions that no natural gas of this kind has.
 *
 * @throws {DomainError} when one is not in 0 to 1, or their sum reaches 0.8
 */
export function assertImpurities(impurities: Impurities): void {
  for (const [name, value] of Object.entries({
    nitrogen: impurities.nitrogen,
    carbonDioxide: impurities.carbonDioxide,
    hydrogenSulphide: impurities.hydrogenSulphide,
  })) {
    if (!(value >= 0 && value <= 1)) {
      throw new DomainError(`A mole fraction lies between 0 and 1, not ${value}`, {
        input: name,
        value,
      });
    }
  }
  const sum = sumOf(impurities);
  if (!(sum < 0.8)) {
    throw new DomainError(
      `Nitrogen, carbon dioxide and hydrogen sulphide add up to ${percent(sum)}; from 80 % this is not a hydrocarbon gas`,
      { input: "nitrogen", value: sum },
    );
  }
}

const percent = (fraction: number) => `${Number((fraction * 100).toPrecision(3))} %`;

/**
 * Gravity of the hydrocarbon part of a gas (air = 1), from 28.0135, 44.01 and 34.08 over 28.9625 g/mol as Sutton uses.
 *
 *     gh = (g - 0.9672 yN2 - 1.5195 yCO2 - 1.1767 yH2S) / (1 - yN2 - yCO2 - yH2S)
 *
 * @throws {DomainError} when the impurities alone are heavier than the gas
 * @example hydrocarbonGravity(0.8, { nitrogen: 0.02, carbonDioxide: 0.04, hydrogenSulphide: 0.05 }) // => 0.742743
 * @see R. P. Sutton, SPE Reservoir Eval. Eng. 10 (June 2007) 270-284, SPE 97099
 */
export function hydrocarbonGravity(gasGravity: number, impurities: Impurities): number {
  const gravity =
    (gasGravity -
      NITROGEN.gravity * impurities.nitrogen -
      CARBON_DIOXIDE.gravity * impurities.carbonDioxide -
      HYDROGEN_SULPHIDE.gravity * impurities.hydrogenSulphide) /
    (1 - sumOf(impurities));
  if (!(gravity > 0)) {
    throw new DomainError(
      `A gas of gravity ${gasGravity} cannot hold this much nitrogen, carbon dioxide and hydrogen sulphide: ` +
        "nothing is left for the hydrocarbons",
      { input: "gasGravity", value: gasGravity },
    );
  }
  return gravity;
}

/**
 * Pseudocritical temperature depression by acid gas, degR, with A = yCO2 + yH2S and B = yH2S.
 *
 *     Wichert and Aziz 1972:  e = 120 (A^0.9 - A^1.6) + 15 (B^0.5 - B^4)
 *     Sutton 2007 refit:      e = 107.6 (A - A^2.2) + 5.9 (B^0.06 - B^0.68)
 *
 * Range of the 1972 data: 154-7,026 psia, 40-300 degF, CO2 to 54 %, H2S to 74 % (from memory).
 *
 * @example acidGasDepressionDegR(0.05, 0.1, "wichert-aziz-1972") // => 20.735443
 * @see E. Wichert, K. Aziz, Hydrocarbon Processing 51 (May 1972) 119; Sutton, SPE 97099 (2007)
 */
export function acidGasDepressionDegR(
  carbonDioxide: number,
  hydrogenSulphide: number,
  correction: AcidGasCorrection = "sutton-2007",
): number {
  const a = carbonDioxide + hydrogenSulphide;
  const b = hydrogenSulphide;
  return correction === "sutton-2007"
    ? 107.6 * (a - a ** 2.2) + 5.9 * (b ** 0.06 - b ** 0.68)
    : 120 * (a ** 0.9 - a ** 1.6) + 15 * (b ** 0.5 - b ** 4);
}

/**
 * Applies the depression e to pseudocriticals of the whole gas.
 *
 *     Tpc' = Tpc - e        Ppc' = Ppc Tpc' / (Tpc + B (1 - B) e)
 *
 * @example correctForAcidGas({ temperatureDegR: 400, pressurePsia: 680 }, 0.05, 0.1, "wichert-aziz-1972")
 *   // => { temperatureDegR: 379.264557, pressurePsia: 641.755653 }
 */
export function correctForAcidGas(
  uncorrected: Pseudocriticals,
  carbonDioxide: number,
  hydrogenSulphide: number,
  correction: AcidGasCorrection = "sutton-2007",
): Pseudocriticals {
  const depression = acidGasDepressionDegR(carbonDioxide, hydrogenSulphide, correction);
  const temperatureDegR = uncorrected.temperatureDegR - depression;
  return {
    temperatureDegR,
    pressurePsia:
      (uncorrected.pressurePsia * temperatureDegR) /
      (uncorrected.temperatureDegR + hydrogenSulphide * (1 - hydrogenSulphide) * depression),
  };
}

/** What the default method needs of the impurities, worked out once so that trials only vary the gravity. */
export interface PseudocriticalConstants {
  readonly hydrocarbonFraction: number;
  /** gravity carried by the impurities: sum of y x gravity */
  readonly impurityGravity: number;
  readonly impurityTemperatureDegR: number;
  readonly impurityPressurePsia: number;
  readonly depressionDegR: number;
  /** B (1 - B) e */
  readonly pressureTermDegR: number;
}

/**
 * Constants of `pseudocriticalTemperatureDegR` and `pseudocriticalPressurePsia` for one set of impurities.
 *
 * @throws {DomainError} when the fractions are impossible
 */
export function pseudocriticalConstants(impurities: Impurities): PseudocriticalConstants {
  assertImpurities(impurities);
  const { nitrogen, carbonDioxide, hydrogenSulphide } = impurities;
  const depressionDegR = acidGasDepressionDegR(carbonDioxide, hydrogenSulphide, "sutton-2007");
  return {
    hydrocarbonFraction: 1 - sumOf(impurities),
    impurityGravity:
      NITROGEN.gravity * nitrogen +
      CARBON_DIOXIDE.gravity * carbonDioxide +
      HYDROGEN_SULPHIDE.gravity * hydrogenSulphide,
    impurityTemperatureDegR:
      NITROGEN.temperatureDegR * nitrogen +
      CARBON_DIOXIDE.temperatureDegR * carbonDioxide +
      HYDROGEN_SULPHIDE.temperatureDegR * hydrogenSulphide,
    impurityPressurePsia:
      NITROGEN.pressurePsia * nitrogen +
      CARBON_DIOXIDE.pressurePsia * carbonDioxide +
      HYDROGEN_SULPHIDE.pressurePsia * hydrogenSulphide,
    depressionDegR,
    pressureTermDegR: hydrogenSulphide * (1 - hydrogenSulphide) * depressionDegR,
  };
}

const uncorrectedTemperatureDegR = (gasGravity: number, c: PseudocriticalConstants) =>
  c.hydrocarbonFraction *
    evaluate(
      SUTTON_2007_CONDENSATE.temperature,
      (gasGravity - c.impurityGravity) / c.hydrocarbonFraction,
    ) +
  c.impurityTemperatureDegR;

/**
 * Pseudocritical temperature by the default method, degR, without checks or allocation: for loops over trials.
 * The same numbers as `pseudocritical`.
 */
export function pseudocriticalTemperatureDegR(
  gasGravity: number,
  constants: PseudocriticalConstants,
): number {
  return uncorrectedTemperatureDegR(gasGravity, constants) - constants.depressionDegR;
}

/** Pseudocritical pressure by the default method, psia, without checks or allocation: for loops over trials. */
export function pseudocriticalPressurePsia(
  gasGravity: number,
  constants: PseudocriticalConstants,
): number {
  const temperature = uncorrectedTemperatureDegR(gasGravity, constants);
  const pressure =
    constants.hydrocarbonFraction *
      evaluate(
        SUTTON_2007_CONDENSATE.pressure,
        (gasGravity - constants.impurityGravity) / constants.hydrocarbonFraction,
      ) +
    constants.impurityPressurePsia;
  return (
    (pressure * (temperature - constants.depressionDegR)) /
    (temperature + constants.pressureTermDegR)
  );
}

function bySutton(
  quadratic: Quadratic,
  gasGravity: number,
  impurities: Impurities,
  correction: AcidGasCorrection,
): Pseudocriticals {
  const { nitrogen, carbonDioxide, hydrogenSulphide } = impurities;
  const gravity = hydrocarbonGravity(gasGravity, impurities);
  const hydrocarbons = 1 - sumOf(impurities);
  const mix = (key: keyof Pseudocriticals, hydrocarbonValue: number) =>
    hydrocarbons * hydrocarbonValue +
    NITROGEN[key] * nitrogen +
    CARBON_DIOXIDE[key] * carbonDioxide +
    HYDROGEN_SULPHIDE[key] * hydrogenSulphide;
  return correctForAcidGas(
    {
      temperatureDegR: mix("temperatureDegR", evaluate(quadratic.temperature, gravity)),
      pressurePsia: mix("pressurePsia", evaluate(quadratic.pressure, gravity)),
    },
    carbonDioxide,
    hydrogenSulphide,
    correction,
  );
}

/** Coefficients of H2S, CO2, N2, then of gravity and its square, after the constant. */
const PIPER_J = [0.11582, -0.4582, -0.90348, -0.66026, 0.70729, -0.099397] as const;
const PIPER_K = [3.8216, -0.06534, -0.42113, -0.91249, 17.438, -3.2191] as const;

function byPiper(gasGravity: number, impurities: Impurities): Pseudocriticals {
  const parts = [
    [impurities.hydrogenSulphide, HYDROGEN_SULPHIDE],
    [impurities.carbonDioxide, CARBON_DIOXIDE],
    [impurities.nitrogen, NITROGEN],
  ] as const;
  let j = PIPER_J[0] + gasGravity * (PIPER_J[4] + gasGravity * PIPER_J[5]);
  let k = PIPER_K[0] + gasGravity * (PIPER_K[4] + gasGravity * PIPER_K[5]);
  parts.forEach(([fraction, critical], index) => {
    j += (PIPER_J[index + 1] * fraction * critical.temperatureDegR) / critical.pressurePsia;
    k +=
      (PIPER_K[index + 1] * fraction * critical.temperatureDegR) / Math.sqrt(critical.pressurePsia);
  });
  const temperatureDegR = (k * k) / j;
  return { temperatureDegR, pressurePsia: temperatureDegR / j };
}

/**
 * Pseudocritical temperature (degR) and pressure (psia) of a gas of known gravity.
 *
 * - `sutton-2007-condensate` (default): Tpc = 164.3 + 357.7 g - 67.7 g2, Ppc = 744 - 125.4 g + 5.9 g2 of the
 *   hydrocarbon gravity (0.554 to 2.819), mole average with the impurities, acid-gas correction of the same paper.
 * - `sutton-1985`: Tpc = 169.2 + 349.5 g - 74.0 g2, Ppc = 756.8 - 131.0 g - 3.6 g2 (0.57 to 1.68), same mixing.
 * - `piper-mccain-corredor`: J = a0 + sum ai yi (Tc/Pc)i + a4 g + a5 g2 and K likewise with Tc/sqrt(Pc);
 *   Tpc = K2/J, Ppc = Tpc/J. Impurities are inside the fit, so no acid-gas correction follows.
 *
 * @param gasGravity  of the whole gas, air = 1
 * @param correction  acid-gas correction of the two Sutton methods
 * @throws {DomainError} when the gravity is not positive or the impurities are impossible
 * @example pseudocritical(0.65, { nitrogen: 0, carbonDioxide: 0, hydrogenSulphide: 0 })
 *   // => { temperatureDegR: 368.2018, pressurePsia: 664.9828 }
 * @see R. P. Sutton, SPE 14265 (1985) and SPE 97099 (2007); L. D. Piper, W. D. McCain, J. H. Corredor,
 *   SPE 26668 (1993)
 */
export function pseudocritical(
  gasGravity: number,
  impurities: Impurities,
  method: PseudocriticalMethod = "sutton-2007-condensate",
  correction: AcidGasCorrection = "sutton-2007",
): Pseudocriticals {
  if (!(gasGravity > 0 && gasGravity < Infinity)) {
    throw new DomainError(`A gas gravity is above zero, not ${gasGravity}`, {
      input: "gasGravity",
      value: gasGravity,
    });
  }
  assertImpurities(impurities);
  hydrocarbonGravity(gasGravity, impurities);
  switch (method) {
    case "sutton-2007-condensate":
      return bySutton(SUTTON_2007_CONDENSATE, gasGravity, impurities, correction);
    case "sutton-1985":
      return bySutton(SUTTON_1985, gasGravity, impurities, correction);
    case "piper-mccain-corredor":
      return byPiper(gasGravity, impurities);
  }
}

/** Warns where the hydrocarbon gravity lies outside the data a Sutton method was fitted to. */
export function pseudocriticalWarnings(
  gasGravity: number,
  impurities: Impurities,
  method: PseudocriticalMethod = "sutton-2007-condensate",
): Warning[] {
  if (method === "piper-mccain-corredor") return [];
  const { lowestGravity, highestGravity, source } =
    method === "sutton-1985" ? SUTTON_1985 : SUTTON_2007_CONDENSATE;
  const gravity = hydrocarbonGravity(gasGravity, impurities);
  if (gravity >= lowestGravity && gravity <= highestGravity) return [];
  return [
    {
      code: "pseudocritical_outside_range",
      severity: "warning",
      input: "fluid",
      message:
        `The hydrocarbon gravity ${gravity.toFixed(3)} is outside ${lowestGravity} to ${highestGravity}, ` +
        `the data of ${source}; pseudocriticals are extrapolated.`,
    },
  ];
}
