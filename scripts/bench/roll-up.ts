/**
 * How fast totals are, against a plain implementation of the same work in the same run.
 *
 *     npm run bench:roll-up
 *
 * Work: 240 fields of one reservoir each with 10,000 stored trials, in six basins and three classes. Stored trials are
 * put in the portfolio's order once; after that every filter of fields is a sum: ranges of five volumes for total,
 * basins and classes, and each field's contributions to the total's percentiles.
 */
import os from "node:os";
import { createRandom, fillPermutation } from "@/analytics/numerics/random";
import { bytesOfFieldTrials } from "@/analytics/portfolio/field-trials";
import { computeLedger, type LedgerField, type Risking } from "@/analytics/portfolio/ledger";
import { alignFields, type RollUpField } from "@/analytics/portfolio/roll-up";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { vectorNames } from "@/analytics/volumetrics/results-schema";
import { alignPlain, totalPlain, type PlainField, type PlainTrial } from "./roll-up-reference";

const FIELDS = 240;
const TRIALS = 10_000;
const REFERENCE_FIELDS = 40;
const FILTERS = 40;
const RANK = 0.3;
const classes = ["reserves", "contingent", "prospective"];
const dependence = {
  portfolioRank: 0.05,
  basinRanks: {},
  otherBasinsRank: RANK,
  sharedFactors: [],
};

/** Lognormal volumes of different sizes, in a random order, single precision as they are stored. */
function makeFields(count: number, trials: number): RollUpField[] {
  const p = Float64Array.from({ length: trials }, (_, i) => (i + 0.5) / trials);
  const sorted = new Float64Array(trials);
  compileDistribution({ kind: "lognormalP90P10", p90: 50, p10: 200 }).fillQuantiles(
    p,
    trials,
    sorted,
  );
  const order = new Uint32Array(trials);
  const words = new Uint32Array(trials);
  return Array.from({ length: count }, (_, index) => {
    fillPermutation(createRandom(1, index), order, trials, words);
    const size = 1 + (index % 17);
    const times = (factor: number) =>
      Float32Array.from(order, (rank) => size * factor * sorted[rank]);
    const slug = `field-${String(index).padStart(5, "0")}`;
    const basin = `basin-${index % 6}`;
    return {
      id: slug,
      slug,
      basinId: basin,
      basinSlug: basin,
      classId: classes[index % 3],
      interest: 0.4 + (index % 6) / 10,
      chance: index % 3 === 0 ? 1 : 0.3 + (index % 5) / 10,
      reservoirs: [
        {
          id: `${slug}/sand`,
          vectors: {
            wetGasInPlaceScf: times(40),
            dryGasInPlaceScf: times(32),
            condensateInPlaceStb: times(2),
            salesGasScf: times(16),
            condensateRecoverableStb: times(1),
          },
        },
      ],
    };
  });
}

function toPlain({ basinId, classId, reservoirs: [{ vectors }] }: RollUpField): PlainField {
  const outcomes = Array.from(
    vectors.condensateRecoverableStb,
    (_, t) => Object.fromEntries(vectorNames.map((name) => [name, vectors[name][t]])) as PlainTrial,
  );
  return { basinId, classId, outcomes };
}

interface Timed<Value> {
  value: Value;
  /** processor time of this process: the fair one on a machine with other work to do */
  milliseconds: number;
  byTheClock: number;
}

function timeOf<Value>(work: () => Value): Timed<Value> {
  const start = performance.now();
  const used = process.cpuUsage();
  const value = work();
  const { user, system } = process.cpuUsage(used);
  return {
    value,
    milliseconds: (user + system) / 1000,
    byTheClock: performance.now() - start,
  };
}

/** The best of a few runs: the machine's other work only ever adds time. */
const bestOf = (times: number, work: () => unknown) =>
  Math.min(...Array.from({ length: times }, () => timeOf(work).milliseconds));

const align = (fields: readonly RollUpField[], trials: number) =>
  alignFields(fields, { trials, seed: 1, dependence });

const sum = (fields: readonly LedgerField[], risk: Risking, withRanks = false) =>
  computeLedger(fields, { risk, withRanks });

