/** What a small curve of a distribution shows: where it begins and ends, and densities an eye can follow. */
import type { CompiledDistribution } from "./compiled-distribution";

/** From its P99.9 to its P0.1 where a distribution has no end, else from end to end; of cases, all of them. */
export function drawnEnds(compiled: CompiledDistribution): readonly [low: number, high: number] {
  if (compiled.cases) {
    const ends = compiled.cases.map((one) => drawnEnds(one.compiled));
    return [Math.min(...ends.map(([low]) => low)), Math.max(...ends.map(([, high]) => high))];
  }
  const { minimum, maximum } = compiled.support;
  return [
    isOpen(compiled, minimum) ? compiled.quantile(0.001) : minimum,
    isOpen(compiled, maximum) ? compiled.quantile(0.999) : maximum,
  ];
}

/** A lognormal's end is a place where nothing is; its curve starts where there is something to see. */
function isOpen(compiled: CompiledDistribution, end: number): boolean {
  if (!Number.isFinite(end)) return true;
  const { definition } = compiled;
  const isLognormal =
    definition.kind.startsWith("lognormal") ||
    (definition.kind === "percentiles" && definition.family.endsWith("ognormal")) ||
    (definition.kind === "data" && definition.shape === "lognormal");
  return isLognormal && compiled.pdf(end) === 0;
}

/**
 * The density to draw. That of measured values jumps from gap to gap, so it is drawn as the chance of a moving window,
 * as wide as the kernel of Silverman's rule, over the window's width.
 *
 * @see B. W. Silverman, Density Estimation for Statistics and Data Analysis (1986), section 3.4.2
 */
export function drawnDensity(compiled: CompiledDistribution): (x: number) => number {
  if (compiled.cases) {
    const parts = compiled.cases.map(({ weight, compiled: one }) => ({
      weight,
      density: drawnDensity(one),
    }));
    return (x) => parts.reduce((sum, { weight, density }) => sum + weight * density(x), 0);
  }
  const { definition, standardDeviation } = compiled;
  if (definition.kind !== "data" || definition.shape !== "empirical") return compiled.pdf;
  const spread = Math.min(
    standardDeviation,
    (compiled.quantile(0.75) - compiled.quantile(0.25)) / 1.34 || standardDeviation,
  );
  // A box has the standard deviation of a Gaussian kernel when it reaches the square root of 3 times as far.
  const half = Math.sqrt(3) * 0.9 * spread * definition.values.length ** -0.2;
  return (x) => (compiled.cdf(x + half) - compiled.cdf(x - half)) / (2 * half);
}
