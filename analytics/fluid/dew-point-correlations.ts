/** Dew-point pressure of a gas condensate from its composition, without an equation of state. */
import type { LightComponent } from "../composition/composition-schema";
import type { HeptanesPlus, Stream } from "../composition/stream";
import { DomainError } from "../errors";
import { degreesRankine } from "../units/conversions";
import type { Warning } from "../warnings";

export interface DewPointEstimate {
  readonly method: "nemethKennedy" | "elsharkawy";
  readonly label: string;
  readonly source: string;
  readonly dewPointPsia: number;
  /** average error that the authors state, as a fraction */
  readonly statedErrorFraction: number;
  readonly warnings: Warning[];
}

interface Variables {
  readonly y: (name: LightComponent) => number;
  readonly heavy: HeptanesPlus;
}

function variablesOf({ components, heptanesPlus }: Stream): Variables {
  if (!heptanesPlus) {
    throw new DomainError(
      "The dew-point correlations need heptanes plus with its molecular weight and specific gravity",
      { input: "stream.plus" },
    );
  }
  const fractions = new Map(components.map(({ name, moleFraction }) => [name, moleFraction]));
  return { y: (name) => fractions.get(name) ?? 0, heavy: heptanesPlus };
}

const NEMETH_KENNEDY = [
  -2.0623054, 6.6259728, -4.4670559e-3, 1.0448346e-4, 3.2673714e-2, -3.6453277e-3, 7.4299951e-5,
  -0.11381195, 6.2476497e-4, -1.0716866e-6, 10.746622,
] as const;

/**
 * Dew point by Nemeth and Kennedy. Mole fractions, T in degR, L = y7 M7, r = M7/(g7 + 0.0001):
 *
 *     ln pd = A1 [C2 + CO2 + H2S + C6 + 2 (C3 + C4) + C5 + 0.4 C1 + 0.2 N2] + A2 g7 + A3 C1/(C7 + 0.002) + A4 T
 *               + A5 L + A6 L2 + A7 L3 + A8 r + A9 r2 + A10 r3 + A11
 *
 * Range: 40-320 degF, 1,270-10,790 psia, M7 106-235 (from memory), which it warns outside. Its authors report 7.4 % on
 * average over 579 points. A11 is printed as 1.746622 in places; 10.746622 gives dew points.
 *
 * @throws {DomainError} without heptanes plus
 * @example nemethKennedy(stream, 200).dewPointPsia // => 3483.9 for the fluid of Kenyon and Behie (1987)
 * @see L. K. Nemeth, H. T. Kennedy, SPE J. 7 (June 1967) 99-104
 */
export function nemethKennedy(stream: Stream, temperatureDegF: number): DewPointEstimate {
  const { y, heavy } = variablesOf(stream);
  const [a1, a2, a3, a4, a5, a6, a7, a8, a9, a10, a11] = NEMETH_KENNEDY;
  const { moleFraction, molecularWeight, specificGravity } = heavy;
  const load = moleFraction * molecularWeight;
  const ratio = molecularWeight / (specificGravity + 1e-4);
  const mixture =
    y("C2") +
    y("CO2") +
    y("H2S") +
    y("C6") +
    2 * (y("C3") + y("iC4") + y("nC4")) +
    y("iC5") +
    y("nC5") +
    0.4 * y("C1") +
    0.2 * y("N2");
  const dewPointPsia = Math.exp(
    a1 * mixture +
      a2 * specificGravity +
      (a3 * y("C1")) / (moleFraction + 0.002) +
      a4 * degreesRankine(temperatureDegF) +
      load * (a5 + load * (a6 + load * a7)) +
      ratio * (a8 + ratio * (a9 + ratio * a10)) +
      a11,
  );
  const label = "Nemeth and Kennedy (1967)";
  return {
    method: "nemethKennedy",
    label,
    source: "L. K. Nemeth, H. T. Kennedy, SPE J. 7 (June 1967) 99-104",
    dewPointPsia,
    statedErrorFraction: 0.074,
    warnings: rangeWarnings(label, temperatureDegF, dewPointPsia, heavy),
  };
}

