/**
 * The plain way to put trials in order and add them up, kept only to measure against: an object per trial, normal
 * quantiles from jstat, sorting with comparators. The same totals, no shortcuts and no deliberate waste.
 */
import jstat from "jstat";
import { vectorNames, type VectorName } from "@/analytics/volumetrics/results-schema";

const { jStat } = jstat;

export type PlainTrial = Record<VectorName, number>;

export interface PlainField {
  basinId: string;
  classId: string;
  outcomes: PlainTrial[];
}

/** A small generator (mulberry32), as a script would have it. */
function generator(seed: number): () => number {
  let a = seed;
  return () => {
    a = (a + 0x6d2b79f5) | 0;
    let t = Math.imul(a ^ (a >>> 15), 1 | a);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 0x100000000;
  };
}

/** Every field's trials in the order that a common factor a basin and its own draw give them. */
export function alignPlain(
  fields: readonly PlainField[],
  correlation: number,
  seed: number,
): PlainField[] {
  const random = generator(seed);
  const trials = fields[0].outcomes.length;
  const normals = () => Array.from({ length: trials }, () => jStat.normal.inv(random(), 0, 1));
  const factors = new Map<string, number[]>();
  return fields.map((field) => {
    const factor = factors.get(field.basinId) ?? normals();
    factors.set(field.basinId, factor);
    const scores = normals().map(
      (own, t) => Math.sqrt(correlation) * factor[t] + Math.sqrt(1 - correlation) * own,
    );
    const order = scores.map((_, t) => t).sort((a, b) => scores[a] - scores[b]);
    const ascending = [...field.outcomes].sort(
      (a, b) => a.condensateRecoverableStb - b.condensateRecoverableStb,
    );
    const outcomes = new Array<PlainTrial>(trials);
    order.forEach((trial, rank) => {
      outcomes[trial] = ascending[rank];
    });
    return { ...field, outcomes };
  });
}

/** Ranges of the total, of every basin and of every class, and every field's share of the total near its percentiles. */
export function totalPlain(fields: readonly PlainField[]) {
  const total = sumOf(fields);
  const groups = (key: "basinId" | "classId") =>
    [...new Set(fields.map((field) => field[key]))].map((id) =>
      rangesOf(sumOf(fields.filter((field) => field[key] === id))),
    );
  const order = total
    .map((_, t) => t)
    .sort((a, b) => total[a].condensateRecoverableStb - total[b].condensateRecoverableStb);
  const near = [0.1, 0.5, 0.9].map((p) =>
    order.slice(Math.floor((p - 0.025) * order.length), Math.ceil((p + 0.025) * order.length)),
  );
  const contributions = fields.map(({ outcomes }) =>
    near.map(
      (trials) =>
        trials.reduce((sum, t) => sum + outcomes[t].condensateRecoverableStb, 0) / trials.length,
    ),
  );
  return {
    total: rangesOf(total),
    basins: groups("basinId"),
    classes: groups("classId"),
    contributions,
  };
}

function sumOf(fields: readonly PlainField[]): PlainTrial[] {
  return fields[0].outcomes.map((_, t) => {
    const sum = {
      wetGasInPlaceScf: 0,
      dryGasInPlaceScf: 0,
      condensateInPlaceStb: 0,
      salesGasScf: 0,
      condensateRecoverableStb: 0,
    };
    for (const { outcomes } of fields) {
      for (const name of vectorNames) sum[name] += outcomes[t][name];
    }
    return sum;
  });
}

function rangesOf(trials: readonly PlainTrial[]) {
  return vectorNames.map((name) => {
    const sorted = trials.map((trial) => trial[name]).sort((a, b) => a - b);
    const at = (p: number) => {
      const h = (sorted.length - 1) * p;
      const low = Math.floor(h);
      return sorted[low] + (h - low) * ((sorted[low + 1] ?? sorted[low]) - sorted[low]);
    };
    return { p90: at(0.1), p50: at(0.5), p10: at(0.9) };
  });
}
