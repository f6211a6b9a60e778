/**
 * What leaves the stock tank (and a second separator) when nobody measured it, from what was measured at the first
 * separator: the correlation of Gold, McCain and Jennings, a regression on 234 laboratory studies.
 *
 * Its constant 4,602 is 350.162 Vm / 28.9647 at 14.65 psia, so its gas volumes are scf at 14.65 psia and 60 degF.
 */
import { DomainError } from "../errors";
import type { Warning } from "../warnings";

/** Pressure base of the correlation's gas volumes, psia. */
export const GOLD_BASE_PRESSURE_PSIA = 14.65;

export interface GoldInput {
  readonly primarySeparatorPressurePsia: number;
  readonly primarySeparatorTemperatureDegF: number;
  readonly primarySeparatorGasGravity: number;
  readonly condensateApi: number;
}

export interface GoldThreeStageInput extends GoldInput {
  readonly secondSeparatorTemperatureDegF: number;
}

export interface GoldEstimate {
  /** gas of every stage after the first plus the vapour equivalent of the condensate, scf/STB at 14.65 psia */
  readonly vapourEquivalentScfPerStb: number;
  /** "additional gas": volume times gravity of the gas of every stage after the first, scf/STB at 14.65 psia */
  readonly additionalGasScfPerStb: number;
  readonly warnings: Warning[];
}

function assertUsable(input: GoldInput, temperatures: readonly number[]): void {
  const positive: [string, number][] = [
    ["primarySeparatorGasGravity", input.primarySeparatorGasGravity],
    ["condensateApi", input.condensateApi],
    ...temperatures.map((value): [string, number] => ["separatorTemperatureDegF", value]),
  ];
  for (const [name, value] of positive) {
    if (!(value > 0 && value < Infinity)) {
      throw new DomainError(
        `The estimate of unmeasured gas needs ${name} above zero, not ${value}`,
        { input: name, value },
      );
    }
  }
  const pressure = input.primarySeparatorPressurePsia;
  if (!(pressure >= GOLD_BASE_PRESSURE_PSIA && pressure < Infinity)) {
    throw new DomainError(
      `The first separator works above atmospheric pressure, not at ${pressure} psia; is the reading a gauge pressure?`,
      { input: "primarySeparatorPressurePsia", value: pressure },
    );
  }
}

function rangeWarnings(
  input: GoldInput,
  highestPressurePsia: number,
  temperatures: readonly number[],
  vapourEquivalentScfPerStb: number,
): Warning[] {
  const checks: [number, number, number, string, string, string][] = [
    [
      input.primarySeparatorPressurePsia,
      100,
      highestPressurePsia,
      "psia",
      "separator pressure",
      "fluid.primarySeparator.pressurePsia",
    ],
    [
      input.primarySeparatorGasGravity,
      0.6,
      0.8,
      "",
      "separator gas gravity",
      "fluid.primarySeparator.gasGravity",
    ],
    [input.condensateApi, 40, 70, "°API", "condensate gravity", "fluid.condensateApi"],
    ...temperatures.map((value, index): (typeof checks)[number] => [
      value,
      60,
      120,
      "°F",
      "separator temperature",
      index === 0
        ? "fluid.primarySeparator.temperatureDegF"
        : "fluid.secondSeparator.temperatureDegF",
    ]),
    [
      vapourEquivalentScfPerStb,
      10,
      1300,
      "scf/STB",
      "result of the correlation",
      "fluid.stockTankGas",
    ],
  ];
  return checks
    .filter(([value, low, high]) => value < low || value > high)
    .map(([value, low, high, unit, what, path]) => ({
      code: "unmeasured_gas_outside_range",
      severity: "warning",
      input: path,
      message:
        `The unmeasured gas is estimated outside the data of its correlation: the ${what} is ` +
        `${Number(value.toPrecision(4))}${unit && ` ${unit}`}, the data run from ${low} to ${high}. ` +
        "Measure the stock-tank gas.",
    }));
}

