import type { CompositionSheet, SeparatorStage } from "@/analytics/composition/composition-schema";
import type { Stream } from "@/analytics/composition/stream";
import { recoveryCurveOfSimulation } from "@/analytics/depletion/recovery-curve";
import { depleteCell, tableOfSimulation } from "@/analytics/depletion/simulate-depletion";
import type { DepletionTable } from "@/analytics/depletion/depletion-table-schema";
import {
  tuningStanding,
  type TuningRecord,
  type TuningStanding,
} from "@/analytics/depletion/tuning-record";
import { ConvergenceError, DomainError } from "@/analytics/errors";
import { namedComponents } from "@/analytics/equation-of-state/characterise";
import type { Characterisation } from "@/analytics/equation-of-state/characterisation-schema";
import { phaseEnvelope, type PhaseEnvelope } from "@/analytics/equation-of-state/envelope";
import type { Characterised } from "@/analytics/equation-of-state/mixture";
import {
  saturationPressures,
  upperSaturation,
  type SaturationPressures,
} from "@/analytics/equation-of-state/saturation";
import { flashTrain, type SeparatorTrain } from "@/analytics/equation-of-state/separator-train";
import { heatingValue } from "@/analytics/gas/heating-value";
import { plantLiquids } from "@/analytics/gas/plant-liquids";
import { degreesRankine } from "@/analytics/units/conversions";
import type { Warning } from "@/analytics/warnings";
import { characteriseSheet } from "./characterised-sheet";

export interface EquationOfStateQuestion {
  sheet: CompositionSheet;
  characterisation: Characterisation;
  temperatureDegF: number;
  measuredDewPointPsia: number | null;
  stages: SeparatorStage[];
  /** null chooses steps from the dew point down */
  depletionPressuresPsia: number[] | null;
  /** what the adjustments come from, with the table that they were fitted to; null leaves the fluid untuned */
  tuning: TuningRecord | null;
  table: DepletionTable | null;
}

/** Shares of liquid by volume for which the diagram has lines. */
const QUALITY_LINES = [0.05, 0.1, 0.2, 0.3];

/**
 * Phase behaviour, separators and simulated depletion of a fluid by the equation of state.
 *
 * @throws {DomainError} with a path into the question
 * @throws {ConvergenceError}
 */
export function describePhases(question: EquationOfStateQuestion) {
  const { sheet, characterisation, temperatureDegF, measuredDewPointPsia, stages } = question;
  const { stream, characterised, warnings } = characteriseSheet(sheet, characterisation);
  const { mixture, moleFractions } = characterised;
  const found = saturationOf(characterised, temperatureDegF);
  const { saturation } = found;
  const { upper, lower } = saturation;
  const flashed = trainOf(characterised, stages);
  const traced = envelopeOf(characterised);
  const standing = standingOf(question, saturation);
  const simulated = depletionOf(question, characterised, saturation, standing);
  return {
    components: mixture.names.map((name, index) => ({
      name,
      moleFraction: moleFractions[index],
      molecularWeight: mixture.molecularWeight[index],
      criticalTemperatureDegR: mixture.criticalTemperatureDegR[index],
      criticalPressurePsia: mixture.criticalPressurePsia[index],
      acentricFactor: mixture.acentricFactor[index],
    })),
    isTuned: standing.isTuned,
    saturation: {
      upperPsia: upper?.pressurePsia ?? null,
      kind: upper?.kind ?? ("none" as const),
      lowerDewPointPsia: lower,
      measuredPsia: measuredDewPointPsia,
      mismatchPsia:
        upper && measuredDewPointPsia !== null ? upper.pressurePsia - measuredDewPointPsia : null,
    },
    envelope: traced.envelope,
    train: flashed.train && presentTrain(flashed.train, stream, characterisation),
    depletion: simulated.depletion,
    curve: simulated.curve,
    warnings: [
      ...warnings,
      ...saturationWarnings(question, saturation, standing),
      ...found.warnings,
      ...flashed.warnings,
      ...traced.warnings,
      ...simulated.warnings,
    ],
  };
}

