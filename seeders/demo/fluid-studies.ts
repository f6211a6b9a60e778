import {
  lightComponents,
  type CompositionSheet,
  type ReportedStream,
} from "@/analytics/composition/composition-schema";
import type { DepletionRow, DepletionTable } from "@/analytics/depletion/depletion-table-schema";
import type { Adjustments } from "@/analytics/equation-of-state/characterisation-schema";

/**
 * Laboratory studies of the demo's fluids. The fluids are invented; their figures were simulated once with an equation
 * of state that no screen shows, so that yield, density and dew point are those of their separator sheets, and rounded
 * as a laboratory reports. One table has a two-phase z that cannot be, for its check to find.
 */
export interface DemoStudy {
  composition: CompositionSheet;
  /** null for a fluid of which only the composition was measured */
  table: DepletionTable | null;
  /** adjustments that somebody accepted, with how well they fit; null for an equation of state as it comes */
  tuned: {
    adjustments: Partial<Adjustments>;
    fittedDewPointPsia: number;
    averageLiquidErrorPoints: number;
  } | null;
}

type Plus = [
  carbonNumber: number,
  molePercent: number,
  molecularWeight: number,
  specificGravity: number,
];

/** @param light  mole per cent in the order of a sheet, H2S to C6;  @param numbers  C7, C8, … before the plus fraction */
function stream(
  light: number[],
  [carbonNumber, molePercent, molecularWeight, specificGravity]: Plus,
  numbers: number[] = [],
): ReportedStream {
  return {
    light: Object.fromEntries(lightComponents.map((name, index) => [name, light[index]])),
    carbonNumbers: numbers.map((share, index) => ({ carbonNumber: 7 + index, molePercent: share })),
    plus: { carbonNumber, molePercent, molecularWeight, specificGravity },
  };
}

/** Pressure, liquid, produced, gas z, two-phase z and viscosity; the produced gas where it was analysed. */
function row(
  [
    pressurePsia,
    liquidPercent,
    cumulativeProducedMolePercent,
    gasZ,
    twoPhaseZ,
    viscosityCp,
  ]: number[],
  light?: number[],
  plus?: [molePercent: number, molecularWeight: number, specificGravity: number],
): DepletionRow {
  return {
    pressurePsia,
    liquidPercent,
    cumulativeProducedMolePercent,
    gasZ,
    twoPhaseZ,
    viscosityCp,
    producedGas: light && plus ? stream(light, [7, ...plus]) : null,
  };
}

const table = (
  temperatureDegF: number,
  dewPointPsia: number,
  rows: DepletionRow[],
): DepletionTable => ({ temperatureDegF, dewPointPsia, rows });

