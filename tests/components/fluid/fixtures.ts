/** Answers of the calculations, in figures made up to be easy to follow. */
import type {
  EquationOfStateResponse,
  LabSheetResponse,
} from "@/app/api/v1/calculations/fluid-schema";

const point = (temperatureDegF: number, pressurePsia: number) => ({
  temperatureDegF,
  pressurePsia,
});

export const equationOfState: EquationOfStateResponse = {
  components: [],
  isTuned: false,
  saturation: {
    upperPsia: 5201,
    kind: "dewPoint",
    lowerDewPointPsia: 12,
    measuredPsia: 5215,
    mismatchPsia: -14,
  },
  envelope: {
    bubble: [point(-250, 900), point(-100, 2800), point(100, 4900)],
    dew: [point(100, 4900), point(255, 5201), point(500, 3000), point(620, 900), point(520, 15)],
    critical: point(100, 4900),
    cricondentherm: point(620, 900),
    cricondenbar: point(190, 5270),
    quality: [{ liquidVolumeFraction: 0.1, points: [point(100, 4900), point(300, 2500)] }],
  },
  train: {
    stages: [],
    condensateApi: 54,
    condensateMolecularWeight: 133,
    totalGasScfPerStb: 8020,
    condensateYieldStbPerMmscf: 125,
    condensateYieldStbPerMmscfWellstream: 114,
    surfaceGas: {
      gravity: 0.71,
      components: [],
      heatingValue: {
        grossIdealBtuPerScf: 1190,
        grossRealBtuPerScf: 1195,
        netRealBtuPerScf: 1083,
        wobbeRealBtuPerScf: 1415,
        compressionFactor: 0.997,
        relativeDensity: 0.71,
        warnings: [],
      },
      plantLiquids: [],
    },
    separatorTest: null,
  },
  depletion: null,
  curve: {
    route: "untunedEquationOfState",
    temperatureDegF: 255,
    dewPointPsia: 5215,
    points: [
      [5215, 0, 1, 0, 125],
      [3000, 0.13, 0.5, 0.15, 70],
      [2000, 0.22, 0.25, 0.2, 45],
      [1000, 0.29, 0.1, 0.18, 36],
    ].map(([pressurePsia, produced, inGas, liquid, yielded]) => ({
      pressurePsia,
      wellstreamProduced: (5215 - pressurePsia) / 6000,
      gasProduced: (5215 - pressurePsia) / 5900,
      condensateProduced: produced,
      condensateInGas: inGas,
      liquidSaturation: liquid,
      gasZ: 0.9,
      twoPhaseZ: 0.85,
      producingYieldStbPerMmscf: yielded,
    })),
  },
  warnings: [],
};

const row = (pressurePsia: number, gasZ: number | null) => ({
  pressurePsia,
  liquidPercent: 0,
  cumulativeProducedMolePercent: 0,
  gasZ,
  twoPhaseZ: null,
  viscosityCp: null,
  producedGas: null,
});

export const labSheet: LabSheetResponse = {
  composition: {
    kind: "wellstream",
    stream: { light: { C1: 90, C2: 10 }, carbonNumbers: [], plus: null },
  },
  depletion: { temperatureDegF: 255, dewPointPsia: 5215, rows: [row(5215, 1.01), row(4200, null)] },
  stages: null,
  separatorTest: null,
  read: ["The pressure in psia."],
  problems: [
    {
      line: 31,
      column: 4,
      value: "0.9e1?",
      place: "depletion.rows.1.gasZ",
      message: "This is not a number. Left empty.",
    },
  ],
};