/** Times of sums over random filters of a third to all of the fields, the quickest first. */
function timeFilters(aligned: readonly LedgerField[], risk: Risking): Timed<unknown>[] {
  const words = new Uint32Array(aligned.length + 1);
  return Array.from({ length: FILTERS }, (_, filter) => {
    createRandom(7, filter).fill(words);
    const share = 1 / 3 + ((2 / 3) * words[aligned.length]) / 0x100000000;
    const chosen = aligned.filter((_, index) => words[index] / 0x100000000 < share);
    return timeOf(() => sum(chosen, risk));
  }).sort((a, b) => a.milliseconds - b.milliseconds);
}

const growthExponent = (small: number, large: number, factor: number) =>
  Math.log(large / small) / Math.log(factor);

const figure = (value: number, digits = 3) =>
  Number(value.toPrecision(digits)).toLocaleString("en-GB");

function main(): void {
  const print = (line: string) => process.stdout.write(`${line}\n`);
  print(`Node ${process.version}, ${os.cpus()[0].model}, ${os.availableParallelism()} cores`);
  const fields = makeFields(FIELDS, TRIALS);
  align(fields.slice(0, 20), TRIALS);

  print(
    `\n${FIELDS} fields x ${TRIALS.toLocaleString("en-GB")} trials, one thread, processor time`,
  );
  const aligning = timeOf(() => align(fields, TRIALS));
  const aligned = aligning.value;
  print(
    `  in order    ${figure(aligning.milliseconds)} ms once, ` +
      `${figure((aligning.milliseconds * 1e6) / (FIELDS * TRIALS))} ns per trial; kept in ` +
      `${figure((FIELDS * bytesOfFieldTrials(TRIALS)) / 1024 / 1024)} MB`,
  );
  for (const risk of ["unrisked", "risked", "yesNo"] as const) {
    sum(aligned, risk);
    const times = timeFilters(aligned, risk);
    const middle = times[times.length >> 1];
    const most = times[times.length - 1];
    print(
      `  ${risk.padEnd(11)} random filters: ${figure(middle.milliseconds)} ms in the middle, ` +
        `${figure(most.milliseconds)} ms at most (${figure(middle.byTheClock)} and ` +
        `${figure(most.byTheClock)} by the clock); all fields ${figure(bestOf(5, () => sum(aligned, risk)))} ms`,
    );
  }
  print(
    `  with ranks  ${figure(bestOf(3, () => sum(aligned, "unrisked", true)))} ms for all fields, once a basis`,
  );
  const { rss } = process.memoryUsage();
  print(`  memory      ${figure(rss / 1024 / 1024)} MB of this process`);

  const plain = fields.slice(0, REFERENCE_FIELDS).map(toPlain);
  alignPlain(plain.slice(0, 2), RANK, 1);
  const plainAligning = timeOf(() => alignPlain(plain, RANK, 1));
  totalPlain(plainAligning.value);
  const plainSum = bestOf(3, () => totalPlain(plainAligning.value));
  const someAligning = bestOf(3, () => align(fields.slice(0, REFERENCE_FIELDS), TRIALS));
  const some = aligned.slice(0, REFERENCE_FIELDS);
  const someSum = bestOf(5, () => sum(some, "unrisked"));
  print(
    `\n${REFERENCE_FIELDS} fields, against a plain implementation (an object per trial, sorting)`,
  );
  print(
    `  in order    ${figure(plainAligning.milliseconds)} ms against ${figure(someAligning)} ms: ` +
      `${figure(plainAligning.milliseconds / someAligning)} times faster`,
  );
  print(
    `  sums        ${figure(plainSum)} ms against ${figure(someSum)} ms: ` +
      `${figure(plainSum / someSum)} times faster`,
  );

  print("\nGrowth of sums (time ~ size^exponent)");
  const many = align(makeFields(960, TRIALS), TRIALS);
  const all = bestOf(5, () => sum(aligned, "unrisked"));
  print(
    `  fields      240 to 960: ${figure(
      growthExponent(
        all,
        bestOf(3, () => sum(many, "unrisked")),
        4,
      ),
    )}`,
  );
  const short = aligned.slice(0, 60);
  const long = align(makeFields(60, TRIALS * 10), TRIALS * 10);
  print(
    `  trials      10,000 to 100,000: ${figure(
      growthExponent(
        bestOf(5, () => sum(short, "unrisked")),
        bestOf(3, () => sum(long, "unrisked")),
        10,
      ),
    )} (60 fields)`,
  );
}

main();
