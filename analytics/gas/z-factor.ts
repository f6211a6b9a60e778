/** Gas deviation factor from reduced pressure and temperature: fits of the Standing-Katz chart. */
import { ConvergenceError, DomainError } from "../errors";
import type { Warning } from "../warnings";

const A1 = 0.3265;
const A2 = -1.07;
const A3 = -0.5339;
const A4 = 0.01569;
const A5 = -0.05165;
const A6 = 0.5475;
const A7 = -0.7361;
const A8 = 0.1844;
const A9 = 0.1056;
const A10 = 0.6134;
const A11 = 0.721;
/** A1 to A11, for the solver of the trial loop, which must use the same numbers. */
export const DRANCHUK_ABOU_KASSEM = [A1, A2, A3, A4, A5, A6, A7, A8, A9, A10, A11] as const;
/** critical z of the fit: rho = 0.27 Ppr / (z Tpr) */
const CRITICAL_Z = 0.27;

/** Below this reduced temperature p(rho) is flat or bends back, so the lowest-density root needs a fine scan. */
const FLAT_ISOTHERM_TPR = 1.12;
const RELATIVE_TOLERANCE = 1e-10;
const MAXIMUM_ITERATIONS = 100;

function assertReduced(reducedPressure: number, reducedTemperature: number): void {
  if (!(reducedPressure > 0 && reducedPressure < Infinity)) {
    throw new DomainError(`A reduced pressure is above zero, not ${reducedPressure}`, {
      input: "reducedPressure",
      value: reducedPressure,
    });
  }
  if (!(reducedTemperature > 0 && reducedTemperature < Infinity)) {
    throw new DomainError(`A reduced temperature is above zero, not ${reducedTemperature}`, {
      input: "reducedTemperature",
      value: reducedTemperature,
    });
  }
}

/**
 * z of Dranchuk and Abou-Kassem at a reduced density rho = 0.27 Ppr / (z Tpr), the explicit side of the equation.
 *
 *     z = 1 + (A1 + A2/T + A3/T3 + A4/T4 + A5/T5) rho + (A6 + A7/T + A8/T2) rho2
 *           - A9 (A7/T + A8/T2) rho5 + A10 (1 + A11 rho2)(rho2/T3) exp(-A11 rho2)
 *
 * @example zAtReducedDensity(0, 1.5) // => 1
 */
export function zAtReducedDensity(reducedDensity: number, reducedTemperature: number): number {
  const t = 1 / reducedTemperature;
  const t3 = t * t * t;
  const rho = reducedDensity;
  const rho2 = rho * rho;
  const c1 = A1 + A2 * t + t3 * (A3 + t * (A4 + t * A5));
  const attraction = t * (A7 + A8 * t);
  const damped = A11 * rho2;
  return (
    1 +
    c1 * rho +
    (A6 + attraction) * rho2 -
    A9 * attraction * rho2 * rho2 * rho +
    A10 * (1 + damped) * rho2 * t3 * Math.exp(-damped)
  );
}

/**
 * z from p/z, of which it is an explicit function: rho = 0.27 (p / z) / (Ppc Tpr).
 *
 * @param reducedPressureOverZ  (p / z) / Ppc
 * @example zAtReducedPressureOverZ(3 / zFactor(3, 1.5), 1.5) // => 0.776128, which is zFactor(3, 1.5)
 */
export function zAtReducedPressureOverZ(
  reducedPressureOverZ: number,
  reducedTemperature: number,
): number {
  return zAtReducedDensity(
    (CRITICAL_Z * reducedPressureOverZ) / reducedTemperature,
    reducedTemperature,
  );
}

interface Sample {
  value: number;
  slope: number;
}

/**
 * Smallest root of a function that is negative at zero: steps up to the first sign change, then Newton inside the
 * bracket, with bisection whenever Newton leaves it.
 */
function lowestRoot(
  sample: (x: number, into: Sample) => void,
  step: number,
  limit: number,
  scale: number,
  describe: () => Record<string, unknown>,
): number {
  const at: Sample = { value: 0, slope: 0 };
  let low = 0;
  let high = step;
  for (sample(high, at); at.value < 0; sample(high, at)) {
    low = high;
    high += step;
    if (high > limit) throw new ConvergenceError("The z factor has no root in range", describe());
  }
  let x = 0.5 * (low + high);
  for (let iteration = 0; iteration < MAXIMUM_ITERATIONS; iteration += 1) {
    sample(x, at);
    if (Math.abs(at.value) <= RELATIVE_TOLERANCE * scale * 0.01) return x;
    if (at.value < 0) low = x;
    else high = x;
    const newton = x - at.value / at.slope;
    x = newton > low && newton < high ? newton : 0.5 * (low + high);
    if (high - low <= Number.EPSILON * high) return x;
  }
  throw new ConvergenceError("The z factor did not converge", describe());
}

/**
 * Gas deviation factor by Dranchuk and Abou-Kassem, the default of the engine. The root taken is the one of lowest
 * density (the gas), found by bracketing, to 1e-10 relative.
 *
 * Range: 0.2 <= Ppr < 30, 1 < Tpr <= 3 (from memory). Against 495 published chart readings with Tpr >= 1.2 it is
 * 0.30 % off on average; at Tpr 1.10 2 %, at 1.05 5 %, which `zFactorWarnings` says.
 *
 * @param reducedPressure     p / Ppc, > 0
 * @param reducedTemperature  T / Tpc, > 0
 * @throws {DomainError} when either is not positive and finite
 * @throws {ConvergenceError} when no root is found
 * @example zFactor(3, 1.5) // => 0.776128
 * @see P. M. Dranchuk, J. H. Abou-Kassem, J. Can. Pet. Technol. 14 (July-Sept 1975) 34-36
 */
