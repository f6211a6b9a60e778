/**
 * The plain way to do what the engine does, kept only to measure against: an object per trial, quantiles from jstat,
 * statistics from simple-statistics, sorting with comparators. The same model, the same outputs, no shortcuts and no
 * deliberate waste.
 */
import jstat from "jstat";
import * as statistics from "simple-statistics";
import { recombine } from "@/analytics/fluid/wellstream";
import { pseudocritical } from "@/analytics/gas/pseudocritical";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { CANONICAL_CONSTANTS } from "@/analytics/units/standard-conditions";
import {
  inputNames,
  type EstimateInputs,
  type InputName,
} from "@/analytics/volumetrics/inputs-schema";
import type { BenchReservoir } from "./workload";

const { jStat } = jstat;
const Z_P10 = 1.2815515655446004;

type Sample = Record<InputName, number>;

interface Trial {
  wetGasInPlaceScf: number;
  dryGasInPlaceScf: number;
  condensateInPlaceStb: number;
  salesGasScf: number;
  condensateRecoverableStb: number;
  condensateLeftStb: number;
  zFactor: number;
  gasFormationVolumeFactorCfPerScf: number;
  wellstreamGravity: number;
  dryGasFraction: number;
  condensateYieldStbPerMmscfWellstream: number;
  wetGasPerAcreFootScf: number;
  condensatePerAcreFootStb: number;
}

const results = [
  "wetGasInPlaceScf",
  "dryGasInPlaceScf",
  "condensateInPlaceStb",
  "salesGasScf",
  "condensateRecoverableStb",
  "condensateLeftStb",
] as const;
const derived = [
  "zFactor",
  "gasFormationVolumeFactorCfPerScf",
  "wellstreamGravity",
  "dryGasFraction",
  "condensateYieldStbPerMmscfWellstream",
  "wetGasPerAcreFootScf",
  "condensatePerAcreFootStb",
] as const;

