/**
 * Calculations without a record behind them: previews on the screens, and questions that scripts ask. All are pure
 * analytics; what is impossible comes back as the place in the request and the reason.
 */
import { DomainError } from "@/analytics/errors";
import { acidGasWarnings } from "@/analytics/fluid/acid-gas";
import { recombine, wellstreamGravityAtYield, yieldConstants } from "@/analytics/fluid/wellstream";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { gasProperties, type GasProperties } from "@/analytics/gas/gas-properties";
import { pseudocritical } from "@/analytics/gas/pseudocritical";
import {
  checkCorrelations,
  type CorrelationCheck,
} from "@/analytics/uncertainty/check-correlations";
import { describeFit } from "@/analytics/uncertainty/describe-fit";
import {
  compileDistribution,
  densityCurve,
  type CompiledDistribution as Compiled,
} from "@/analytics/uncertainty/distribution";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import type { SamplingMethod } from "@/analytics/uncertainty/sampling-schema";
import {
  AIR_MOLECULAR_WEIGHT,
  baseAtPressure,
  CANONICAL_BASE,
  convertGasVolume,
} from "@/analytics/units/standard-conditions";
import { inPlace } from "@/analytics/volumetrics/in-place";
import { requirePossibleInputs } from "@/analytics/volumetrics/check-inputs";
import { extremeConditionWarnings } from "@/analytics/volumetrics/extreme-conditions";
import {
  inputNames,
  type EstimateInputs,
  type InputName,
} from "@/analytics/volumetrics/inputs-schema";
import { compileInput } from "@/analytics/volumetrics/prepare-inputs";
import type { SimulationSummary } from "@/analytics/volumetrics/results-schema";
import { usualRanges } from "@/analytics/volumetrics/usual-ranges";
import { checkTrials } from "@/analytics/volumetrics/trial-counts";
import { wellstreamRates, type MeteredRate } from "@/analytics/volumetrics/rates";
import type { Warning } from "@/analytics/warnings";
import { runSimulation, type ComputeOptions } from "./compute/pool";
import { InvalidInputError, refuseImpossible, toPointer } from "./errors";

interface GasQuestion {
  gasGravity: number;
  pressurePsia: number;
  temperatureDegF: number;
  nitrogen: number;
  carbonDioxide: number;
  hydrogenSulphide: number;
}

/** z, formation volume factor, density and viscosity of a gas of known gravity. */
export function calculateZFactor(question: GasQuestion): GasProperties {
  const { pressurePsia, temperatureDegF } = question;
  refuseOutsidePossible("", { pressurePsia, temperatureDegF });
  const properties = refuseImpossible("", () => gasProperties(question));
  const warnings = [...properties.warnings, ...dangersOf(question, question)];
  return { ...properties, warnings: warnings.map(about({ uncertain: "", fluid: "" })) };
}

/** A separator test's wellstream, its balance, and its gas at reservoir conditions when they are given. */
export function calculateWellstream(question: {
  separatorTest: SeparatorTest;
  reservoir: { pressurePsia: number; temperatureDegF: number } | null;
  metered: MeteredRate | null;
}) {
  const { separatorTest: test, reservoir, metered } = question;
  if (reservoir) refuseOutsidePossible("reservoir", reservoir);
  const wellstream = refuseImpossible("separatorTest", () => recombine(test));
  const { temperatureDegR, pressurePsia } = pseudocritical(wellstream.wellstreamGravity, test);
  const properties =
    reservoir &&
    refuseImpossible("reservoir", () =>
      gasProperties({ ...test, ...reservoir, gasGravity: wellstream.wellstreamGravity }),
    );
  const named = about({ uncertain: "reservoir", fluid: "separatorTest" });
  const atReservoir = properties && {
    ...properties,
    warnings: [...properties.warnings, ...dangersOf(reservoir, test)].map(named),
  };
  // The reservoir's pressure says more about acid gas than the separator's.
  const tested = reservoir ? withoutAcidGas(wellstream.warnings) : wellstream.warnings;
  return {
    ...wellstream,
    condensateMolecularWeightMethod:
      test.condensateMolecularWeight === null ? ("cragoe" as const) : ("laboratory" as const),
    wellstreamMolecularWeight: wellstream.wellstreamGravity * AIR_MOLECULAR_WEIGHT,
    balance: balanceOf(test, wellstream),
    pseudocritical: { temperatureDegR, pressurePsia },
    atReservoir,
    rates:
      metered && atReservoir
        ? wellstreamRates(metered, wellstream, atReservoir.formationVolumeFactorCfPerScf)
        : null,
    warnings: [...tested.map(named), ...(atReservoir?.warnings ?? [])],
  };
}

