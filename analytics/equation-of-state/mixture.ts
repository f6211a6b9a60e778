/**
 * Components of an equation of state, as parallel arrays of length n, with the n × n matrix of binary interaction
 * parameters by rows. Composition is kept apart: one mixture serves feed, gas and liquid.
 */
export interface Mixture {
  readonly names: readonly string[];
  readonly criticalTemperatureDegR: Float64Array;
  readonly criticalPressurePsia: Float64Array;
  readonly acentricFactor: Float64Array;
  /** lb/lbmol */
  readonly molecularWeight: Float64Array;
  /** s = c/b of the volume translation v = v_eos - c; dimensionless */
  readonly volumeShift: Float64Array;
  /** symmetric, zero on the diagonal */
  readonly interactions: Float64Array;
}

/** A stream as the equation of state sees it. */
export interface Characterised {
  readonly mixture: Mixture;
  /** adds up to 1 */
  readonly moleFractions: Float64Array;
  /** index of the first heptanes-plus component; n when there is none */
  readonly firstHeavy: number;
}
