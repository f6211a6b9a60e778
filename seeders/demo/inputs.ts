import { recombine } from "@/analytics/fluid/wellstream";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import type { RecoveryPlan } from "@/analytics/recovery/recovery-plan-schema";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import {
  inputNames,
  type EstimateInputs,
  type InputName,
} from "@/analytics/volumetrics/inputs-schema";
import type { DemoRevision } from "./history";
import { demoRanges } from "./ranges";
import { reasonFor } from "./reasons";
import type { DemoReservoir } from "./reservoirs";

const round = (value: number, digits: number) => Number(value.toPrecision(digits));

/** Gas of the later stages in proportion to the first separator's pressure, as flash liberation roughly goes. */
const tankGasShare = 0.55;
const secondStageShare = { second: 0.36, tank: 0.17 };

/** A lab sheet with the yield, gravities and impurities of the scenario. */
export function separatorTestOf({ fluid }: DemoReservoir): SeparatorTest {
  const total = 1e6 / fluid.yieldStbPerMmscf;
  const later = fluid.separatorPsia * (fluid.stages === 3 ? 0.53 : tankGasShare);
  const isThreeStage = fluid.stages === 3;
  const tank = fluid.separatorPsia * (isThreeStage ? secondStageShare.tank : tankGasShare);
  return {
    basePressurePsia: 14.696,
    primarySeparator: {
      pressurePsia: fluid.separatorPsia,
      temperatureDegF: fluid.separatorDegF,
      gasOilRatioScfPerStb: Math.round(total - later),
      gasGravity: fluid.separatorGasGravity,
    },
    secondSeparator: isThreeStage
      ? {
          pressurePsia: 65,
          temperatureDegF: fluid.separatorDegF - 6,
          gas: {
            gasOilRatioScfPerStb: Math.round(fluid.separatorPsia * secondStageShare.second),
            gasGravity: round(fluid.separatorGasGravity + 0.26, 3),
          },
        }
      : null,
    stockTankGas:
      fluid.tankGas === "measured"
        ? {
            gasOilRatioScfPerStb: Math.round(tank),
            gasGravity: round(fluid.separatorGasGravity + (isThreeStage ? 0.62 : 0.44), 3),
          }
        : null,
    condensateApi: fluid.condensateApi,
    condensateMolecularWeight: null,
    nitrogen: fluid.nitrogen,
    carbonDioxide: fluid.carbonDioxide,
    hydrogenSulphide: fluid.hydrogenSulphide,
    dewPointPsia: fluid.dewPointPsia,
  };
}

type Ends = [low: number, high: number];

const lognormal = ([p90, p10]: Ends): Distribution => ({ kind: "lognormalP90P10", p90, p10 });
const normal = (
  [p90, p10]: Ends,
  bounds: { minimum?: number; maximum?: number } = {},
): Distribution => ({
  kind: "normalP90P10",
  p90,
  p10,
  ...bounds,
});

/** A range as it was believed on the day of a revision: moved by its factor, widened about its middle. */
function then(ends: Ends, revision: DemoRevision, input: InputName): Ends {
  const factor = revision.factors[input] ?? 1;
  const spread = revision.spread ?? 1;
  const [low, high] = ends.map((end) => end * factor);
  const ratio = Math.sqrt(high / low) ** spread;
  const middle = Math.sqrt(low * high);
  return [round(middle / ratio, 3), round(middle * ratio, 3)];
}

function pertThen(
  [low, mode, high]: [number, number, number],
  revision: DemoRevision,
  input: InputName,
): Distribution {
  const factor = revision.factors[input] ?? 1;
  const spread = revision.spread ?? 1;
  const centre = mode * factor;
  return {
    kind: "pert",
    low: round(centre - (mode - low) * spread, 3),
    mode: round(centre, 3),
    high: round(centre + (high - mode) * spread, 3),
  };
}

/** A revision this much less certain than the current one was made with the first well. */
const FIRST_WELL_SPREAD = 1.25;

