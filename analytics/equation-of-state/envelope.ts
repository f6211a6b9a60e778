/** The phase diagram of a fluid: dew and bubble lines, critical point, extremes and lines of equal liquid share. */
import { ConvergenceError, DomainError } from "../errors";
import { DEGR_AT_ZERO_DEGF } from "../units/conversions";
import { hermite, steepest, type CurvePoint } from "./curve-tracer";
import { DiagramLine, LOWEST_PSIA, isAcross } from "./diagram-line";
import { Flasher, normaliseFeed } from "./flash";
import type { Mixture } from "./mixture";
import { createPhaseState } from "./peng-robinson";
import { qualityLine } from "./quality-line";
import { boundarySystem } from "./saturation-curve";
import { fillWilson } from "./wilson";

export interface EnvelopePoint {
  readonly temperatureDegF: number;
  readonly pressurePsia: number;
}

export interface PhaseEnvelope {
  /** from the critical point to low temperature; empty when the line does not pass the critical point */
  readonly bubble: readonly EnvelopePoint[];
  /** from low pressure to the critical point */
  readonly dew: readonly EnvelopePoint[];
  readonly critical: EnvelopePoint | null;
  /** highest temperature with two phases */
  readonly cricondentherm: EnvelopePoint | null;
  /** highest pressure with two phases; null when it lies beyond the limits of the diagram */
  readonly cricondenbar: EnvelopePoint | null;
  readonly quality: readonly {
    readonly liquidVolumeFraction: number;
    /** from low pressure to the critical point, or to a limit of the diagram; empty where it has none of the line */
    readonly points: readonly EnvelopePoint[];
  }[];
}

export interface EnvelopeOptions {
  /** shares of liquid by volume for which lines are drawn, each between 0 and 1 */
  readonly liquidVolumeFractions?: readonly number[];
}

/**
 * A line that cannot be followed farther with all ln K below this has come to the critical point: a few fluids change
 * so fast beyond it that no step across is found.
 */
const AT_CRITICAL = 0.05;

/**
 * The phase envelope of a fluid by continuation, from the dew line at 14.696 psia around the cricondentherm, through
 * the critical point and down the bubble line, until 14.696 psia, -130 degF or 20,000 psia. Extremes are solved for,
 * not read off the points. Lines of equal liquid share run from 14.696 psia (or -130 degF) to the critical point.
 *
 * A second liquid at low temperature is not looked for. A pure component has a critical point and no lines.
 *
 * @param z  mole fractions
 * @throws {DomainError} for a feed that cannot be
 * @throws {ConvergenceError} when the dew line cannot be begun
 * @see M. L. Michelsen, Fluid Phase Equilib. 4 (1980) 1-10
 */
export function phaseEnvelope(
  mixture: Mixture,
  z: Float64Array,
  { liquidVolumeFractions = [] }: EnvelopeOptions = {},
): PhaseEnvelope {
  for (const fraction of liquidVolumeFractions) {
    if (!(fraction > 0 && fraction < 1)) {
      throw new DomainError(`A liquid's share of the volume is between 0 and 1, not ${fraction}`, {
        input: "liquidVolumeFractions",
        value: fraction,
      });
    }
  }
  const flasher = new Flasher(mixture);
  const n = mixture.names.length;
  const feed = new Float64Array(n);
  normaliseFeed(z, feed);
  const present = [...feed.keys()].filter((i) => feed[i] > 0);
  if (present.length === 1) return ofPureComponent(mixture, present[0], liquidVolumeFractions);
  const line = new DiagramLine(boundarySystem(flasher.equation, feed), n);
  line.follow(beginDewLine(flasher, feed, line), (point, last) => line.isLeaving(point, last));
  const { points } = line;
  const place = (at: Float64Array): EnvelopePoint => ({
    temperatureDegF: Math.exp(at[n]) - DEGR_AT_ZERO_DEGF,
    pressurePsia: Math.exp(at[n + 1]),
  });
  const crossing = points.findIndex((point, i) => i > 0 && isAcross(points[i - 1], point, n));
  const end = points[points.length - 1].at;
  const criticalAt =
    crossing >= 0
      ? criticalBetween(line, points[crossing - 1], points[crossing], n)
      : present.every((i) => Math.abs(end[i]) < AT_CRITICAL)
        ? end
        : null;
  const placeOrNull = (at: Float64Array | null) => at && place(at);
  const critical = placeOrNull(criticalAt);
  const dew = points.slice(0, crossing >= 0 ? crossing : undefined).map(({ at }) => place(at));
  const bubble = crossing >= 0 ? points.slice(crossing).map(({ at }) => place(at)) : [];
  return {
    dew: critical ? [...dew, critical] : dew,
    bubble: critical && bubble.length > 0 ? [critical, ...bubble] : [],
    critical,
    cricondentherm: placeOrNull(highest(line, n)),
    cricondenbar: placeOrNull(highest(line, n + 1)),
    quality: liquidVolumeFractions.map((liquidVolumeFraction) => ({
      liquidVolumeFraction,
      points: qualityLine(flasher, feed, liquidVolumeFraction, points[0].at[n], criticalAt).map(
        place,
      ),
    })),
  };
}