/** The lower dew point is of interest by itself only: where it cannot be found it is left out, and that is said. */
function saturationOf(
  { mixture, moleFractions }: Characterised,
  temperatureDegF: number,
): { saturation: SaturationPressures; warnings: Warning[] } {
  const temperatureDegR = degreesRankine(temperatureDegF);
  try {
    return {
      saturation: saturationPressures(mixture, moleFractions, temperatureDegR),
      warnings: [],
    };
  } catch (error) {
    if (!(error instanceof ConvergenceError)) throw error;
    return {
      saturation: {
        upper: upperSaturation(mixture, moleFractions, temperatureDegR),
        lower: null,
      },
      warnings: [
        notConverged(
          "lower_dew_point_not_found",
          "characterisation",
          `The lower dew point could not be found: ${error.message}`,
        ),
      ],
    };
  }
}

/** The dew point is held against the measured one at the temperature of the table only. */
function standingOf(
  { sheet, characterisation, table, tuning, temperatureDegF }: EquationOfStateQuestion,
  { upper }: SaturationPressures,
): TuningStanding {
  const isThere = table !== null && Math.abs(table.temperatureDegF - temperatureDegF) < 0.5;
  const dewPoint = isThere ? (upper?.pressurePsia ?? 0) : null;
  return tuningStanding({ sheet, characterisation, table }, tuning, dewPoint);
}

/** A gas that leaves nothing in the tank has no yield; its diagram and its dew point stand all the same. */
function trainOf(
  { mixture, moleFractions }: Characterised,
  stages: SeparatorStage[],
): { train: SeparatorTrain | null; warnings: Warning[] } {
  try {
    return { train: flashTrain(mixture, moleFractions, stages), warnings: [] };
  } catch (error) {
    // A stage that cannot be is named itself; `stages` alone is about what comes out of them.
    if (!(error instanceof DomainError) || error.details.input !== "stages") throw error;
    return {
      train: null,
      warnings: [
        {
          code: "no_separation",
          severity: "warning",
          input: "stages",
          message: `${error.message}: there is no yield and no separator test from it. The other figures stand.`,
        },
      ],
    };
  }
}

/** The diagram is drawn beside the figures; what of it cannot be traced is left out, and said. */
function envelopeOf({ mixture, moleFractions }: Characterised) {
  const trace = (liquidVolumeFractions: number[]) =>
    presentEnvelope(phaseEnvelope(mixture, moleFractions, { liquidVolumeFractions }));
  try {
    return { envelope: trace(QUALITY_LINES), warnings: [] };
  } catch (error) {
    if (!(error instanceof ConvergenceError)) throw error;
  }
  try {
    const message = "The lines of equal liquid share could not be traced.";
    return {
      envelope: trace([]),
      warnings: [notConverged("quality_lines_not_traced", "characterisation", message)],
    };
  } catch (error) {
    if (!(error instanceof ConvergenceError)) throw error;
    const nothing = { critical: null, cricondentherm: null, cricondenbar: null };
    const message = `The phase envelope could not be traced: ${error.message}`;
    return {
      envelope: { bubble: [], dew: [], ...nothing, quality: [] },
      warnings: [notConverged("envelope_not_traced", "characterisation", message)],
    };
  }
}

const presentEnvelope = ({ bubble, dew, quality, ...extremes }: PhaseEnvelope) => ({
  ...extremes,
  bubble: [...bubble],
  dew: [...dew],
  quality: quality.map(({ liquidVolumeFraction, points }) => ({
    liquidVolumeFraction,
    points: [...points],
  })),
});

