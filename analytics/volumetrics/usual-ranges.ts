import type { PossibleRange } from "../uncertainty/possible-range";
import type { InputName } from "./inputs-schema";

/** What a reservoir engineer expects of an input, and what no reservoir can have. Units as the input's name says. */
export interface UsualRange extends PossibleRange {
  /** outside: a question */
  usual: readonly [low: number, high: number];
  /** usual P10/P90 ratio; null where a ratio says nothing */
  ratio: readonly [low: number, high: number] | null;
  /** why the possible range ends where it does */
  reason: string;
}

/**
 * Usual and possible ranges of the ten uncertain inputs. Common practice for gas-condensate reservoirs, no single
 * source, except where the reason names one.
 */
export const usualRanges: Readonly<Record<InputName, UsualRange>> = {
  areaAcres: {
    label: "area",
    unit: "acres",
    usual: [100, 50_000],
    possible: [0, Infinity],
    lowExcluded: true,
    ratio: [2, 10],
    reason: "an area is greater than 0",
    slip: "Is it in square kilometres (1 km² is 247.1 acres)?",
  },
  netThicknessFt: {
    label: "net thickness",
    unit: "ft",
    usual: [10, 500],
    possible: [0, Infinity],
    lowExcluded: true,
    ratio: [1.5, 6],
    reason: "a thickness is greater than 0",
    slip: "Is it in metres (1 m is 3.281 ft)?",
  },
  porosity: {
    label: "porosity",
    unit: "fraction",
    usual: [0.05, 0.3],
    possible: [0, 0.47],
    lowExcluded: true,
    ratio: [1.2, 2],
    reason: "equal spheres packed as loosely as they go (cubic) leave 47 % of the volume",
    slip: "Is it in per cent? Enter 0.18 for 18 %.",
  },
  waterSaturation: {
    label: "water saturation",
    unit: "fraction",
    usual: [0.1, 0.5],
    possible: [0, 1],
    lowExcluded: false,
    ratio: null,
    reason: "water fills between none and all of the pore space",
    slip: "Is it in per cent? Enter 0.25 for 25 %.",
  },
  pressurePsia: {
    label: "reservoir pressure",
    unit: "psia",
    usual: [2_000, 15_000],
    possible: [100, 25_000],
    lowExcluded: false,
    ratio: null,
    reason: "below 100 psia there is no gas to produce and above 25,000 no known gas reservoir",
    slip: "Is it in bar (1 bar is 14.504 psi)?",
  },
  temperatureDegF: {
    label: "reservoir temperature",
    unit: "°F",
    usual: [150, 400],
    possible: [60, 500],
    lowExcluded: false,
    ratio: null,
    reason: "reservoirs lie between surface temperature and the limit of the correlations",
    slip: "Is it in degrees Celsius?",
  },
  condensateYieldStbPerMmscf: {
    label: "condensate yield",
    unit: "STB/MMscf",
    usual: [10, 300],
    possible: [0, 400],
    lowExcluded: false,
    ratio: null,
    reason: "above about 400 STB/MMscf of surface gas the fluid is an oil, not a gas condensate",
    slip: "Is it in m³ per 10⁶ m³ (1 STB/MMscf is 5.625)?",
  },
  gasRecovery: {
    label: "gas recovery",
    unit: "fraction",
    usual: [0.6, 0.9],
    possible: [0, 0.98],
    lowExcluded: false,
    ratio: [1, 2.5],
    reason: "some gas stays behind at abandonment pressure",
    slip: "Is it in per cent? Enter 0.75 for 75 %.",
  },
  condensateRecovery: {
    label: "condensate recovery",
    unit: "fraction",
    usual: [0.15, 0.6],
    possible: [0, 0.95],
    lowExcluded: false,
    ratio: [1, 2.5],
    reason: "liquid that drops out below the dew point mostly stays in the rock",
    slip: "Is it in per cent? Enter 0.35 for 35 %.",
  },
  salesGasFraction: {
    label: "sales gas fraction",
    unit: "fraction",
    usual: [0.7, 1],
    possible: [0, 1],
    lowExcluded: false,
    ratio: null,
    reason: "fuel, flare and shrinkage take between none and all of the gas",
    slip: "Is it in per cent? Enter 0.94 for 94 %.",
  },
};
