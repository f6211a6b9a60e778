/**
 * The gas condensate of the third SPE comparative solution project: D. E. Kenyon, G. A. Behie, J. Pet. Technol. 39
 * (August 1987) 981-997, its laboratory tables from memory. Every composition adds up to 100.00, the two-phase z
 * follows from the produced wellstream to 0.0006, and the component balance leaves a liquid of 36 to 41 lb/ft3.
 */
import type { ReportedStream, SeparatorStage } from "@/analytics/composition/composition-schema";
import { readStream } from "@/analytics/composition/read-sheet";
import type { DepletionTable } from "@/analytics/depletion/depletion-table-schema";

const GAUGE = 14.7;

const light = ["CO2", "N2", "C1", "C2", "C3", "iC4", "nC4", "iC5", "nC5", "C6"] as const;

interface Step {
  readonly psig: number;
  /** mole per cent: the ten of `light`, then heptanes plus */
  readonly gas: readonly number[];
  readonly heptanesPlus: readonly [molecularWeight: number, specificGravity: number];
  readonly gasZ: number;
  readonly twoPhaseZ: number;
  readonly produced: number;
  readonly liquid: number;
}

const steps: readonly Step[] = [
  {
    psig: 3428,
    gas: [1.21, 1.94, 65.99, 8.69, 5.91, 2.39, 2.78, 1.57, 1.12, 1.81, 6.59],
    heptanesPlus: [140, 0.774],
    gasZ: 0.803,
    twoPhaseZ: 0.803,
    produced: 0,
    liquid: 0,
  },
  {
    psig: 3000,
    gas: [1.24, 2.13, 69.78, 8.66, 5.67, 2.2, 2.54, 1.39, 0.96, 1.43, 4.0],
    heptanesPlus: [127, 0.761],
    gasZ: 0.798,
    twoPhaseZ: 0.774,
    produced: 9.095,
    liquid: 15,
  },
  {
    psig: 2400,
    gas: [1.27, 2.24, 72.72, 8.63, 5.46, 2.01, 2.31, 1.2, 0.82, 1.08, 2.26],
    heptanesPlus: [118, 0.752],
    gasZ: 0.802,
    twoPhaseZ: 0.748,
    produced: 24.702,
    liquid: 19.9,
  },
  {
    psig: 1800,
    gas: [1.31, 2.27, 73.98, 8.79, 5.38, 1.93, 2.18, 1.09, 0.73, 0.88, 1.46],
    heptanesPlus: [111, 0.745],
    gasZ: 0.83,
    twoPhaseZ: 0.73,
    produced: 42.026,
    liquid: 19.2,
  },
  {
    psig: 1200,
    gas: [1.33, 2.2, 73.68, 9.12, 5.61, 2.01, 2.27, 1.09, 0.72, 0.83, 1.14],
    heptanesPlus: [106, 0.74],
    gasZ: 0.877,
    twoPhaseZ: 0.703,
    produced: 59.687,
    liquid: 17.1,
  },
  {
    psig: 700,
    gas: [1.32, 2.03, 71.36, 9.66, 6.27, 2.4, 2.6, 1.23, 0.84, 1.02, 1.27],
    heptanesPlus: [105, 0.739],
    gasZ: 0.924,
    twoPhaseZ: 0.642,
    produced: 74.019,
    liquid: 15.2,
  },
];

const reported = ({ gas, heptanesPlus }: Step): ReportedStream => ({
  light: Object.fromEntries(light.map((name, index) => [name, gas[index]])),
  carbonNumbers: [],
  plus: {
    carbonNumber: 7,
    molePercent: gas[gas.length - 1],
    molecularWeight: heptanesPlus[0],
    specificGravity: heptanesPlus[1],
  },
});

/** The laboratory's constant-volume depletion at 200 degF, a fresh copy for each test to spoil. */
export const studyTable = (): DepletionTable => ({
  temperatureDegF: 200,
  dewPointPsia: steps[0].psig + GAUGE,
  rows: steps.map((step) => ({
    pressurePsia: step.psig + GAUGE,
    liquidPercent: step.liquid,
    cumulativeProducedMolePercent: step.produced,
    gasZ: step.gasZ,
    twoPhaseZ: step.twoPhaseZ,
    viscosityCp: null,
    producedGas: reported(step),
  })),
});

export const studyReported = reported(steps[0]);
/** The wellstream. */
export const studyStream = readStream(studyReported).stream;

/** Separators of the study; its first one works at 300 psig once the reservoir is below 1,200 psig. */
export const studyStages = (reservoirPsia: number): SeparatorStage[] => [
  { pressurePsia: (reservoirPsia < 1200 + GAUGE ? 300 : 800) + GAUGE, temperatureDegF: 80 },
  { pressurePsia: 50 + GAUGE, temperatureDegF: 80 },
  { pressurePsia: GAUGE, temperatureDegF: 60 },
];

/** Calculated surface recovery per MMscf of the fluid at the dew point; gas in Mscf, cumulative. */
export const studySurface = {
  initial: { stb: 131.0, separatorMscf: [750.46, 107.05, 27.25] },
  psig: [3000, 2400, 1800, 1200, 700],
  stb: [7.35, 14.83, 20.43, 25.14, 29.25],
  firstSeparatorMscf: [74.75, 211.89, 369.22, 530.64, 666.19],
  secondSeparatorMscf: [7.25, 16.07, 23.76, 31.45, 32.92],
  stockTankMscf: [2.02, 4.7, 7.15, 9.69, 12.67],
} as const;