/** A depletion begins at a dew point; a fluid without one has no depletion, which the warnings say. */
function depletionOf(
  { temperatureDegF, stages, depletionPressuresPsia }: EquationOfStateQuestion,
  characterised: Characterised,
  { upper }: SaturationPressures,
  { isTuned }: TuningStanding,
) {
  const none = { depletion: null, curve: null };
  if (upper?.kind !== "dewPoint") return { ...none, warnings: [] };
  try {
    const cell = depleteCell(characterised, temperatureDegF, depletionPressuresPsia);
    const route = isTuned ? "tunedEquationOfState" : "untunedEquationOfState";
    return {
      depletion: tableOfSimulation(characterised, cell),
      curve: recoveryCurveOfSimulation(characterised, cell, stages, route),
      warnings: [],
    };
  } catch (error) {
    // A gas that leaves nothing in the tank has no condensate whose recovery could be followed.
    const isEmptyTank = error instanceof DomainError && error.details.input === "stages";
    if (isEmptyTank) return { ...none, warnings: [] };
    if (!(error instanceof ConvergenceError)) throw error;
    return {
      ...none,
      warnings: [
        notConverged(
          "depletion_not_simulated",
          "characterisation",
          `The depletion could not be simulated: ${error.message}`,
        ),
      ],
    };
  }
}

const notConverged = (code: string, input: string, message: string): Warning => ({
  code,
  severity: "warning",
  input,
  message: `${message.replace(/\.?$/, ".")} The other figures stand. Try another split of heptanes plus.`,
});

function saturationWarnings(
  { temperatureDegF, measuredDewPointPsia }: EquationOfStateQuestion,
  { upper }: SaturationPressures,
  { isTuned, doubt }: TuningStanding,
): Warning[] {
  const at = { severity: "warning" as const, input: "temperatureDegF" };
  if (!upper) {
    return [
      {
        ...at,
        code: "above_cricondentherm",
        message: `At ${temperatureDegF} °F the fluid is above its cricondentherm: it stays a gas at every pressure, and drops no liquid in the reservoir.`,
      },
    ];
  }
  if (upper.kind === "bubblePoint") {
    return [
      {
        ...at,
        code: "fluid_is_oil",
        message: `By the equation of state the fluid is an oil at ${temperatureDegF} °F, with a bubble point of ${Math.round(upper.pressurePsia)} psia. A depletion below a dew point does not apply.`,
      },
    ];
  }
  if (isTuned) return [];
  return [
    {
      code: "untuned_equation_of_state",
      severity: "warning",
      input: "characterisation.adjustments",
      message:
        doubt !== null
          ? `The equation of state does not count as tuned. ${doubt} Dropout and recovery from it are an indication.`
          : measuredDewPointPsia === null
            ? "The equation of state is not tuned, and no measured dew point stands beside its own. Dropout and recovery from it are an indication."
            : `The equation of state is not tuned: its dew point is ${Math.round(Math.abs(upper.pressurePsia - measuredDewPointPsia))} psi ${upper.pressurePsia < measuredDewPointPsia ? "below" : "above"} the measured one. Dropout and recovery from it are an indication.`,
    },
  ];
}

function presentTrain(train: SeparatorTrain, stream: Stream, characterisation: Characterisation) {
  const gas = namedComponents(stream, characterisation, train.surfaceGasMoleFractions);
  return {
    stages: train.stages.map(
      ({ pressurePsia, temperatureDegF, gasScfPerStb, gasGravity, liquidVolumeFactor }) => ({
        pressurePsia,
        temperatureDegF,
        gasScfPerStb,
        gasGravity,
        liquidVolumeFactor,
      }),
    ),
    condensateApi: train.condensateApi,
    condensateMolecularWeight: train.condensateMolecularWeight,
    totalGasScfPerStb: train.totalGasScfPerStb,
    condensateYieldStbPerMmscf: train.condensateYieldStbPerMmscf,
    condensateYieldStbPerMmscfWellstream: train.condensateYieldStbPerMmscfWellstream,
    surfaceGas: {
      gravity: train.surfaceGasGravity,
      components: gas.map(({ name, moleFraction }) => ({ name, moleFraction })),
      heatingValue: heatingValue(gas),
      plantLiquids: plantLiquids(gas),
    },
    separatorTest: train.separatorTest,
  };
}
