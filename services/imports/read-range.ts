import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import { compileDistribution } from "@/analytics/uncertainty/distribution";
import { usualRanges } from "@/analytics/volumetrics/usual-ranges";
import { shapeMeanings, shapes, type RangeColumns, type Shape } from "./columns";
import type { CellReader } from "./read-cells";

/** How far a given best may lie from the P50 that low and high imply: what rounding to three digits can explain. */
const BEST_TOLERANCE = 0.01;

const isShape = (word: string): word is Shape => (shapes as readonly string[]).includes(word);

const article = (shape: Shape): string => (shape === "uniform" ? "A uniform" : `A ${shape}`);

/**
 * The distribution a row describes with low, best, high and shape.
 *
 * @returns `null` when nothing is given (`isGiven` tells) or when something was refused
 */
export function readRange(reader: CellReader, range: RangeColumns): Distribution | null {
  const column = (suffix: string): string => `${range.stem}_${suffix}`;
  const refusedBefore = reader.problems.length;
  const low = reader.number(column("low"));
  const best = reader.number(column("best"));
  const high = reader.number(column("high"));
  refuseImpossible(reader, range, { low, best, high });
  const word = reader.choice(column("shape"));
  if (reader.problems.length > refusedBefore) return null;

  const onlyBest = low === null && high === null && best !== null;
  const shape: Shape =
    word !== null && isShape(word) ? word : onlyBest ? "constant" : range.defaultShape;

  if (shape === "constant") {
    if (best === null) {
      reader.refuse(column("best"), "A constant takes its value from best.");
      return null;
    }
    const ends = [low, high].filter((value) => value !== null);
    if (ends.some((value) => value !== best)) {
      reader.refuse(column("shape"), "A constant has one value; leave low and high blank.");
      return null;
    }
    return { kind: "constant", value: best };
  }

  if (low === null || high === null) {
    const missing = low === null ? "low" : "high";
    reader.refuse(
      column(missing),
      onlyBest
        ? `${article(shape)} range needs low and high: ${shapeMeanings[shape]}.`
        : `This cell is needed: ${shape} means ${shapeMeanings[shape]}.`,
    );
    return null;
  }
  if (low >= high) {
    reader.refuse(
      column("high"),
      low === high
        ? "Low and high are the same. For a single value fill best alone."
        : "High lies below low. Low is the low case (P90), high the high case (P10).",
    );
    return null;
  }

  switch (shape) {
    case "uniform":
      if (best !== null && best !== (low + high) / 2) {
        reader.refuse(column("best"), "A uniform range has no best; leave the cell blank.");
        return null;
      }
      return { kind: "uniform", low, high };
    case "triangular":
    case "pert":
      if (best === null) {
        reader.refuse(
          column("best"),
          `This cell is needed: ${shape} means ${shapeMeanings[shape]}.`,
        );
        return null;
      }
      if (best < low || best > high) {
        reader.refuse(column("best"), "Best lies outside low to high.");
        return null;
      }
      return { kind: shape, low, mode: best, high };
    case "normal":
      if (!bestAgrees(reader, range, best, (low + high) / 2, shape)) return null;
      return withinPossible(reader, range, { kind: "normalP90P10", p90: low, p10: high });
    case "lognormal":
      if (low <= 0) {
        reader.refuse(column("low"), "A lognormal range lies above zero throughout.");
        return null;
      }
      if (!bestAgrees(reader, range, best, Math.sqrt(low * high), shape)) return null;
      return withinPossible(reader, range, { kind: "lognormalP90P10", p90: low, p10: high });
  }
}

/** Less than one trial in a million: the engine takes such a tail without being told where to end it. */
const NEGLIGIBLE_MASS = 1e-6;

/** Ending a range that loses more than this would move the percentiles the row gives; a project's choice. */
const MOST_LOST_MASS = 0.05;

/** Why a range does not go past this end; the reason of most inputs is about the upper one. */
function whyEnded(range: RangeColumns, side: "below" | "above"): string {
  const { label, possible, reason } = usualRanges[range.input];
  return side === "below" && possible[0] === 0 ? `no ${label} is negative` : reason;
}

/**
 * Refuses each figure that no reservoir can have, in its own column. A possible range that leaves out its lower end
 * may still begin there, so that end itself is left to the engine.
 */
function refuseImpossible(
  reader: CellReader,
  range: RangeColumns,
  figures: Record<"low" | "best" | "high", number | null>,
): void {
  const { label, possible, slip } = usualRanges[range.input];
  for (const [suffix, value] of Object.entries(figures)) {
    if (value === null || (value >= possible[0] && value <= possible[1])) continue;
    const column = `${range.stem}_${suffix}`;
    const why = whyEnded(range, value < possible[0] ? "below" : "above");
    // The slip supposes that the figure was meant in the engine's unit; in another unit row 2 is what to look at.
    const advice = Number(reader.raw(column)) === value ? slip : "Check the unit in row 2.";
    reader.refuse(
      column,
      `The ${label} cannot be ${reader.inOwnUnit(column, value)}: ${why}. ${advice}`,
    );
  }
}

/**
 * A sheet has no columns for the ends of a normal or lognormal range, so one whose tail reaches past what is possible
 * ends there, and the row says so. One that would lose more than 5 % is refused: it would no longer have the
 * percentiles that the row gives.
 */
function withinPossible(
  reader: CellReader,
  range: RangeColumns,
  distribution: Distribution,
): Distribution | null {
  const [low, high] = usualRanges[range.input].possible;
  const { cdf } = compileDistribution(distribution);
  const tails = [
    { bound: "minimum", suffix: "low", word: "below" as const, end: low, mass: cdf(low) },
    { bound: "maximum", suffix: "high", word: "above" as const, end: high, mass: 1 - cdf(high) },
  ]
    .filter(({ mass }) => mass > NEGLIGIBLE_MASS)
    .map((tail) => {
      const column = `${range.stem}_${tail.suffix}`;
      const share = Number((100 * tail.mass).toPrecision(2));
      const past = `This range would go ${tail.word} ${reader.inOwnUnit(column, tail.end)} with a chance of ${share} %`;
      return { ...tail, column, past };
    });
  if (tails.reduce((sum, { mass }) => sum + mass, 0) > MOST_LOST_MASS) {
    const [{ column, past, word }] = tails.sort((a, b) => b.mass - a.mass);
    reader.refuse(
      column,
      `${past}, but ${whyEnded(range, word)}. Bring low and high closer together, or choose pert or triangular, where they are the ends.`,
    );
    return null;
  }
  for (const { column, past } of tails) reader.warn(column, `${past}; it ends there instead.`);
  return { ...distribution, ...Object.fromEntries(tails.map(({ bound, end }) => [bound, end])) };
}

/** Two percentiles fix a normal or lognormal; a third figure must agree with them or it would be dropped unsaid. */
function bestAgrees(
  reader: CellReader,
  range: RangeColumns,
  best: number | null,
  implied: number,
  shape: Shape,
): boolean {
  if (best === null || Math.abs(best - implied) <= BEST_TOLERANCE * Math.abs(implied)) return true;
  reader.refuse(
    `${range.stem}_best`,
    `${article(shape)} range through this P90 and P10 has its P50 at ${reader.inOwnUnit(`${range.stem}_best`, implied)}. Leave best blank, or choose pert or triangular, where low and high are the ends.`,
  );
  return false;
}

/** Whether the row says anything about this input. */
export function isRangeGiven(reader: CellReader, range: RangeColumns): boolean {
  return ["low", "best", "high", "shape"].some(
    (suffix) => !reader.isBlank(`${range.stem}_${suffix}`),
  );
}
