/**
 * How fast the engine is, against a plain implementation of the same work in the same run.
 *
 *     npm run bench
 *
 * Work: 240 reservoirs of 10,000 trials with ten sampled inputs each (lognormal, PERT, truncated normal, triangular,
 * normal; two rank-correlated pairs), z by Dranchuk and Abou-Kassem, volumes, percentiles, histograms and exceedance
 * curves of six results, percentiles of seven derived quantities, rank correlations of every input with two results,
 * and portfolio totals with a common factor per basin. The reference is a Latin hypercube; Sobol points are timed on the
 * next power of two below, a trial against a trial.
 *
 * On a machine that does other work only processor time and ratios mean anything.
 */
import os from "node:os";
import { rollUp, type RollUpField } from "@/analytics/portfolio/roll-up";
import type { SamplingMethod } from "@/analytics/uncertainty/sampling-schema";
import type { VectorName } from "@/analytics/volumetrics/results-schema";
import { simulate } from "@/analytics/volumetrics/simulate";
import { createWorkspace } from "@/analytics/volumetrics/workspace";
import { streamOf } from "@/analytics/numerics/random";
import { rollUpPlain, simulatePlain } from "./reference";
import { measureThreads } from "./threads";
import { makeReservoirs, type BenchReservoir } from "./workload";

const RESERVOIRS = 240;
const TRIALS = 10_000;
const SOBOL_TRIALS = 8_192;
const REFERENCE_RESERVOIRS = 4;
const DEPENDENCE = 0.3;
const SEED = 1;

function runEngine(reservoirs: readonly BenchReservoir[], trials: number) {
  const workspace = createWorkspace(trials);
  const fields = reservoirs.map(({ id, basin, inputs }): RollUpField & { p50: number } => {
    const { summary, vectors } = simulate(inputs, { trials, seed: streamOf(id), workspace });
    // Single precision, as trials are stored.
    const single = (name: VectorName) => Float32Array.from(vectors[name]);
    return {
      id,
      slug: id,
      basinId: basin,
      basinSlug: basin,
      classId: "contingent",
      interest: 1,
      chance: 1,
      reservoirs: [
        {
          id,
          vectors: {
            wetGasInPlaceScf: single("wetGasInPlaceScf"),
            dryGasInPlaceScf: single("dryGasInPlaceScf"),
            condensateInPlaceStb: single("condensateInPlaceStb"),
            salesGasScf: single("salesGasScf"),
            condensateRecoverableStb: single("condensateRecoverableStb"),
          },
        },
      ],
      p50: summary.results.condensateRecoverableStb.p50,
    };
  });
  const simulated = performance.now();
  const { total } = rollUp(fields, {
    trials,
    seed: SEED,
    dependence: {
      portfolioRank: 0,
      basinRanks: {},
      otherBasinsRank: DEPENDENCE,
      sharedFactors: [],
    },
    risk: "unrisked",
    withRanks: false,
  });
  return { members: fields, simulated, total };
}

/** Wall time, and processor time of this process: only the second is fair on a machine with other work to do. */
function stopwatch() {
  const start = performance.now();
  const used = process.cpuUsage();
  return () => {
    const { user, system } = process.cpuUsage(used);
    return { milliseconds: performance.now() - start, cpuMilliseconds: (user + system) / 1000 };
  };
}

function timeEngine(reservoirs: readonly BenchReservoir[], trials: number) {
  const elapsed = stopwatch();
  const run = runEngine(reservoirs, trials);
  return { run, ...elapsed(), rollUpMilliseconds: performance.now() - run.simulated };
}

/** The best of a few runs: the machine's other work only ever adds time. */
function bestOf<Time extends { cpuMilliseconds: number }>(times: number, measure: () => Time) {
  let best = measure();
  for (let i = 1; i < times; i += 1) {
    const next = measure();
    if (next.cpuMilliseconds < best.cpuMilliseconds) best = next;
  }
  return best;
}

/** The simulations alone, keeping nothing: what a background run does. */
function timeSimulations(
  reservoirs: readonly BenchReservoir[],
  trials: number,
  sampling: SamplingMethod,
) {
  const workspace = createWorkspace(trials);
  const elapsed = stopwatch();
  for (const { id, inputs } of reservoirs) {
    simulate(inputs, { trials, seed: streamOf(id), sampling, workspace });
  }
  return elapsed();
}

function timeReference(reservoirs: readonly BenchReservoir[]) {
  // Once over to warm the compiler, as the engine is measured warm.
  simulatePlain(reservoirs[0], TRIALS, 0);
  const elapsed = stopwatch();
  const runs = reservoirs.map((reservoir, i) => ({
    basin: reservoir.basin,
    ...simulatePlain(reservoir, TRIALS, i + 1),
  }));
  rollUpPlain(runs, DEPENDENCE, SEED);
  return { runs, ...elapsed() };
}

