/** Independent repetitions that the trials of a run are made of. */
export const REPLICATES = 16;

/** Replicates of fewer trials would be too coarse to correlate inputs in, and to read a percentile's share from. */
const FEWEST_PER_REPLICATE = 50;

/** One for runs of under 800 trials, which cannot be divided; else {@link REPLICATES}. */
export function replicatesOf(trials: number): number {
  return trials >= REPLICATES * FEWEST_PER_REPLICATE ? REPLICATES : 1;
}

/** The trials of each replicate, `starts[r]` up to `starts[r + 1]`: as equal as whole numbers can be. */
export function replicateStarts(trials: number): number[] {
  const replicates = replicatesOf(trials);
  return Array.from({ length: replicates + 1 }, (_, r) => Math.floor((r * trials) / replicates));
}
