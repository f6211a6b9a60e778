/** How the probabilities of trials are chosen: random within equal strata, or a scrambled low-discrepancy sequence. */
export const samplingMethods = ["latinHypercube", "sobol"] as const;
export type SamplingMethod = (typeof samplingMethods)[number];