function growthExponent(smallTime: number, largeTime: number, factor: number): number {
  return Math.log(largeTime / smallTime) / Math.log(factor);
}

const perTrial = (time: ReturnType<ReturnType<typeof stopwatch>>, trials: number) =>
  `${figure((time.cpuMilliseconds * 1e6) / trials)} ns of processor time per trial ` +
  `(${figure((time.milliseconds * 1e6) / trials)} ns by the clock)`;

const figure = (value: number, digits = 3) =>
  Number(value.toPrecision(digits)).toLocaleString("en-GB");

async function main(): Promise<void> {
  const print = (line: string) => process.stdout.write(`${line}\n`);
  print(`Node ${process.version}, ${os.cpus()[0].model}, ${os.availableParallelism()} cores`);
  const reservoirs = makeReservoirs(RESERVOIRS);
  const trials = RESERVOIRS * TRIALS;

  timeEngine(reservoirs.slice(0, 40), TRIALS);
  const engine = bestOf(3, () => timeEngine(reservoirs, TRIALS));
  const { maxRSS: engineMemory } = process.resourceUsage();
  print(`\n${RESERVOIRS} reservoirs x ${TRIALS.toLocaleString("en-GB")} trials, one thread`);
  print(
    `  engine      ${perTrial(engine, trials)}; ${figure(engine.milliseconds / 1000)} s in all, of it ` +
      `${figure(engine.rollUpMilliseconds)} ms for the portfolio; peak memory ${figure(engineMemory / 1024)} MB`,
  );

  const reference = timeReference(reservoirs.slice(0, REFERENCE_RESERVOIRS));
  const referenceTrials = REFERENCE_RESERVOIRS * TRIALS;
  print(
    `  reference   ${perTrial(reference, referenceTrials)}; ` +
      `${figure((reference.milliseconds / 1000) * (RESERVOIRS / REFERENCE_RESERVOIRS))} s in all, scaled up from ` +
      `${REFERENCE_RESERVOIRS} reservoirs`,
  );
  const scale = trials / referenceTrials;
  print(
    `  ratio       ${figure((reference.cpuMilliseconds * scale) / engine.cpuMilliseconds)} times faster by processor ` +
      `time, ${figure((reference.milliseconds * scale) / engine.milliseconds)} by the clock`,
  );

  const differences = reference.runs.map(
    ({ summaries }, i) => summaries.condensateRecoverableStb.p50 / engine.run.members[i].p50 - 1,
  );
  print(
    `  agreement   P50 of recoverable condensate differs by ${figure(
      100 * Math.max(...differences.map(Math.abs)),
      2,
    )} % at most between the two (sampling error is about 1 %)`,
  );

  const threads = await measureThreads(reservoirs, TRIALS);
  if (threads) {
    print(
      `  two threads ${figure(threads.twoThreads / 1000)} s for the simulations against ${figure(
        threads.oneThread / 1000,
      )} s on one: ${figure(threads.oneThread / threads.twoThreads)} times faster`,
    );
  }

  const perReference = reference.cpuMilliseconds / referenceTrials;
  const sobol = bestOf(3, () => timeSimulations(reservoirs, SOBOL_TRIALS, "sobol"));
  const hypercube = bestOf(3, () => timeSimulations(reservoirs, TRIALS, "latinHypercube"));
  print("\nSimulations alone, by method");
  for (const [name, time, count] of [
    ["hypercube  ", hypercube, TRIALS],
    ["Sobol      ", sobol, SOBOL_TRIALS],
  ] as const) {
    const own = RESERVOIRS * count;
    print(
      `  ${name} ${perTrial(time, own)}; ${figure((perReference * own) / time.cpuMilliseconds)} times faster than the reference`,
    );
  }

  print("\nGrowth (processor time ~ size^exponent)");
  const thousand = makeReservoirs(1000);
  for (const [sampling, few, many] of [
    ["latinHypercube", TRIALS, 10 * TRIALS],
    ["sobol", SOBOL_TRIALS, 16 * SOBOL_TRIALS],
  ] as const) {
    const base = sampling === "sobol" ? sobol : hypercube;
    const wide = timeSimulations(thousand, few, sampling);
    const long = timeSimulations(reservoirs.slice(0, 60), many, sampling);
    const byReservoirs = growthExponent(
      base.cpuMilliseconds,
      wide.cpuMilliseconds,
      thousand.length / RESERVOIRS,
    );
    const byTrials = growthExponent(base.cpuMilliseconds / 4, long.cpuMilliseconds, many / few);
    print(
      `  ${sampling.padEnd(15)} reservoirs 240 to 1,000: ${figure(byReservoirs)}; trials ` +
        `${few.toLocaleString("en-GB")} to ${many.toLocaleString("en-GB")}: ${figure(byTrials)} (60 reservoirs)`,
    );
  }
  print(
    `  peak memory of all that: ${figure(process.resourceUsage().maxRSS / 1024)} MB, the reference's included`,
  );
}

await main();