/** By field and reservoir. */
export const demoStudies: Readonly<Record<string, DemoStudy>> = {
  "Pellow North / Marrow sand, main": {
    composition: {
      kind: "wellstream",
      stream: stream(
        [0, 2, 0.8, 69.41, 8.59, 4.48, 0.9, 1.64, 0.71, 0.67, 0.93],
        [7, 9.87, 128, 0.769],
      ),
    },
    table: table(231, 4141, [
      row(
        [4141, 0, 0, 0.887, 0.887, 0.0409],
        [0, 2, 0.8, 69.41, 8.59, 4.48, 0.9, 1.64, 0.71, 0.67, 0.93],
        [9.87, 128, 0.769],
      ),
      row(
        [3814.7, 24.3, 5.48, 0.871, 0.865, 0.032],
        [0, 2.04, 0.87, 72.81, 8.55, 4.3, 0.84, 1.51, 0.64, 0.59, 0.79],
        [7.06, 123, 0.763],
      ),
      row(
        [3314.7, 26.2, 14.82, 0.856, 0.834, 0.0259],
        [0, 2.07, 0.91, 75.21, 8.56, 4.18, 0.8, 1.42, 0.58, 0.53, 0.68],
        [5.06, 118, 0.757],
      ),
      row(
        [2814.7, 25.2, 25.2, 0.849, 0.806, 0.022],
        [0, 2.11, 0.92, 76.65, 8.62, 4.13, 0.77, 1.36, 0.54, 0.49, 0.6],
        [3.81, 114, 0.753],
      ),
      row(
        [2214.7, 23.2, 38.77, 0.854, 0.775, 0.0188],
        [0, 2.15, 0.93, 77.63, 8.76, 4.14, 0.76, 1.32, 0.51, 0.46, 0.52],
        [2.82, 111, 0.748],
      ),
      row(
        [1714.7, 21.4, 50.72, 0.867, 0.746, 0.0168],
        [0, 2.18, 0.92, 77.9, 8.95, 4.23, 0.77, 1.33, 0.5, 0.45, 0.48],
        [2.29, 108, 0.745],
      ),
      row(
        [1214.7, 19.5, 62.95, 0.89, 0.703, 0.0153],
        [0, 2.22, 0.89, 77.53, 9.25, 4.45, 0.81, 1.4, 0.51, 0.46, 0.47],
        [2.01, 106, 0.742],
      ),
      row(
        [714.7, 17.5, 75.21, 0.921, 0.618, 0.0141],
        [0, 2.24, 0.85, 75.93, 9.72, 4.94, 0.93, 1.62, 0.6, 0.53, 0.54],
        [2.1, 105, 0.74],
      ),
    ]),
    tuned: {
      adjustments: { heavyCriticalTemperatureFactor: 1.0078, heavyAcentricFactorFactor: 0.9552 },
      fittedDewPointPsia: 4141.4,
      averageLiquidErrorPoints: 0.05,
    },
  },
  "Otterhythe / Hythe channel": {
    composition: {
      kind: "wellstream",
      stream: stream(
        [0, 1.1, 1.8, 68.15, 10.61, 5.53, 1.11, 2.03, 0.88, 0.83, 1.15],
        [7, 6.81, 163, 0.799],
      ),
    },
    table: table(235, 5060, [
      row(
        [5060, 0, 0, 1.003, 1.003, 0.0462],
        [0, 1.1, 1.8, 68.15, 10.61, 5.53, 1.11, 2.03, 0.88, 0.83, 1.15],
        [6.81, 163, 0.799],
      ),
      row(
        [4614.7, 20.3, 5.1, 0.953, 0.964, 0.0369],
        [0, 1.11, 1.9, 70.45, 10.57, 5.38, 1.06, 1.92, 0.82, 0.77, 1.03],
        [4.99, 151, 0.789],
      ),
      row(
        [4014.7, 23.5, 13.13, 0.907, 0.916, 0.03],
        [0, 1.13, 1.97, 72.08, 10.57, 5.28, 1.03, 1.84, 0.77, 0.72, 0.94],
        [3.67, 140, 0.779],
      ),
      row(
        [3314.7, 23.3, 24.25, 0.872, 0.867, 0.0246],
        [0, 1.14, 2.01, 73.37, 10.62, 5.21, 1, 1.78, 0.72, 0.67, 0.85],
        [2.63, 130, 0.77],
      ),
      row(
        [2614.7, 22.1, 37.26, 0.857, 0.826, 0.0206],
        [0, 1.16, 2.02, 74.21, 10.73, 5.2, 0.98, 1.73, 0.69, 0.63, 0.76],
        [1.89, 122, 0.761],
      ),
      row(
        [1914.7, 20.3, 51.9, 0.861, 0.789, 0.0176],
        [0, 1.17, 2, 74.59, 10.93, 5.27, 0.98, 1.72, 0.67, 0.6, 0.69],
        [1.38, 117, 0.756],
      ),
      row(
        [1314.7, 18.5, 65.23, 0.883, 0.749, 0.0156],
        [0, 1.19, 1.96, 74.26, 11.23, 5.49, 1.02, 1.79, 0.68, 0.61, 0.66],
        [1.11, 115, 0.753],
      ),
      row(
        [714.7, 16.4, 78.73, 0.92, 0.666, 0.0141],
        [0, 1.2, 1.86, 72.6, 11.72, 6.04, 1.15, 2.06, 0.79, 0.71, 0.76],
        [1.11, 113, 0.751],
      ),
    ]),
    tuned: null,
  },
  "Umberlow / Umber shoreface": {
    composition: {
      kind: "wellstream",
      stream: stream(
        [0, 0.5, 2.2, 72.12, 9.83, 5.13, 1.03, 1.88, 0.81, 0.77, 1.07],
        [7, 4.66, 188, 0.814],
      ),
    },
    table: table(228, 4706, [
      row(
        [4706, 0, 0, 0.98, 0.98, 0.0384],
        [0, 0.5, 2.2, 72.12, 9.83, 5.13, 1.03, 1.88, 0.81, 0.77, 1.07],
        [4.66, 188, 0.814],
      ),
      row(
        [4314.7, 8.9, 5.29, 0.941, 0.949, 0.0331],
        [0, 0.5, 2.25, 73.21, 9.8, 5.05, 1, 1.82, 0.78, 0.74, 1.01],
        [3.84, 174, 0.805],
      ),
      row(
        [3714.7, 13.2, 14.67, 0.898, 0.907, 0.0274],
        [0, 0.51, 2.31, 74.36, 9.79, 4.97, 0.98, 1.76, 0.74, 0.7, 0.93],
        [2.95, 158, 0.792],
      ),
      row(
        [3114.7, 14.3, 25.61, 0.87, 0.872, 0.0233],
        [0, 0.51, 2.34, 75.2, 9.81, 4.92, 0.96, 1.72, 0.71, 0.66, 0.86],
        [2.31, 144, 0.781],
      ),
      row(
        [2514.7, 14.1, 38.05, 0.858, 0.774, 0.02],
        [0, 0.51, 2.35, 75.78, 9.86, 4.91, 0.95, 1.69, 0.68, 0.64, 0.8],
        [1.83, 134, 0.772],
      ),
      row(
        [1814.7, 13.2, 54.09, 0.864, 0.824, 0.0171],
        [0, 0.52, 2.35, 76.1, 9.99, 4.96, 0.94, 1.68, 0.67, 0.62, 0.74],
        [1.43, 126, 0.764],
      ),
      row(
        [1314.7, 12.3, 66.11, 0.883, 0.808, 0.0156],
        [0, 0.52, 2.32, 75.98, 10.14, 5.08, 0.97, 1.72, 0.67, 0.62, 0.72],
        [1.26, 123, 0.76],
      ),
      row(
        [714.7, 10.8, 80.54, 0.921, 0.765, 0.0141],
        [0, 0.53, 2.25, 74.85, 10.42, 5.42, 1.06, 1.9, 0.76, 0.7, 0.8],
        [1.31, 121, 0.758],
      ),
    ]),
    tuned: null,
  },
  "Tallowgate / Gate sand": {
    composition: {
      kind: "wellstream",
      stream: stream(
        [0, 2, 0.6, 74.55, 6.65, 3.47, 0.69, 1.27, 0.55, 0.52, 0.72],
        [7, 8.98, 129, 0.77],
      ),
    },
    table: table(254, 3865, [
      row(
        [3865, 0, 0, 0.896, 0.896, 0.0326],
        [0, 2, 0.6, 74.55, 6.65, 3.47, 0.69, 1.27, 0.55, 0.52, 0.72],
        [8.98, 129, 0.77],
      ),
      row(
        [3514.7, 10, 7.1, 0.882, 0.877, 0.0277],
        [0, 2.02, 0.62, 76.48, 6.64, 3.4, 0.66, 1.21, 0.52, 0.48, 0.65],
        [7.32, 125, 0.765],
      ),
      row(
        [3114.7, 13.3, 15.9, 0.872, 0.858, 0.024],
        [0, 2.05, 0.64, 77.94, 6.66, 3.35, 0.65, 1.17, 0.49, 0.45, 0.59],
        [6.01, 121, 0.761],
      ),
      row(
        [2614.7, 14.3, 27.75, 0.869, 0.839, 0.0207],
        [0, 2.07, 0.65, 79.24, 6.69, 3.32, 0.63, 1.13, 0.46, 0.43, 0.54],
        [4.84, 117, 0.756],
      ),
      row(
        [2114.7, 14, 40.34, 0.874, 0.821, 0.0184],
        [0, 2.1, 0.66, 80.01, 6.76, 3.33, 0.63, 1.12, 0.45, 0.41, 0.5],
        [4.03, 114, 0.752],
      ),
      row(
        [1614.7, 13.2, 53.35, 0.887, 0.802, 0.0167],
        [0, 2.12, 0.65, 80.39, 6.87, 3.38, 0.63, 1.13, 0.44, 0.41, 0.47],
        [3.51, 111, 0.749],
      ),
      row(
        [1114.7, 12, 66.53, 0.908, 0.772, 0.0153],
        [0, 2.14, 0.64, 80.14, 7.02, 3.52, 0.66, 1.18, 0.46, 0.42, 0.48],
        [3.34, 109, 0.746],
      ),
      row(
        [714.7, 10.9, 77.02, 0.93, 0.721, 0.0144],
        [0, 2.15, 0.63, 79.06, 7.2, 3.73, 0.72, 1.3, 0.52, 0.48, 0.54],
        [3.67, 108, 0.745],
      ),
    ]),
    tuned: {
      adjustments: { heavyCriticalTemperatureFactor: 0.9671, heavyAcentricFactorFactor: 0.948 },
      fittedDewPointPsia: 3865.3,
      averageLiquidErrorPoints: 0.04,
    },
  },
  "Hollin Deep / Upper Corrith sand": {
    composition: {
      kind: "wellstream",
      stream: stream(
        [3, 0.5, 1.3, 67.49, 6.99, 3.64, 0.73, 1.34, 0.58, 0.55, 0.76],
        [7, 13.12, 135, 0.776],
      ),
    },
    table: table(224, 4424, [
      row([4424, 0, 0, 0.944, 0.944, 0.0498]),
      row([4014.7, 39.4, 5.54, 0.902, 0.907, 0.0344]),
      row([3514.7, 37.1, 13.36, 0.874, 0.865, 0.0277]),
      row([2914.7, 34.8, 24.21, 0.857, 0.82, 0.0226]),
      row([2314.7, 31.7, 36.46, 0.855, 0.777, 0.0192]),
      row([1714.7, 29.4, 49.76, 0.868, 0.728, 0.0168]),
      row([1214.7, 26.6, 61.32, 0.889, 0.67, 0.0152]),
      row([714.7, 24.4, 73.06, 0.919, 0.566, 0.014]),
    ]),
    tuned: {
      adjustments: {
        heavyCriticalTemperatureFactor: 0.9381,
        heavyCriticalPressureFactor: 0.9958,
        methaneHeavyInteractionFactor: 2.3982,
      },
      fittedDewPointPsia: 4423.4,
      averageLiquidErrorPoints: 0.19,
    },
  },
  "Pellow North / Marrow sand, lower": {
    composition: {
      kind: "wellstream",
      stream: stream(
        [0, 2.2, 0.9, 68.57, 8.8, 4.59, 0.92, 1.68, 0.73, 0.69, 0.96],
        [7, 9.96, 130, 0.772],
      ),
    },
    table: table(238, 4190, [
      row([4190, 0, 0, 0.895, 0.895, 0.0414]),
      row([3814.7, 25.4, 6.2, 0.876, 0.869, 0.0317]),
      row([3314.7, 26.1, 15.46, 0.86, 0.838, 0.0258]),
      row([2814.7, 25.4, 25.75, 0.853, 0.81, 0.022]),
      row([2214.7, 23.2, 39.18, 0.857, 0.778, 0.0188]),
      row([1714.7, 21.8, 51.02, 0.87, 0.748, 0.0169]),
      row([1214.7, 19.5, 63.15, 0.891, 0.704, 0.0154]),
      row([714.7, 17.8, 75.32, 0.922, 0.619, 0.0142]),
    ]),
    tuned: {
      adjustments: { heavyCriticalTemperatureFactor: 1.0081, heavyAcentricFactorFactor: 0.958 },
      fittedDewPointPsia: 4190.3,
      averageLiquidErrorPoints: 0.19,
    },
  },
  "Larkhaven / Haven sand": {
    composition: {
      kind: "wellstream",
      stream: stream(
        [0, 0.5, 1.5, 68.78, 9.13, 4.76, 0.95, 1.75, 0.75, 0.71, 0.99],
        [7, 10.18, 146, 0.786],
      ),
    },
    table: table(237, 5240, [
      row([5240, 0, 0, 1.023, 1.023, 0.0527]),
      row([4814.7, 41.4, 4.52, 0.97, 0.985, 0.0374]),
      row([4114.7, 37.3, 13.22, 0.92, 0.926, 0.0292]),
      row([3414.7, 34.6, 23.54, 0.889, 0.872, 0.0241]),
      row([2714.7, 31.4, 35.48, 0.874, 0.822, 0.0205]),
      row([2014.7, 29.1, 48.84, 0.875, 0.769, 0.0177]),
      row([1314.7, 25.9, 63.19, 0.895, 0.697, 0.0157]),
      row([714.7, 23.7, 75.84, 0.927, 0.578, 0.0143]),
    ]),
    tuned: {
      adjustments: {
        heavyCriticalTemperatureFactor: 1.052,
        heavyCriticalPressureFactor: 1.0185,
        heavyAcentricFactorFactor: 0.9089,
      },
      fittedDewPointPsia: 5239.9,
      averageLiquidErrorPoints: 0.18,
    },
  },
  "Quernside / Quern sand": {
    composition: {
      kind: "wellstream",
      stream: stream(
        [0, 2.8, 1.2, 74.08, 7.46, 3.89, 0.78, 1.43, 0.62, 0.58, 0.81],
        [12, 1.91, 251, 0.833],
        [1.35, 1.07, 0.84, 0.66, 0.52],
      ),
    },
    table: table(213, 4020, [
      row([4020, 0, 0, 0.906, 0.906, 0.0352]),
      row([3714.7, 8.3, 5.41, 0.883, 0.885, 0.0306]),
      row([3214.7, 12.5, 15.43, 0.859, 0.857, 0.0253]),
      row([2714.7, 14.2, 26.74, 0.848, 0.835, 0.0215]),
      row([2214.7, 13.8, 39.07, 0.85, 0.819, 0.0188]),
      row([1614.7, 13.4, 54.69, 0.866, 0.803, 0.0163]),
      row([1214.7, 12.1, 65.29, 0.886, 0.789, 0.0151]),
      row([714.7, 11.1, 78.38, 0.92, 0.745, 0.0138]),
    ]),
    tuned: {
      adjustments: { heavyCriticalTemperatureFactor: 0.8809, heavyAcentricFactorFactor: 1.113 },
      fittedDewPointPsia: 4018.6,
      averageLiquidErrorPoints: 0.55,
    },
  },
  "Otterhythe / Hythe levee": {
    composition: {
      kind: "wellstream",
      stream: stream(
        [0, 1.2, 1.8, 68.97, 10.29, 5.37, 1.07, 1.97, 0.85, 0.81, 1.12],
        [7, 6.55, 166, 0.8],
      ),
    },
    table: null,
    tuned: null,
  },
  "Merrin Spit / Spit sand": {
    composition: {
      kind: "wellstream",
      stream: stream(
        [0, 5, 2.2, 79.93, 5.26, 2.74, 0.55, 1.01, 0.43, 0.41, 0.57],
        [7, 1.9, 141, 0.782],
      ),
    },
    table: null,
    tuned: null,
  },
  "Brindlemoor / Moor sand": {
    composition: {
      kind: "separatorStreams",
      gas: stream(
        [0, 5.37, 2.58, 77.97, 8.35, 3.62, 0.55, 0.87, 0.23, 0.18, 0.11],
        [7, 0.17, 104, 0.739],
      ),
      liquid: stream(
        [0, 2.17, 0.14, 12.35, 6.91, 9.28, 3.13, 6.85, 4.11, 4.16, 6.9],
        [7, 44, 137, 0.778],
      ),
      gasLiquidRatioScfPerSeparatorBarrel: 8016,
      liquidDensityLbPerCubicFoot: 42.71,
      basePressurePsia: 14.696,
    },
    table: null,
    tuned: null,
  },
};
