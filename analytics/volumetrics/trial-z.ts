import { DRANCHUK_ABOU_KASSEM, zFactor } from "../gas/z-factor";

/** The grid of start values: z at steps of reduced pressure and of inverse reduced temperature. */
const PRESSURE_STEP = 0.25;
const PRESSURE_NODES = 121;
const HIGHEST_PRESSURE = PRESSURE_STEP * (PRESSURE_NODES - 1);
const LOWEST_INVERSE = 1 / 3;
const HIGHEST_INVERSE = 1 / 1.15;
const INVERSE_NODES = 49;
const INVERSE_STEP = (HIGHEST_INVERSE - LOWEST_INVERSE) / (INVERSE_NODES - 1);

/** Newton squares the error, so a last step of 1e-5 leaves well under 1e-8. */
const LAST_STEP = 1e-5;
const MAXIMUM_STEPS = 8;

const [A1, A2, A3, A4, A5, A6, A7, A8, A9, A10, A11] = DRANCHUK_ABOU_KASSEM;

let grid: Float64Array | null = null;

/** Filled on first use: about six thousand roots by the careful solver, a few milliseconds. */
function startGrid(): Float64Array {
  if (grid) return grid;
  const filled = new Float64Array(PRESSURE_NODES * INVERSE_NODES);
  for (let j = 0; j < INVERSE_NODES; j += 1) {
    const temperature = 1 / (LOWEST_INVERSE + j * INVERSE_STEP);
    filled[j * PRESSURE_NODES] = 1;
    for (let i = 1; i < PRESSURE_NODES; i += 1) {
      filled[j * PRESSURE_NODES + i] = zFactor(i * PRESSURE_STEP, temperature);
    }
  }
  grid = filled;
  return filled;
}

/**
 * z factors of many trials by Dranchuk and Abou-Kassem: a start value by bilinear interpolation in a grid, then
 * usually two Newton steps on the reduced density. Agrees with `zFactor` to 1e-8; outside the grid (Ppr above 30, Tpr
 * below 1.15 or above 3), and should Newton not settle, it is `zFactor` itself.
 *
 * @param reducedPressures     Ppr of each trial, > 0
 * @param reducedTemperatures  Tpr of each trial, > 0
 * @param out                  z of each trial; NaN where there is none, for the caller to count and refuse
 */
export function fillZFactors(
  reducedPressures: Float64Array,
  reducedTemperatures: Float64Array,
  count: number,
  out: Float64Array,
): void {
  const table = startGrid();
  for (let trial = 0; trial < count; trial += 1) {
    const pressure = reducedPressures[trial];
    const t = 1 / reducedTemperatures[trial];
    const inGrid =
      pressure > 0 && pressure < HIGHEST_PRESSURE && t > LOWEST_INVERSE && t < HIGHEST_INVERSE;
    const z = inGrid ? newton(pressure, t, interpolate(table, pressure, t)) : NaN;
    out[trial] = z > 0 ? z : carefully(pressure, reducedTemperatures[trial]);
  }
}

function interpolate(table: Float64Array, pressure: number, t: number): number {
  const x = pressure / PRESSURE_STEP;
  const y = (t - LOWEST_INVERSE) / INVERSE_STEP;
  const i = Math.min(x | 0, PRESSURE_NODES - 2);
  const j = Math.min(y | 0, INVERSE_NODES - 2);
  const u = x - i;
  const at = j * PRESSURE_NODES + i;
  const lower = table[at] + u * (table[at + 1] - table[at]);
  const above = at + PRESSURE_NODES;
  const upper = table[above] + u * (table[above + 1] - table[above]);
  return lower + (y - j) * (upper - lower);
}

/** @returns z, or NaN when the steps do not settle */
function newton(pressure: number, t: number, start: number): number {
  const t3 = t * t * t;
  const c1 = A1 + A2 * t + t3 * (A3 + t * (A4 + t * A5));
  const attraction = t * (A7 + A8 * t);
  const c2 = A6 + attraction;
  const c5 = A9 * attraction;
  const c10 = A10 * t3;
  // rho z(rho) = 0.27 Ppr / Tpr
  const target = 0.27 * pressure * t;
  let rho = target / start;
  for (let step = 0; step < MAXIMUM_STEPS; step += 1) {
    const rho2 = rho * rho;
    const damped = A11 * rho2;
    const bump = c10 * rho2 * Math.exp(-damped);
    const fifth = c5 * rho2 * rho2 * rho;
    const first = c1 * rho;
    const second = c2 * rho2;
    const z = 1 + first + second - fifth + (1 + damped) * bump;
    const slope = z + first + 2 * second - 5 * fifth + 2 * bump * (1 + damped - damped * damped);
    const change = (rho * z - target) / slope;
    rho -= change;
    if (change < LAST_STEP * rho && change > -LAST_STEP * rho) return target / rho;
  }
  return NaN;
}

function carefully(reducedPressure: number, reducedTemperature: number): number {
  try {
    return zFactor(reducedPressure, reducedTemperature);
  } catch {
    // No root, or not a state: the trial loop counts it and refuses the run with the number of such trials.
    return NaN;
  }
}
