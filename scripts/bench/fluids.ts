/**
 * How fast and how sure phase behaviour is, against plain successive substitution in the same run.
 *
 *     npm run bench:fluids
 *
 * Work: 10,000 random feeds of fourteen components (`random-feeds.ts` states the generator), each flashed once; the
 * two-phase ones again by the textbook's flash; a depletion of fifteen steps and the phase envelope of a gas condensate
 * of twelve components; one estimate of 10,000 trials with a recovery plan.
 */
import os from "node:os";
import { readComposition } from "@/analytics/composition/read-sheet";
import { depleteCell } from "@/analytics/depletion/simulate-depletion";
import { characterise } from "@/analytics/equation-of-state/characterise";
import { untouched } from "@/analytics/equation-of-state/characterisation-schema";
import { phaseEnvelope } from "@/analytics/equation-of-state/envelope";
import { Flasher } from "@/analytics/equation-of-state/flash";
import { saturationPressures } from "@/analytics/equation-of-state/saturation";
import { flashTrain } from "@/analytics/equation-of-state/separator-train";
import { ConvergenceError } from "@/analytics/errors";
import { measureTrials } from "./fluids-trials";
import { plainFlash } from "./plain-flash";
import { feedMixture, randomFeeds, type RandomFeed } from "./random-feeds";

const FEEDS = 10_000;
const SEED = 1;
const REFERENCE_FEEDS = 1_000;
const REPEATS = 20;
const STEPS = 15;
const RESERVOIR_DEGF = 200;

const print = (line: string) => process.stdout.write(`${line}\n`);
const figure = (value: number, digits = 3) =>
  Number(value.toPrecision(digits)).toLocaleString("en-GB");

/** Processor time, best of several runs: the machine's other work only ever adds time. */
function bestMilliseconds(run: () => void, repeats = REPEATS): number {
  let best = Infinity;
  for (let i = 0; i < repeats; i += 1) {
    const start = process.cpuUsage();
    run();
    const { user, system } = process.cpuUsage(start);
    best = Math.min(best, (user + system) / 1000);
  }
  return best;
}

/** Largest imbalance of any component, worked out from the answer. */
function imbalance(feed: RandomFeed, found: ReturnType<Flasher["flash"]>): number {
  const { liquid, vapour, vapourFraction } = found;
  if (!liquid || !vapour) return 0;
  return feed.moleFractions.reduce(
    (most, z, i) =>
      Math.max(
        most,
        Math.abs(
          z -
            (1 - vapourFraction) * liquid.moleFractions[i] -
            vapourFraction * vapour.moleFractions[i],
        ),
      ),
    0,
  );
}

function flashAll(feeds: readonly RandomFeed[]) {
  const flasher = new Flasher(feedMixture);
  const found = { gas: 0, liquid: 0, two: 0, failed: 0, residual: 0, imbalance: 0 };
  const twoPhase: RandomFeed[] = [];
  for (const feed of feeds) {
    try {
      const answer = flasher.flash(feed.moleFractions, feed);
      found[answer.phases] += 1;
      found.residual = Math.max(found.residual, answer.residual);
      found.imbalance = Math.max(found.imbalance, imbalance(feed, answer));
      if (answer.phases === "two") twoPhase.push(feed);
    } catch (error) {
      if (!(error instanceof ConvergenceError)) throw error;
      found.failed += 1;
    }
  }
  return { found, twoPhase };
}