/** Streams of one stock-tank barrel's wellstream, as scf at 14.696 psia and 60 degF and as shares of its moles. */
function balanceOf(test: SeparatorTest, wellstream: ReturnType<typeof recombine>) {
  const base = baseAtPressure(test.basePressurePsia);
  const measured = (
    stream: "primary_separator" | "second_separator" | "stock_tank",
    gas: { gasOilRatioScfPerStb: number; gasGravity: number } | null | undefined,
  ) =>
    gas
      ? [
          {
            stream,
            scfPerStb: convertGasVolume(gas.gasOilRatioScfPerStb, base, CANONICAL_BASE),
            gravity: gas.gasGravity,
          },
        ]
      : [];
  const streams = [
    ...measured("primary_separator", test.primarySeparator),
    ...measured("second_separator", test.secondSeparator?.gas),
    ...measured("stock_tank", test.stockTankGas),
    ...(wellstream.unmeasuredVapourScfPerStb === null
      ? []
      : [
          {
            stream: "unmeasured" as const,
            scfPerStb: wellstream.unmeasuredVapourScfPerStb,
            gravity: null,
          },
        ]),
    {
      stream: "condensate" as const,
      scfPerStb: wellstream.vapourEquivalentScfPerStb,
      gravity: wellstream.condensateMolecularWeight / AIR_MOLECULAR_WEIGHT,
    },
  ];
  return streams.map((stream) => ({
    ...stream,
    moleShare: stream.scfPerStb / wellstream.wellstreamScfPerStb,
  }));
}

/** Gas and condensate in place of one reservoir with single values. */
export function calculateInPlace(question: {
  areaAcres: number;
  netThicknessFt: number;
  porosity: number;
  waterSaturation: number;
  pressurePsia: number;
  temperatureDegF: number;
  separatorTest: SeparatorTest;
  zFactor: number | null;
  condensateYieldStbPerMmscf: number | null;
}) {
  const { separatorTest, zFactor, condensateYieldStbPerMmscf: typedYield, ...rock } = question;
  refuseOutsidePossible("", {
    ...rock,
    ...(typedYield !== null && { condensateYieldStbPerMmscf: typedYield }),
  });
  const tested = refuseImpossible("separatorTest", () => recombine(separatorTest));
  const condensateYieldStbPerMmscf = typedYield ?? tested.condensateYieldStbPerMmscf;
  const wellstreamGravity = wellstreamGravityAtYield(
    condensateYieldStbPerMmscf,
    yieldConstants(tested),
  );
  const result = refuseImpossible("", () =>
    inPlace({
      ...rock,
      wellstream: { ...tested, condensateYieldStbPerMmscf, wellstreamGravity },
      impurities: separatorTest,
      measuredZFactor: zFactor ?? undefined,
    }),
  );
  return {
    ...result,
    wellstreamGravity,
    condensateYieldStbPerMmscf,
    warnings: [
      ...withoutAcidGas(tested.warnings),
      ...result.warnings,
      ...dangersOf(rock, separatorTest),
    ].map(about({ uncertain: "", fluid: "separatorTest" })),
  };
}