/**
 * Dew point by Elsharkawy, linear in temperature (degF), in the mole fractions and in combinations of heptanes plus:
 *
 *     pd = 4268.85 + 0.094056 T - 7157.87 H2S - 4540.58 CO2 - 4663.55 N2 - 1357.56 C1 - 7776.10 C2 - 9967.99 C3
 *            - 4257.10 C4 - 1417.10 C5 + 691.5298 C6 + 40660.36 C7 + 205.26 M - 7260.32 g - 352.413 C7 M
 *            - 114.519 M/g + 8.133 C7 M/g + 94.916 C7/(C1 + C2) + 238.252 C7/(C3 + C4 + C5 + C6)
 *
 * Its author reports 7.7 % on average over some 340 points (from memory). The paper's ranges could not be confirmed, so
 * it warns outside those of Nemeth and Kennedy.
 *
 * @throws {DomainError} without heptanes plus, without hydrocarbons beside it, or when the sum falls below zero
 * @example elsharkawy(stream, 200).dewPointPsia // => 3773.0 for the fluid of Kenyon and Behie (1987)
 * @see A. M. Elsharkawy, Fluid Phase Equilibria 193 (2002) 147-165
 */
export function elsharkawy(stream: Stream, temperatureDegF: number): DewPointEstimate {
  const { y, heavy } = variablesOf(stream);
  const { moleFraction: c7, molecularWeight: m, specificGravity: g } = heavy;
  const butanes = y("iC4") + y("nC4");
  const pentanes = y("iC5") + y("nC5");
  const lean = y("C1") + y("C2");
  const middle = y("C3") + butanes + pentanes + y("C6");
  if (!(lean > 0 && middle > 0)) {
    throw new DomainError("The correlation of Elsharkawy needs methane or ethane and C3 to C6", {
      input: "stream.light",
    });
  }
  const dewPointPsia =
    4268.85 +
    0.094056 * temperatureDegF -
    7157.87 * y("H2S") -
    4540.58 * y("CO2") -
    4663.55 * y("N2") -
    1357.56 * y("C1") -
    7776.1 * y("C2") -
    9967.99 * y("C3") -
    4257.1 * butanes -
    1417.1 * pentanes +
    691.5298 * y("C6") +
    40660.36 * c7 +
    205.26 * m -
    7260.32 * g -
    352.413 * c7 * m -
    (114.519 * m) / g +
    (8.133 * c7 * m) / g +
    (94.916 * c7) / lean +
    (238.252 * c7) / middle;
  if (!(dewPointPsia > 0)) {
    throw new DomainError("The correlation of Elsharkawy gives no dew point for this composition", {
      input: "stream",
      value: dewPointPsia,
    });
  }
  const label = "Elsharkawy (2002)";
  return {
    method: "elsharkawy",
    label,
    source: "A. M. Elsharkawy, Fluid Phase Equilibria 193 (2002) 147-165",
    dewPointPsia,
    statedErrorFraction: 0.077,
    warnings: rangeWarnings(label, temperatureDegF, dewPointPsia, heavy),
  };
}

/** Where the data of Nemeth and Kennedy end. */
const RANGE = {
  temperatureDegF: [40, 320],
  dewPointPsia: [1270, 10790],
  molecularWeight: [106, 235],
} as const;

function rangeWarnings(
  label: string,
  temperatureDegF: number,
  dewPointPsia: number,
  { molecularWeight }: HeptanesPlus,
): Warning[] {
  const figure = (number: number) => Number(number.toPrecision(4)).toLocaleString("en-GB");
  const outside = (
    what: string,
    value: number,
    [low, high]: readonly [number, number],
    unit: string,
    input: string,
  ): Warning[] =>
    value >= low && value <= high
      ? []
      : [
          {
            code: "dew_point_outside_range",
            severity: "warning",
            input,
            message:
              `The ${what} of ${figure(value)} ${unit} lies outside ${figure(low)} to ${figure(high)} ${unit}, where ` +
              `${label} has been tested; its dew point is extrapolated.`,
          },
        ];
  return [
    ...outside("temperature", temperatureDegF, RANGE.temperatureDegF, "°F", "temperatureDegF"),
    ...outside("dew point", dewPointPsia, RANGE.dewPointPsia, "psia", "stream"),
    ...outside(
      "molecular weight of heptanes plus",
      molecularWeight,
      RANGE.molecularWeight,
      "lb/lbmol",
      "stream.plus.molecularWeight",
    ),
  ];
}

/**
 * Every dew-point estimate that a stream allows: none without heptanes plus, one where the other has no answer.
 *
 * @param temperatureDegF  of the reservoir
 */
export function dewPointEstimates(stream: Stream, temperatureDegF: number): DewPointEstimate[] {
  if (!stream.heptanesPlus) return [];
  return [nemethKennedy, elsharkawy].flatMap((correlation) => {
    try {
      return [correlation(stream, temperatureDegF)];
    } catch (error) {
      if (error instanceof DomainError) return [];
      throw error;
    }
  });
}
