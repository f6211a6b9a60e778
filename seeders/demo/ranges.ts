import type { Distribution, SimpleDistribution } from "@/analytics/uncertainty/distribution-schema";
import type { InputName } from "@/analytics/volumetrics/inputs-schema";

/** An input that is described by more than a P90 and a P10, with what the expert said about it. */
export interface DemoRange {
  /** revisions of this day and later have it */
  since: string;
  distribution: Distribution;
  source: string;
  reason: string;
}

const lognormal = (p90: number, p10: number): SimpleDistribution => ({
  kind: "lognormalP90P10",
  p90,
  p10,
});

const cases = (
  caseSet: string | undefined,
  ...scenarios: [name: string, weight: number, distribution: SimpleDistribution][]
): Distribution => ({
  kind: "scenarios",
  ...(caseSet !== undefined && { caseSet }),
  scenarios: scenarios.map(([name, weight, distribution]) => ({ name, weight, distribution })),
});

const skew = (p90: number, p50: number, p10: number): Distribution => ({
  kind: "percentiles",
  family: "shiftedLognormal",
  points: [
    { exceedance: 0.9, value: p90 },
    { exceedance: 0.5, value: p50 },
    { exceedance: 0.1, value: p10 },
  ],
});

/** Most likely with its P90 and P10. */
const pert = (low: number, mode: number, high: number): Distribution => ({
  kind: "pert",
  low,
  mode,
  high,
  ends: "p90p10",
});

const autumn = "2026-09-01";
const CONTACT = "Gas-water contact";
const TRAP = "Trap";