/** A pure component boils at one pressure: both lines are one, inside which there is no area. */
function ofPureComponent(
  { criticalTemperatureDegR, criticalPressurePsia }: Mixture,
  index: number,
  liquidVolumeFractions: readonly number[],
): PhaseEnvelope {
  const critical = {
    temperatureDegF: criticalTemperatureDegR[index] - DEGR_AT_ZERO_DEGF,
    pressurePsia: criticalPressurePsia[index],
  };
  return {
    dew: [],
    bubble: [],
    critical,
    cricondentherm: critical,
    cricondenbar: critical,
    quality: liquidVolumeFractions.map((liquidVolumeFraction) => ({
      liquidVolumeFraction,
      points: [],
    })),
  };
}

/** The component whose ln K changes most between two points. */
function fastest(one: CurvePoint, other: CurvePoint, components: number): number {
  let index = 0;
  const change = (i: number) => Math.abs(one.at[i] - other.at[i]);
  for (let i = 1; i < components; i += 1) if (change(i) > change(index)) index = i;
  return index;
}

/** First point of the dew line: its temperature by Wilson's K-values, then by substitution, then by Newton's method. */
function beginDewLine(flasher: Flasher, z: Float64Array, line: DiagramLine): CurvePoint {
  const { equation, mixture } = flasher;
  const n = z.length;
  const guess = new Float64Array(n + 2);
  const lnK = guess.subarray(0, n);
  let low = 50;
  let high = 3000;
  for (let i = 0; i < 60; i += 1) {
    const temperature = 0.5 * (low + high);
    fillWilson(mixture, LOWEST_PSIA, temperature, lnK);
    const liquid = z.reduce((sum, fraction, j) => sum + fraction * Math.exp(-lnK[j]), 0);
    if (liquid > 1) low = temperature;
    else high = temperature;
  }
  guess[n] = Math.log(high);
  guess[n + 1] = Math.log(LOWEST_PSIA);
  for (let i = 0; i < n; i += 1) lnK[i] = -lnK[i];
  const feed = createPhaseState(n);
  const drop = createPhaseState(n);
  for (let pass = 0; pass < 200; pass += 1) {
    equation.setTemperature(Math.exp(guess[n]));
    equation.evaluate(z, LOWEST_PSIA, "gas", feed);
    equation.differentiateByState(z, LOWEST_PSIA, feed);
    let w = z.map((fraction, i) => fraction * Math.exp(lnK[i]));
    const total = w.reduce((sum, fraction) => sum + fraction, 0);
    w = w.map((fraction) => fraction / total);
    equation.evaluate(w, LOWEST_PSIA, "liquid", drop);
    equation.differentiateByState(w, LOWEST_PSIA, drop);
    let sum = 0;
    let slope = 0;
    for (let i = 0; i < n; i += 1) {
      lnK[i] = feed.lnPhi[i] - drop.lnPhi[i];
      const share = z[i] * Math.exp(lnK[i]);
      sum += share;
      slope += share * (feed.byLnTemperature[i] - drop.byLnTemperature[i]);
    }
    guess[n] -= Math.max(-0.1, Math.min(0.1, (Math.log(sum) * sum) / slope));
    if (pass % 5 === 4) {
      const first = line.tracer.correct(guess, n + 1, guess[n + 1]);
      if (first) return first;
    }
  }
  throw new ConvergenceError("The dew line could not be begun", { pressurePsia: LOWEST_PSIA });
}

/** Where the ln K pass through zero: between two points on either side, then between two much closer ones. */
function criticalBetween(
  line: DiagramLine,
  before: CurvePoint,
  after: CurvePoint,
  components: number,
): Float64Array {
  const held = fastest(before, after, components);
  const near = (value: number) =>
    line.tracer.correct(hermite(before, after, held, value), held, value);
  const side = Math.sign(before.at[held]);
  const closeBefore = near(0.01 * side);
  const closeAfter = near(-0.01 * side);
  return closeBefore && closeAfter
    ? hermite(closeBefore, closeAfter, held, 0)
    : hermite(before, after, held, 0);
}

/** The point where one unknown is highest along the line; null when that is one of its ends. */
function highest(line: DiagramLine, index: number): Float64Array | null {
  const { points, tracer } = line;
  let top = 0;
  points.forEach((point, i) => {
    if (point.at[index] > points[top].at[index]) top = i;
  });
  if (top === 0 || top === points.length - 1) return null;
  const held = steepest(points[top]);
  const slope = ({ tangent }: CurvePoint) => tangent[index] / tangent[held];
  const neighbour = [points[top - 1], points[top + 1]].find(
    (point) => slope(point) * slope(points[top]) <= 0,
  );
  if (!neighbour) return points[top].at;
  let [from, to] = [points[top], neighbour];
  for (let pass = 0; pass < 30; pass += 1) {
    const share = slope(from) / (slope(from) - slope(to));
    // Regula falsi keeps one end for ever; every third pass halves.
    const value = from.at[held] + (pass % 3 === 2 ? 0.5 : share) * (to.at[held] - from.at[held]);
    const guess = hermite(from, to, held, value);
    const middle = tracer.correct(guess, held, value);
    if (!middle || Math.abs(slope(middle)) < 1e-9) return middle ? middle.at : guess;
    if (slope(middle) * slope(from) <= 0) to = middle;
    else from = middle;
  }
  return from.at;
}