/** Percentiles, moments, a drawable density, and how well what was given fits. */
export function calculateDistribution(question: { distribution: Distribution; points: number }) {
  const { distribution, points } = question;
  return refuseImpossible("distribution", () => {
    const compiled = compileDistribution(distribution);
    const curve = densityCurve(distribution, points);
    return {
      ...figuresOf(compiled),
      curve: { values: curve.x, densities: curve.density },
      atoms: compiled.atoms.map((atom) => ({ ...atom })),
      cases:
        compiled.cases?.map(({ name, weight, compiled: one }) => ({
          name,
          weight,
          ...figuresOf(one),
        })) ?? null,
    };
  });
}

function figuresOf({ definition, range, mean, standardDeviation, support, lostMass }: Compiled) {
  return {
    range: { ...range, mean },
    standardDeviation,
    support: { low: finiteOrNull(support.minimum), high: finiteOrNull(support.maximum) },
    lostMass,
    fit: describeFit(definition),
  };
}

/** Whether rank correlations are possible together, and the nearest that are. */
export function calculateCorrelations({
  correlations,
}: Pick<EstimateInputs, "correlations">): CorrelationCheck<InputName> {
  return refuseImpossible("", () =>
    checkCorrelations(inputNames, correlations, (name) => usualRanges[name].label),
  );
}

const finiteOrNull = (value: number) => (Number.isFinite(value) ? value : null);

/**
 * A simulation whose trials are not kept. Impossible inputs are refused before a thread is asked.
 *
 * @param options.signal  gives it up: a preview is abandoned with the next keystroke
 */
export async function calculateSimulation(
  question: { inputs: EstimateInputs; trials: number; seed: number; sampling: SamplingMethod },
  options: ComputeOptions = {},
): Promise<SimulationSummary> {
  const { inputs, trials, seed, sampling } = question;
  refuseImpossible("", () => checkTrials(trials, sampling));
  refuseImpossible("inputs", () => requirePossibleInputs(inputs));
  const { summary } = await runSimulation(inputs, { trials, seed, sampling }, options);
  return summary;
}

/**
 * What an estimate refuses is refused here too, every value of it at once.
 *
 * @param under  the property of the request body that holds the values
 */
function refuseOutsidePossible(under: string, values: Partial<Record<InputName, number>>): void {
  const problems = (Object.entries(values) as [InputName, number][]).flatMap(([name, value]) => {
    try {
      compileInput(name, { kind: "constant", value });
      return [];
    } catch (error) {
      if (!(error instanceof DomainError)) throw error;
      return [{ pointer: toPointer(name, under), detail: error.message }];
    }
  });
  if (problems.length > 0) throw new InvalidInputError(problems);
}

/** Cautions that anybody who works at this state with this gas must hear, and corrosion. */
function dangersOf(
  state: { pressurePsia: number; temperatureDegF: number },
  gas: { hydrogenSulphide: number; carbonDioxide: number },
): Warning[] {
  return [
    ...extremeConditionWarnings(state, "The reservoir is at"),
    ...acidGasWarnings(
      gas.hydrogenSulphide,
      gas.carbonDioxide,
      state.pressurePsia,
      "at reservoir pressure",
    ),
  ];
}

const withoutAcidGas = (warnings: readonly Warning[]) =>
  warnings.filter(({ code }) => code !== "sour_gas" && code !== "corrosive_gas");

/** Analytics names inputs as an estimate has them; this names them as the request at hand does. */
function about(parts: { uncertain: string; fluid: string }): (warning: Warning) => Warning {
  return ({ input, ...warning }) => {
    const [part, ...rest] = (input ?? "").split(".");
    const under = part === "uncertain" || part === "fluid" ? parts[part] : part;
    const path = [under, ...rest].filter((name) => name !== "").join(".");
    return path === "" ? warning : { ...warning, input: path };
  };
}
