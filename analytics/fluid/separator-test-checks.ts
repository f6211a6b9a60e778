/** What a separator test can and cannot say: refusals of the impossible and questions about the unusual. */
import { DomainError } from "../errors";
import { assertImpurities } from "../gas/pseudocritical";
import type { Warning } from "../warnings";
import type { SeparatorTest } from "./separator-test-schema";

interface Range {
  readonly what: string;
  readonly unit: string;
  readonly usual: readonly [number, number];
  readonly possible: readonly [number, number];
}

/** Usual and possible ranges of the measured values: common practice of separator tests on gas condensates. */
const RANGES = {
  api: { what: "condensate gravity", unit: "°API", usual: [40, 65], possible: [30, 80] },
  pressure: {
    what: "separator pressure",
    unit: "psia",
    usual: [50, 1500],
    possible: [14.65, 3000],
  },
  secondPressure: {
    what: "second separator's pressure",
    unit: "psia",
    usual: [15, 500],
    possible: [14.65, 3000],
  },
  temperature: { what: "separator temperature", unit: "°F", usual: [60, 120], possible: [30, 200] },
  gasGravity: { what: "separator gas gravity", unit: "", usual: [0.57, 0.95], possible: [0.55, 3] },
  lowPressureGasGravity: {
    what: "low-pressure gas gravity",
    unit: "",
    usual: [0.65, 1.8],
    possible: [0.55, 3],
  },
  molecularWeight: {
    what: "condensate molecular weight",
    unit: "lb/lbmol",
    usual: [90, 220],
    possible: [60, 400],
  },
  nitrogen: { what: "nitrogen", unit: "mol %", usual: [0, 10], possible: [0, 100] },
  carbonDioxide: { what: "carbon dioxide", unit: "mol %", usual: [0, 15], possible: [0, 100] },
  hydrogenSulphide: {
    what: "hydrogen sulphide",
    unit: "mol %",
    usual: [0, 10],
    possible: [0, 100],
  },
  wellstreamGravity: {
    what: "wellstream gravity",
    unit: "",
    usual: [0.65, 1.4],
    possible: [0.55, 2],
  },
  yield: {
    what: "condensate yield",
    unit: "STB/MMscf",
    usual: [10, 300],
    possible: [0, 400],
  },
} as const satisfies Record<string, Range>;

/** One value against its ranges: refuses the impossible, returns a warning for the unusual, nothing otherwise. */
export function checkFluidValue(
  range: keyof typeof RANGES,
  value: number,
  input: string,
): Warning[] {
  const { what, unit, usual, possible } = RANGES[range];
  const withUnit = (text: string) => (unit ? `${text} ${unit}` : text);
  const shown = withUnit(String(Number(value.toPrecision(4))));
  if (!(value >= possible[0] && value <= possible[1])) {
    throw new DomainError(
      `The ${what} cannot be ${shown}: it lies between ${possible[0]} and ${withUnit(String(possible[1]))}`,
      { input, value },
    );
  }
  if (value >= usual[0] && value <= usual[1]) return [];
  return [
    {
      code: "unusual_value",
      severity: "warning",
      input: `fluid.${input}`,
      message: `The ${what} is ${shown}; usual values run from ${usual[0]} to ${withUnit(String(usual[1]))}.`,
    },
  ];
}

/**
 * Checks what was measured, before any calculation.
 *
 * @returns  a warning for each unusual value
 * @throws {DomainError} for the first impossible value, with its path inside the test as `input`
 */
export function checkSeparatorTest(test: SeparatorTest): Warning[] {
  const { primarySeparator: first, secondSeparator: second, stockTankGas: tank } = test;
  assertImpurities(test);
  const warnings = [
    ...checkFluidValue("pressure", first.pressurePsia, "primarySeparator.pressurePsia"),
    ...checkFluidValue("temperature", first.temperatureDegF, "primarySeparator.temperatureDegF"),
    ...checkFluidValue("gasGravity", first.gasGravity, "primarySeparator.gasGravity"),
    ...checkFluidValue("api", test.condensateApi, "condensateApi"),
    ...checkFluidValue("nitrogen", test.nitrogen * 100, "nitrogen"),
    ...checkFluidValue("carbonDioxide", test.carbonDioxide * 100, "carbonDioxide"),
    ...checkFluidValue("hydrogenSulphide", test.hydrogenSulphide * 100, "hydrogenSulphide"),
  ];
  if (!(first.gasOilRatioScfPerStb > 0 && first.gasOilRatioScfPerStb < Infinity)) {
    throw new DomainError(
      `The separator gas-oil ratio is above zero, not ${first.gasOilRatioScfPerStb} scf/STB`,
      { input: "primarySeparator.gasOilRatioScfPerStb", value: first.gasOilRatioScfPerStb },
    );
  }
  if (second) {
    if (!(second.pressurePsia < first.pressurePsia)) {
      throw new DomainError(
        `The second separator works below the first: ${second.pressurePsia} psia is not below ${first.pressurePsia} psia`,
        { input: "secondSeparator.pressurePsia", value: second.pressurePsia },
      );
    }
    warnings.push(
      ...checkFluidValue("secondPressure", second.pressurePsia, "secondSeparator.pressurePsia"),
      ...checkFluidValue("temperature", second.temperatureDegF, "secondSeparator.temperatureDegF"),
    );
  }
  for (const [path, gas] of [
    ["secondSeparator.gas", second?.gas],
    ["stockTankGas", tank],
  ] as const) {
    if (!gas) continue;
    if (!(gas.gasOilRatioScfPerStb >= 0 && gas.gasOilRatioScfPerStb < Infinity)) {
      throw new DomainError(
        `A measured gas-oil ratio is not negative: ${gas.gasOilRatioScfPerStb} scf/STB`,
        { input: `${path}.gasOilRatioScfPerStb`, value: gas.gasOilRatioScfPerStb },
      );
    }
    warnings.push(
      ...checkFluidValue("lowPressureGasGravity", gas.gasGravity, `${path}.gasGravity`),
    );
    if (gas.gasGravity < first.gasGravity) {
      warnings.push({
        code: "light_low_pressure_gas",
        severity: "warning",
        input: `fluid.${path}.gasGravity`,
        message:
          `The low-pressure gas (${gas.gasGravity}) is lighter than the separator gas (${first.gasGravity}); ` +
          "it is heavier in nearly every test.",
      });
    }
    if (gas.gasOilRatioScfPerStb > first.gasOilRatioScfPerStb) {
      warnings.push({
        code: "unusual_stage_split",
        severity: "warning",
        input: `fluid.${path}.gasOilRatioScfPerStb`,
        message:
          `A later stage gives more gas (${gas.gasOilRatioScfPerStb} scf/STB) than the first separator ` +
          `(${first.gasOilRatioScfPerStb} scf/STB). Are the stages in order?`,
      });
    }
  }
  if (test.condensateMolecularWeight !== null) {
    warnings.push(
      ...checkFluidValue(
        "molecularWeight",
        test.condensateMolecularWeight,
        "condensateMolecularWeight",
      ),
    );
  }
  return warnings;
}
