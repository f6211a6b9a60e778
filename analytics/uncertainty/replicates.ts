/** Independent repetitions that the trials of a run are made of, where there are enough for so many. */
export const REPLICATES = 16;

/** Replicates of fewer trials would be too coarse to read from them which share lies below a P90 or a P10. */
const FEWEST_PER_REPLICATE = 20;

/** {@link REPLICATES} from 320 trials on; shorter runs have as many as hold 20 trials, 5 for the shortest run of 100. */
export function replicatesOf(trials: number): number {
  return Math.max(1, Math.min(REPLICATES, Math.floor(trials / FEWEST_PER_REPLICATE)));
}

/** The trials of each replicate, `starts[r]` up to `starts[r + 1]`: as equal as whole numbers can be. */
export function replicateStarts(trials: number): number[] {
  const replicates = replicatesOf(trials);
  return Array.from({ length: replicates + 1 }, (_, r) => Math.floor((r * trials) / replicates));
}

/** 0.975 quantiles of Student's t with 1 to 15 degrees of freedom. */
const STUDENT_975 = [
  12.7062, 4.30265, 3.18245, 2.77645, 2.57058, 2.44691, 2.36462, 2.306, 2.26216, 2.22814, 2.20099,
  2.17881, 2.16037, 2.14479, 2.13145,
] as const;
const NORMAL_975 = 1.959964;

/**
 * How many standard errors reach to either end of a 95 % interval, when they were read from so many replicates: the
 * 0.975 quantile of Student's t with one degree of freedom fewer. Errors by formula, from one replicate, take the normal
 * quantile.
 *
 * @param replicates  1 to 16
 * @example halfWidth95(16) // => 2.13145
 */
export function halfWidth95(replicates: number): number {
  return STUDENT_975[replicates - 2] ?? NORMAL_975;
}