/** A small generator (mulberry32), as a script would have it. */
function generator(seed: number): () => number {
  let a = seed;
  return () => {
    a = (a + 0x6d2b79f5) | 0;
    let t = Math.imul(a ^ (a >>> 15), 1 | a);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

function inverse(d: Distribution, p: number): number {
  switch (d.kind) {
    case "constant":
      return d.value;
    case "uniform":
      return d.low + p * (d.high - d.low);
    case "triangular":
      return jStat.triangular.inv(p, d.low, d.high, d.mode);
    case "pert": {
      const width = d.high - d.low;
      const a = 1 + (4 * (d.mode - d.low)) / width;
      return d.low + width * jStat.beta.inv(p, a, 6 - a);
    }
    case "lognormalP90P10":
      return jStat.lognormal.inv(
        p,
        (Math.log(d.p90) + Math.log(d.p10)) / 2,
        Math.log(d.p10 / d.p90) / (2 * Z_P10),
      );
    case "normal": {
      const low =
        d.minimum === undefined ? 0 : jStat.normal.cdf(d.minimum, d.mean, d.standardDeviation);
      const high =
        d.maximum === undefined ? 1 : jStat.normal.cdf(d.maximum, d.mean, d.standardDeviation);
      return jStat.normal.inv(low + p * (high - low), d.mean, d.standardDeviation);
    }
    default:
      throw new Error(`The bench does not use ${d.kind}`);
  }
}

function shuffle(values: number[], random: () => number): number[] {
  for (let i = values.length - 1; i > 0; i -= 1) {
    const j = Math.floor(random() * (i + 1));
    [values[i], values[j]] = [values[j], values[i]];
  }
  return values;
}

function ranksOf(values: number[]): number[] {
  const ranks = new Array<number>(values.length);
  values
    .map((value, index) => ({ value, index }))
    .sort((a, b) => a.value - b.value)
    .forEach(({ index }, rank) => {
      ranks[index] = rank;
    });
  return ranks;
}

function spearman(a: number[], b: number[]): number {
  return statistics.sampleCorrelation(ranksOf(a), ranksOf(b));
}

/** Iman and Conover for one pair: the second column re-ordered to the wanted correlation of normal scores. */
function correlatePair(
  first: number[],
  second: number[],
  rank: number,
  random: () => number,
): number[] {
  const n = first.length;
  const scores = first.map((_, i) => jStat.normal.inv((i + 1) / (n + 1), 0, 1));
  const ranks = ranksOf(first);
  const a = ranks.map((r) => scores[r]);
  const b = shuffle([...scores], random);
  const own = statistics.sampleCorrelation(a, b);
  const target = 2 * Math.sin((Math.PI / 6) * rank);
  const free = b.map((value, i) => (value - own * a[i]) / Math.sqrt(1 - own * own));
  const wanted = ranksOf(
    a.map((value, i) => target * value + Math.sqrt(1 - target ** 2) * free[i]),
  );
  const sorted = [...second].sort((x, y) => x - y);
  return wanted.map((r) => sorted[r]);
}

function sampleTrials(inputs: EstimateInputs, trials: number, random: () => number): Sample[] {
  const columns = Object.fromEntries(
    inputNames.map((name) => {
      const { distribution } = inputs.uncertain[name];
      const values = Array.from({ length: trials }, (_, i) =>
        inverse(distribution, (i + random()) / trials),
      );
      return [name, shuffle(values, random)];
    }),
  ) as Record<InputName, number[]>;
  for (const { a, b, rank } of inputs.correlations) {
    columns[b] = correlatePair(columns[a], columns[b], rank, random);
  }
  return Array.from(
    { length: trials },
    (_, i) => Object.fromEntries(inputNames.map((name) => [name, columns[name][i]])) as Sample,
  );
}

/** Dranchuk and Abou-Kassem by Newton's method on z from 1. */
function zFactor(ppr: number, tpr: number): number {
  const [a1, a2, a3, a4, a5, a6, a7, a8, a9, a10, a11] = [
    0.3265, -1.07, -0.5339, 0.01569, -0.05165, 0.5475, -0.7361, 0.1844, 0.1056, 0.6134, 0.721,
  ];
  const c1 = a1 + a2 / tpr + a3 / tpr ** 3 + a4 / tpr ** 4 + a5 / tpr ** 5;
  const c2 = a6 + a7 / tpr + a8 / tpr ** 2;
  const c3 = a9 * (a7 / tpr + a8 / tpr ** 2);
  const residual = (z: number) => {
    const rho = (0.27 * ppr) / (z * tpr);
    return (
      z -
      1 -
      c1 * rho -
      c2 * rho ** 2 +
      c3 * rho ** 5 -
      a10 * (1 + a11 * rho ** 2) * (rho ** 2 / tpr ** 3) * Math.exp(-a11 * rho ** 2)
    );
  };
  let z = 1;
  for (let i = 0; i < 50; i += 1) {
    const f = residual(z);
    const slope = (residual(z + 1e-6) - f) / 1e-6;
    const step = f / slope;
    z -= step;
    if (Math.abs(step) < 1e-9) break;
  }
  return z;
}

function evaluate(inputs: EstimateInputs, samples: Sample[]): Trial[] {
  const wellstream = recombine(inputs.fluid);
  return samples.map((sample) => {
    const barrels = sample.condensateYieldStbPerMmscf / 1e6;
    const dryGasFraction = 1 / (1 + barrels * wellstream.vapourEquivalentScfPerStb);
    const wellstreamGravity =
      (wellstream.surfaceGasGravity +
        barrels * CANONICAL_CONSTANTS.gravityConstant * wellstream.condensateSpecificGravity) *
      dryGasFraction;
    const critical = pseudocritical(wellstreamGravity, inputs.fluid);
    const temperature = sample.temperatureDegF + 459.67;
    const z = zFactor(
      sample.pressurePsia / critical.pressurePsia,
      temperature / critical.temperatureDegR,
    );
    const bg = (CANONICAL_CONSTANTS.volumeFactorCfPerScf * z * temperature) / sample.pressurePsia;
    const perAcreFoot = (43560 * sample.porosity * (1 - sample.waterSaturation)) / bg;
    const wet = perAcreFoot * sample.areaAcres * sample.netThicknessFt;
    const dry = wet * dryGasFraction;
    const condensate = dry * barrels;
    const recoverable = condensate * sample.condensateRecovery;
    return {
      wetGasInPlaceScf: wet,
      dryGasInPlaceScf: dry,
      condensateInPlaceStb: condensate,
      salesGasScf: dry * sample.gasRecovery * sample.salesGasFraction,
      condensateRecoverableStb: recoverable,
      condensateLeftStb: condensate - recoverable,
      zFactor: z,
      gasFormationVolumeFactorCfPerScf: bg,
      wellstreamGravity,
      dryGasFraction,
      condensateYieldStbPerMmscfWellstream: barrels * 1e6 * dryGasFraction,
      wetGasPerAcreFootScf: perAcreFoot,
      condensatePerAcreFootStb: perAcreFoot * dryGasFraction * barrels,
    };
  });
}

function summarise(values: number[]) {
  const sorted = [...values].sort((a, b) => a - b);
  const low = sorted[0];
  const high = sorted[sorted.length - 1];
  const counts = new Array<number>(40).fill(0);
  for (const value of values) {
    counts[Math.min(39, Math.floor((40 * (value - low)) / (high - low)))] += 1;
  }
  return {
    p90: statistics.quantileSorted(sorted, 0.1),
    p50: statistics.quantileSorted(sorted, 0.5),
    p10: statistics.quantileSorted(sorted, 0.9),
    mean: statistics.mean(values),
    standardDeviation: statistics.sampleStandardDeviation(values),
    histogram: counts,
    exceedance: Array.from({ length: 101 }, (_, i) => statistics.quantileSorted(sorted, i / 100)),
  };
}

/** One reservoir: trials, summaries of every result and derived quantity, rank correlations of every input. */
export function simulatePlain({ inputs }: BenchReservoir, trials: number, seed: number) {
  const samples = sampleTrials(inputs, trials, generator(seed));
  const outcomes = evaluate(inputs, samples);
  const summaries = Object.fromEntries(
    results.map((name) => [name, summarise(outcomes.map((trial) => trial[name]))]),
  ) as Record<(typeof results)[number], ReturnType<typeof summarise>>;
  const ranges = Object.fromEntries(
    derived.map((name) => [
      name,
      [0.1, 0.5, 0.9].map((p) =>
        statistics.quantile(
          outcomes.map((trial) => trial[name]),
          p,
        ),
      ),
    ]),
  );
  const correlations = (["wetGasInPlaceScf", "condensateRecoverableStb"] as const).map((result) => {
    const values = outcomes.map((trial) => trial[result]);
    return inputNames.map((name) =>
      spearman(
        samples.map((sample) => sample[name]),
        values,
      ),
    );
  });
  return { outcomes, summaries, ranges, correlations };
}

/** Portfolio totals with a common factor per basin, on arrays of objects. */
export function rollUpPlain(
  members: { basin: string; outcomes: Trial[] }[],
  dependence: number,
  seed: number,
) {
  const trials = members[0].outcomes.length;
  const random = generator(seed);
  const normals = () => Array.from({ length: trials }, () => jStat.normal.inv(random(), 0, 1));
  const factors = new Map<string, number[]>();
  const total = Array.from({ length: trials }, () => ({ condensate: 0, gas: 0 }));
  for (const { basin, outcomes } of members) {
    if (!factors.has(basin)) factors.set(basin, normals());
    const factor = factors.get(basin) ?? [];
    const own = normals();
    const ranks = ranksOf(
      own.map((e, i) => Math.sqrt(dependence) * factor[i] + Math.sqrt(1 - dependence) * e),
    );
    const sorted = [...outcomes].sort(
      (a, b) => a.condensateRecoverableStb - b.condensateRecoverableStb,
    );
    total.forEach((sum, i) => {
      const row = sorted[ranks[i]];
      sum.condensate += row.condensateRecoverableStb;
      sum.gas += row.salesGasScf;
    });
  }
  return {
    condensate: summarise(total.map(({ condensate }) => condensate)),
    gas: summarise(total.map(({ gas }) => gas)),
  };
}