/** The inputs of one revision of one reservoir. */
export function inputsOf(
  reservoir: DemoReservoir,
  test: SeparatorTest,
  revision: DemoRevision,
  recoveryPlan: RecoveryPlan | null,
): EstimateInputs {
  const special = demoRanges[`${reservoir.field} / ${reservoir.name}`] ?? {};
  const isEarly = (revision.spread ?? 1) >= FIRST_WELL_SPREAD;
  const uncertain = ordinaryInputs(reservoir, test, revision);
  for (const input of inputNames) {
    const range = special[input];
    if (range && revision.on >= range.since) {
      const { distribution, source, reason } = range;
      uncertain[input] = { distribution, source, reason };
    } else {
      uncertain[input].reason = reasonFor(input, isEarly, reservoir.depthFt);
    }
  }
  const isShared = ({ distribution }: UncertainInput) =>
    distribution.kind === "scenarios" && distribution.caseSet !== undefined;
  return {
    schemaVersion: 1,
    uncertain,
    correlations: [
      { a: "porosity", b: "waterSaturation", rank: -0.5 },
      // Inputs that take their case together are tied by it.
      ...(isShared(uncertain.areaAcres)
        ? []
        : [{ a: "areaAcres" as const, b: "netThicknessFt" as const, rank: 0.2 }]),
      // A plan works both recoveries out of one curve.
      ...(recoveryPlan
        ? []
        : [{ a: "gasRecovery" as const, b: "condensateRecovery" as const, rank: 0.6 }]),
    ],
    fluid: test,
    depthFt: reservoir.depthFt,
    recoveryPlan,
  };
}

type UncertainInput = EstimateInputs["uncertain"][InputName];

function ordinaryInputs(
  reservoir: DemoReservoir,
  test: SeparatorTest,
  revision: DemoRevision,
): EstimateInputs["uncertain"] {
  const { fluid } = reservoir;
  const yieldNow = recombine(test).condensateYieldStbPerMmscf;
  const range = (ends: Ends, input: InputName) => then(ends, revision, input);
  const wells = `Wells and map of ${reservoir.field}`;
  return {
    areaAcres: {
      distribution: lognormal(range(reservoir.areaAcres, "areaAcres")),
      source: `Structure map, ${revision.on.slice(0, 4)}`,
    },
    netThicknessFt: {
      distribution: lognormal(range(reservoir.netThicknessFt, "netThicknessFt")),
      source: "Log evaluation, net pay cut-offs of the field",
    },
    porosity: {
      distribution: normal(range(reservoir.porosity, "porosity"), {
        minimum: 0.01,
        maximum: 0.4,
      }),
      source: "Core and density log",
    },
    waterSaturation: {
      distribution: normal(range(reservoir.waterSaturation, "waterSaturation"), {
        minimum: 0.03,
        maximum: 0.9,
      }),
      source: "Resistivity log, Archie",
    },
    pressurePsia: {
      distribution: normal(reservoir.pressurePsia),
      source: "Formation tester, at the datum",
    },
    temperatureDegF: {
      distribution: normal(reservoir.temperatureDegF),
      source: "Bottom-hole gauge, extrapolated",
    },
    condensateYieldStbPerMmscf: {
      distribution: normal(
        range([yieldNow * 0.93, yieldNow * 1.07], "condensateYieldStbPerMmscf"),
        { minimum: round(yieldNow * 0.5, 3) },
      ),
      source: `Separator test ${fluid.sample}`,
    },
    gasRecovery: {
      distribution: pertThen(reservoir.gasRecovery, revision, "gasRecovery"),
      source: `${wells}; depletion analogues`,
    },
    condensateRecovery: {
      distribution: pertThen(reservoir.condensateRecovery, revision, "condensateRecovery"),
      source: "Analogues of like richness, depletion",
    },
    salesGasFraction: {
      distribution: { kind: "triangular", low: 0.9, mode: 0.945, high: 0.97 },
      source: "Fuel and flare of the nearest plant",
    },
  };
}
