/** What the streams of a depletion bring to the tank and the gas line. */
export interface SurfaceProducts {
  readonly condensateStb: number;
  /** Mscf of each stage, the stock tank last */
  readonly stageGasMscf: readonly number[];
  readonly surfaceGasMscf: number;
}