function benchFlashes(): void {
  const feeds = randomFeeds(FEEDS, SEED);
  const { found, twoPhase } = flashAll(feeds);
  print(`\n${figure(FEEDS)} random feeds of ${feedMixture.names.length} components`);
  print(
    `  outcome     ${found.two} two phases, ${found.gas} gas, ${found.liquid} liquid, ${found.failed} failures; largest ` +
      `ln f difference ${found.residual.toExponential(1)}, largest imbalance ${found.imbalance.toExponential(1)}`,
  );
  const all = bestMilliseconds(() => flashAll(feeds), 3);
  print(
    `  all         ${figure((1000 * FEEDS) / all)} flashes a second of processor time, stability tests included`,
  );

  const compared = twoPhase.slice(0, REFERENCE_FEEDS);
  const flasher = new Flasher(feedMixture);
  const engine = bestMilliseconds(() => {
    for (const feed of compared) flasher.flash(feed.moleFractions, feed);
  }, 5);
  let lost = 0;
  let farthest = 0;
  const plain = bestMilliseconds(() => {
    lost = 0;
    for (const feed of compared) {
      const { vapourFraction } = plainFlash(feedMixture, feed.moleFractions, feed);
      if (!(vapourFraction > 0 && vapourFraction < 1)) lost += 1;
    }
  }, 3);
  for (const feed of compared) {
    const { vapourFraction } = plainFlash(feedMixture, feed.moleFractions, feed);
    if (!(vapourFraction > 0 && vapourFraction < 1)) continue;
    const difference = vapourFraction - flasher.flash(feed.moleFractions, feed).vapourFraction;
    farthest = Math.max(farthest, Math.abs(difference));
  }
  print(
    `  two phases  ${figure((1000 * compared.length) / engine)} flashes a second; plain successive substitution ` +
      `${figure((1000 * compared.length) / plain)}: ${figure(plain / engine)} times faster`,
  );
  print(
    `  agreement   vapour fractions differ by ${farthest.toExponential(1)} at most; the plain flash lost ${lost} of ` +
      `${compared.length} two-phase feeds`,
  );
}

function benchFluid(): void {
  const { stream } = readComposition({
    kind: "wellstream",
    stream: {
      light: {
        CO2: 1.21,
        N2: 1.94,
        C1: 65.99,
        C2: 8.69,
        C3: 5.91,
        iC4: 2.39,
        nC4: 2.78,
        iC5: 1.57,
        nC5: 1.12,
        C6: 1.81,
      },
      carbonNumbers: [],
      plus: { carbonNumber: 7, molePercent: 6.59, molecularWeight: 140, specificGravity: 0.774 },
    },
  });
  const characterised = characterise(stream, {
    split: { kind: "gamma", fractions: 2, shape: 1 },
    criticals: "keslerLee",
    adjustments: untouched,
  });
  const { mixture, moleFractions } = characterised;
  const temperatureDegR = RESERVOIR_DEGF + 459.67;
  const { upper } = saturationPressures(mixture, moleFractions, temperatureDegR);
  const pressures = Array.from(
    { length: STEPS },
    (_, i) => upper!.pressurePsia + ((i + 1) / STEPS) * (500 - upper!.pressurePsia),
  );
  const stages = [
    { pressurePsia: 814.7, temperatureDegF: 80 },
    { pressurePsia: 64.7, temperatureDegF: 80 },
    { pressurePsia: 14.696, temperatureDegF: 60 },
  ];
  print(`\nA gas condensate of ${mixture.names.length} components`);
  const time = (label: string, run: () => void) =>
    print(`  ${label.padEnd(34)} ${figure(bestMilliseconds(run))} ms`);
  time("saturation pressures", () => saturationPressures(mixture, moleFractions, temperatureDegR));
  time(`depletion of ${STEPS} steps, dew point too`, () =>
    depleteCell(characterised, RESERVOIR_DEGF, pressures),
  );
  time("three separators", () => flashTrain(mixture, moleFractions, stages));
  time("phase envelope", () => phaseEnvelope(mixture, moleFractions));
  time("the same with two lines of liquid", () =>
    phaseEnvelope(mixture, moleFractions, { liquidVolumeFractions: [0.1, 0.2] }),
  );
}

function benchTrials(): void {
  const { trials, withoutPlan, depletion, cycling } = measureTrials();
  print(`\nOne estimate of ${figure(trials)} trials`);
  print(
    `  without a plan ${figure(withoutPlan)} ms, with depletion ${figure(depletion)} ms, with cycling ${figure(cycling)} ms`,
  );
}

print(`Node ${process.version}, ${os.cpus()[0].model}, one thread`);
benchFlashes();
benchFluid();
benchTrials();