/** By reservoir; every other input keeps the range of `reservoirs.ts`. */
export const demoRanges: Readonly<Record<string, Partial<Record<InputName, DemoRange>>>> = {
  "Brindlemoor / Moor sand": {
    areaAcres: {
      since: autumn,
      distribution: cases(
        CONTACT,
        ["Lowest gas seen", 0.25, lognormal(1_160, 1_560)],
        ["From pressure gradients", 0.6, lognormal(1_560, 2_060)],
        ["Spill point", 0.15, lognormal(2_100, 2_560)],
      ),
      source: "Depth map BM-26 with three contacts; formation pressures of BM-2 and BM-4",
      reason:
        "The gas and water gradients cross at 6,634 ft, give or take 20 ft, and the pressure decline fits that, so the case " +
        "weighs most. Gas was logged down to 6,598 ft and cannot end higher; the structure spills at 6,690 ft.",
    },
    netThicknessFt: {
      since: autumn,
      distribution: cases(
        CONTACT,
        ["Lowest gas seen", 0.25, lognormal(48, 67)],
        ["From pressure gradients", 0.6, lognormal(60, 86)],
        ["Spill point", 0.15, lognormal(74, 104)],
      ),
      source: "Log evaluation of four wells, net pay above each contact",
      reason:
        "Average net pay over the area of the same case: a deeper contact adds a full column on the flanks. Within a case " +
        "the spread is that of net-to-gross from well to well.",
    },
  },
  "Larkhaven / Haven turbidite": {
    areaAcres: {
      since: autumn,
      distribution: cases(
        TRAP,
        ["Closure alone", 0.65, lognormal(300, 720)],
        ["Closure and pinch-out", 0.35, lognormal(800, 1_650)],
      ),
      source: "Amplitude map LH-25, attribute cut-off at the well's value",
      reason:
        "The amplitude runs past the mapped closure to the north-east. It may be a stratigraphic trap or a wet sand of the " +
        "same impedance; two of five look-alikes nearby were gas.",
    },
    netThicknessFt: {
      since: autumn,
      distribution: cases(
        TRAP,
        ["Closure alone", 0.65, lognormal(17, 46)],
        ["Closure and pinch-out", 0.35, lognormal(32, 72)],
      ),
      source: "LH-3 log; isochore from tuning thickness",
      reason:
        "LH-3 is on the thin crest. With the pinch-out the axis of the channel lies inside the trap, and the average follows.",
    },
  },
  "Wyrecombe / Combe sand": {
    areaAcres: {
      since: autumn,
      distribution: cases(
        undefined,
        ["Fault seals", 0.6, lognormal(560, 1_020)],
        ["Fault leaks", 0.4, lognormal(1_250, 2_100)],
      ),
      source: "Structure map WC-26; shale gouge ratios along the western fault",
      reason:
        "Gouge ratios of 0.18 to 0.24 straddle the 0.2 that seals elsewhere in the basin. Draw-down of WC-1 was too short " +
        "to see the western block. If the fault leaks, the block belongs to this reservoir.",
    },
  },
  "Kittlebeck / Beck sand": {
    porosity: {
      since: autumn,
      distribution: {
        kind: "data",
        shape: "normal",
        values: [
          0.078, 0.084, 0.09, 0.095, 0.098, 0.102, 0.106, 0.109, 0.112, 0.116, 0.12, 0.126, 0.133,
          0.141,
        ],
      },
      source: "Core of KB-1, KB-3 and KB-4, stress-corrected; averages of 14 flow units",
      reason:
        "Each value is the thickness-weighted average of one flow unit in one well, so the spread is that of averages and " +
        "not of plugs. Both tests leave the normal shape standing.",
    },
  },
  "Sallowfleet / Fleet sand": {
    porosity: {
      since: "2026-11-24",
      distribution: {
        kind: "data",
        shape: "empirical",
        values: [
          0.112, 0.118, 0.124, 0.129, 0.133, 0.136, 0.139, 0.141, 0.144, 0.147, 0.149, 0.151, 0.153,
          0.155, 0.157, 0.159, 0.161, 0.163, 0.164, 0.166, 0.168, 0.169, 0.171, 0.173, 0.175, 0.177,
          0.179, 0.181, 0.184, 0.187, 0.19, 0.193, 0.197, 0.202, 0.208, 0.215,
        ],
      },
      source: "SF-2 core, 36 plugs, helium porosity at 3,000 psi",
      reason: "All plugs as reported. To be averaged by flow unit before this is submitted.",
    },
  },
  "Askerdale / Asker deep": {
    temperatureDegF: {
      since: autumn,
      distribution: skew(337, 344, 357),
      source: "AS-1 logging runs, extrapolated; no test",
      reason:
        "Four logging runs extrapolate to 344 °F. Extrapolation of short static times falls short rather than long, so the " +
        "high side is wider.",
    },
  },
  "Tidewick / Wick sand": {
    condensateYieldStbPerMmscf: {
      since: autumn,
      distribution: skew(100, 110, 127),
      source: "Well-site tests of TW-1, three rates",
      reason:
        "The three rates gave 98, 110 and 121. Liquid carried over into the gas line was not measured and only adds, so the " +
        "high side is wider.",
    },
  },
  "Sorrelbank / Bank sand": {
    gasRecovery: {
      since: autumn,
      distribution: pert(0.72, 0.77, 0.81),
      source: "Eleven depleted analogues with at least eight years of production",
      reason:
        "Two of eleven analogues recovered less than 0.72 and one more than 0.81; those figures are taken as P90 and P10.",
    },
    condensateRecovery: {
      since: autumn,
      distribution: pert(0.49, 0.55, 0.6),
      source: "The same eleven analogues, corrected for richness",
      reason: "Lean gas loses little liquid; the range is that of the analogues, as P90 and P10.",
    },
  },
  "Brackenmouth / Mouth sand": {
    gasRecovery: {
      since: autumn,
      distribution: pert(0.74, 0.79, 0.83),
      source: "Material balance of BK-1 to abandonment at 700 psia, and analogues",
      reason: "P90 with the line pressure kept at 1,100 psia, P10 with compression in year four.",
    },
  },
};