/**
 * Two-stage separation (separator and stock tank).
 *
 *     Veq = 635.530 + 0.361821 p^1.05435 g^5.08305 API^1.58124 T^-0.791301
 *     Gpa = 1.45993 (p - 14.65)^1.33940 g^7.09434 API^1.14356 T^-0.934460
 *
 * Data: p 100-700 psia, T 60-120 degF, g 0.6-0.8, API 40-70, Veq 10-1,300 scf/STB. Outside, the result comes with a
 * warning for each argument that is out of range; nothing is limited to the range.
 *
 * @throws {DomainError} when an argument is not positive, or the separator is below atmospheric pressure
 * @example goldTwoStage({ primarySeparatorPressurePsia: 500, primarySeparatorTemperatureDegF: 75,
 *   primarySeparatorGasGravity: 0.7, condensateApi: 55 }).vapourEquivalentScfPerStb // => 1402.841
 * @see D. K. Gold, W. D. McCain, J. W. Jennings, J. Pet. Technol. 41 (July 1989) 747-752, SPE 14460
 */
export function goldTwoStage(input: GoldInput): GoldEstimate {
  const p = input.primarySeparatorPressurePsia;
  const t = input.primarySeparatorTemperatureDegF;
  const g = input.primarySeparatorGasGravity;
  const api = input.condensateApi;
  assertUsable(input, [t]);
  const vapourEquivalentScfPerStb =
    635.53 + 0.361821 * p ** 1.05435 * g ** 5.08305 * api ** 1.58124 * t ** -0.791301;
  return {
    vapourEquivalentScfPerStb,
    additionalGasScfPerStb:
      1.45993 *
      (p - GOLD_BASE_PRESSURE_PSIA) ** 1.3394 *
      g ** 7.09434 *
      api ** 1.14356 *
      t ** -0.93446,
    warnings: rangeWarnings(input, 700, [t], vapourEquivalentScfPerStb),
  };
}

/**
 * Three-stage separation (two separators and stock tank).
 *
 *     Veq = 535.916 + 2.62310 p^0.793183 g^4.66120 API^1.20940 T1^-0.849115 T2^0.269870
 *     Gpa = 2.99222 (p - 14.65)^0.970497 g^6.80491 API^1.07916 T1^-1.19605 T2^0.553670
 *
 * Data as for two stages, with p up to 1,500 psia (that limit from memory).
 *
 * @throws {DomainError} when an argument is not positive, or the separator is below atmospheric pressure
 * @example goldThreeStage({ primarySeparatorPressurePsia: 900, primarySeparatorTemperatureDegF: 80,
 *   primarySeparatorGasGravity: 0.69, condensateApi: 54, secondSeparatorTemperatureDegF: 75 })
 *   .vapourEquivalentScfPerStb // => 1527.092
 * @see D. K. Gold, W. D. McCain, J. W. Jennings, J. Pet. Technol. 41 (July 1989) 747-752, SPE 14460
 */
export function goldThreeStage(input: GoldThreeStageInput): GoldEstimate {
  const p = input.primarySeparatorPressurePsia;
  const t1 = input.primarySeparatorTemperatureDegF;
  const t2 = input.secondSeparatorTemperatureDegF;
  const g = input.primarySeparatorGasGravity;
  const api = input.condensateApi;
  assertUsable(input, [t1, t2]);
  const vapourEquivalentScfPerStb =
    535.916 +
    2.6231 * p ** 0.793183 * g ** 4.6612 * api ** 1.2094 * t1 ** -0.849115 * t2 ** 0.26987;
  return {
    vapourEquivalentScfPerStb,
    additionalGasScfPerStb:
      2.99222 *
      (p - GOLD_BASE_PRESSURE_PSIA) ** 0.970497 *
      g ** 6.80491 *
      api ** 1.07916 *
      t1 ** -1.19605 *
      t2 ** 0.55367,
    warnings: rangeWarnings(input, 1500, [t1, t2], vapourEquivalentScfPerStb),
  };
}