export function zFactor(reducedPressure: number, reducedTemperature: number): number {
  assertReduced(reducedPressure, reducedTemperature);
  const t = 1 / reducedTemperature;
  const t3 = t * t * t;
  const c1 = A1 + A2 * t + t3 * (A3 + t * (A4 + t * A5));
  const attraction = t * (A7 + A8 * t);
  const c2 = A6 + attraction;
  const c5 = A9 * attraction;
  const perDensity = reducedTemperature / CRITICAL_Z;
  const density = lowestRoot(
    (rho, into) => {
      const rho2 = rho * rho;
      const damped = A11 * rho2;
      const bump = A10 * t3 * rho2 * Math.exp(-damped);
      const z = 1 + c1 * rho + c2 * rho2 - c5 * rho2 * rho2 * rho + (1 + damped) * bump;
      const densityTimesSlope =
        c1 * rho +
        2 * c2 * rho2 -
        5 * c5 * rho2 * rho2 * rho +
        2 * bump * (1 + damped - damped * damped);
      into.value = z * rho * perDensity - reducedPressure;
      into.slope = (z + densityTimesSlope) * perDensity;
    },
    reducedTemperature < FLAT_ISOTHERM_TPR ? 0.01 : 0.25,
    20,
    reducedPressure,
    () => ({ reducedPressure, reducedTemperature }),
  );
  return reducedPressure / (density * perDensity);
}

/**
 * Gas deviation factor by Hall and Yarborough: the alternative, about as accurate, from the Carnahan-Starling hard
 * sphere. Its authors report 0.3 % on average outside Tpr 1.05-1.15 and at most 2 %.
 *
 *     -0.06125 Ppr t e^(-1.2 (1-t)^2) + (y + y2 + y3 - y4)/(1-y)3 - (14.76 t - 9.76 t2 + 4.58 t3) y2
 *       + (90.7 t - 242.2 t2 + 42.4 t3) y^(2.18 + 2.82 t) = 0,   t = 1/Tpr
 *     z = 0.06125 Ppr t e^(-1.2 (1-t)^2) / y
 *
 * @throws {DomainError} when either argument is not positive and finite
 * @throws {ConvergenceError} when no root is found
 * @example hallYarboroughZFactor(3, 1.5) // => 0.774828
 * @see K. R. Hall, L. Yarborough, Oil & Gas J. 71 (18 June 1973) 82-92
 */
export function hallYarboroughZFactor(reducedPressure: number, reducedTemperature: number): number {
  assertReduced(reducedPressure, reducedTemperature);
  const t = 1 / reducedTemperature;
  const drive = 0.06125 * reducedPressure * t * Math.exp(-1.2 * (1 - t) * (1 - t));
  const quadratic = t * (14.76 + t * (-9.76 + t * 4.58));
  const powered = t * (90.7 + t * (-242.2 + t * 42.4));
  const exponent = 2.18 + 2.82 * t;
  const y = lowestRoot(
    (value, into) => {
      const free = 1 - value;
      const free3 = free * free * free;
      into.value =
        -drive +
        (value * (1 + value * (1 + value * (1 - value)))) / free3 -
        quadratic * value * value +
        powered * value ** exponent;
      into.slope =
        (1 + value * (4 + value * (4 + value * (-4 + value)))) / (free3 * free) -
        2 * quadratic * value +
        powered * exponent * value ** (exponent - 1);
    },
    reducedTemperature < FLAT_ISOTHERM_TPR ? 0.004 : 0.02,
    0.999,
    drive,
    () => ({ reducedPressure, reducedTemperature }),
  );
  return drive / y;
}

/**
 * Says where the z factor is known to be poor or untested. Pressures below the range are not flagged: every form of
 * the equation tends to the ideal gas there.
 */
export function zFactorWarnings(reducedPressure: number, reducedTemperature: number): Warning[] {
  const warnings: Warning[] = [];
  const at = `a reduced temperature of ${reducedTemperature.toFixed(2)}`;
  if (reducedTemperature < 1.15) {
    warnings.push({
      code: "z_low_reduced_temperature",
      severity: "warning",
      input: "uncertain.temperatureDegF",
      message:
        `The gas is at ${at}. Below 1.15 the z correlation is poor: 2 % off the chart on average at 1.10, ` +
        "5 % at 1.05. Use a measured z factor.",
    });
  } else if (reducedTemperature > 3) {
    warnings.push({
      code: "z_outside_range",
      severity: "warning",
      input: "uncertain.temperatureDegF",
      message: `The gas is at ${at}, above 3, where the z correlation is extrapolated.`,
    });
  }
  if (reducedPressure >= 30) {
    warnings.push({
      code: "z_outside_range",
      severity: "warning",
      input: "uncertain.pressurePsia",
      message:
        `The gas is at a reduced pressure of ${reducedPressure.toFixed(1)}; the z correlation ends at 30 ` +
        "and is extrapolated.",
    });
  }
  return warnings;
}
