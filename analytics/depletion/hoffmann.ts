/** Do the equilibrium ratios of a depletion study fall on a line? The Hoffmann plot. */
import { DomainError } from "../errors";
import { degreesRankine } from "../units/conversions";
import { balanceComponents, type BalanceComponent } from "./lumped-gas";

/**
 * Slope b and boiling point Tb (degR) of each component in F = b (1/Tb - 1/T): the values of Standing (1979), who
 * adjusted nitrogen, carbon dioxide and ethane so that they fall on the line of the others (from memory). Heptanes plus
 * changes with the sample and has none.
 */
export const characterisationConstants: Readonly<
  Partial<
    Record<BalanceComponent, { readonly slopeDegR: number; readonly boilingPointDegR: number }>
  >
> = {
  H2S: { slopeDegR: 1136, boilingPointDegR: 331 },
  CO2: { slopeDegR: 652, boilingPointDegR: 194 },
  N2: { slopeDegR: 470, boilingPointDegR: 109 },
  C1: { slopeDegR: 300, boilingPointDegR: 94 },
  C2: { slopeDegR: 1145, boilingPointDegR: 303 },
  C3: { slopeDegR: 1799, boilingPointDegR: 416 },
  iC4: { slopeDegR: 2037, boilingPointDegR: 471 },
  nC4: { slopeDegR: 2153, boilingPointDegR: 491 },
  iC5: { slopeDegR: 2368, boilingPointDegR: 542 },
  nC5: { slopeDegR: 2480, boilingPointDegR: 557 },
  C6: { slopeDegR: 2738, boilingPointDegR: 610 },
};

/** What the line is fitted through: hydrocarbons. Acid gases and nitrogen are shown beside it. */
const fitted: ReadonlySet<BalanceComponent> = new Set([
  "C1",
  "C2",
  "C3",
  "iC4",
  "nC4",
  "iC5",
  "nC5",
  "C6",
]);

/** A hydrocarbon this far off the line, in log10 of K p (a fifth), is worth a question. Common practice, no source. */
export const OUTLIER_LOG_RATIO = 0.08;

export interface HoffmannPoint {
  readonly name: BalanceComponent;
  readonly characterisationFactor: number;
  readonly logKTimesPressure: number;
  /** log10(K p) less the line */
  readonly residual: number;
  readonly isFitted: boolean;
  readonly isOutlier: boolean;
}

export interface HoffmannLine {
  readonly pressurePsia: number;
  readonly points: readonly HoffmannPoint[];
  readonly slope: number;
  readonly intercept: number;
  readonly rSquared: number;
}

/**
 * Characterisation factor of a component at a temperature.
 *
 *     F = b (1/Tb - 1/T),  T and Tb in degR
 *
 * @throws {DomainError} when the absolute temperature is not positive
 * @example characterisationFactor({ slopeDegR: 300, boilingPointDegR: 94 }, 200) // => 2.736717
 * @see A. E. Hoffmann, J. S. Crump, C. R. Hocott, Trans. AIME 198 (1953) 1-10
 */
export function characterisationFactor(
  constants: { readonly slopeDegR: number; readonly boilingPointDegR: number },
  temperatureDegF: number,
): number {
  const temperature = degreesRankine(temperatureDegF);
  if (!(temperature > 0)) {
    throw new DomainError(`${temperatureDegF} °F is below absolute zero`, {
      input: "temperatureDegF",
      value: temperatureDegF,
    });
  }
  return constants.slopeDegR * (1 / constants.boilingPointDegR - 1 / temperature);
}

/**
 * The line log10(K p) = a + c F through the hydrocarbons of one step, least squares.
 *
 * @param kValues  in the order of `balanceComponents`; null where there is none
 * @returns        `null` with fewer than four hydrocarbons, through which a line says nothing
 * @see A. E. Hoffmann, J. S. Crump, C. R. Hocott, Trans. AIME 198 (1953) 1-10
 */
export function hoffmannLine(
  pressurePsia: number,
  temperatureDegF: number,
  kValues: readonly (number | null)[],
): HoffmannLine | null {
  const points: { name: BalanceComponent; x: number; y: number }[] = [];
  balanceComponents.forEach((name, index) => {
    const k = kValues[index];
    const constants = characterisationConstants[name];
    if (k === null || !(k > 0) || !constants) return;
    points.push({
      name,
      x: characterisationFactor(constants, temperatureDegF),
      y: Math.log10(k * pressurePsia),
    });
  });
  const line = points.filter(({ name }) => fitted.has(name));
  if (line.length < 4) return null;

  const meanX = line.reduce((sum, { x }) => sum + x, 0) / line.length;
  const meanY = line.reduce((sum, { y }) => sum + y, 0) / line.length;
  let xx = 0;
  let xy = 0;
  let yy = 0;
  for (const { x, y } of line) {
    xx += (x - meanX) ** 2;
    xy += (x - meanX) * (y - meanY);
    yy += (y - meanY) ** 2;
  }
  const slope = xy / xx;
  const intercept = meanY - slope * meanX;
  return {
    pressurePsia,
    points: points.map(({ name, x, y }) => {
      const residual = y - intercept - slope * x;
      const isFitted = fitted.has(name);
      return {
        name,
        characterisationFactor: x,
        logKTimesPressure: y,
        residual,
        isFitted,
        isOutlier: isFitted && Math.abs(residual) > OUTLIER_LOG_RATIO,
      };
    }),
    slope,
    intercept,
    // All ratios alike is a level line, which fits itself.
    rSquared: yy > 0 ? (xy * xy) / (xx * yy) : 1,
  };
}
