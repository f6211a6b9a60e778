/** Two-phase z: what gas and retrograde liquid together are worth in a material balance. */
import { DomainError } from "../errors";

function assertPositive(input: string, value: number, what: string): void {
  if (!(value > 0 && value < Infinity)) {
    throw new DomainError(`${what} is above zero, not ${value}`, { input, value });
  }
}

/**
 * Two-phase z from the moles that are left in a cell of constant volume.
 *
 *     p Vd = z2 (1 - n_p) R T,   pd Vd = zd R T   =>   z2 = zd (p / pd) / (1 - n_p)
 *
 * Exact; it needs no z of the gas below the dew point.
 *
 * @param pressurePsia      of the row, at or below the dew point
 * @param producedFraction  wellstream produced so far, share of the moles at the dew point, 0 to below 1
 * @param dewPoint          pressure in psia and gas z there
 * @throws {DomainError} when a pressure or z is not positive, or nothing is left in the cell
 * @example twoPhaseZFromMoles(1814.7, 0.42026, { pressurePsia: 3442.7, gasZ: 0.803 }) // => 0.730109
 * @see C. H. Whitson, S. B. Torp, J. Pet. Technol. 35 (March 1983) 610-620
 */
export function twoPhaseZFromMoles(
  pressurePsia: number,
  producedFraction: number,
  dewPoint: { readonly pressurePsia: number; readonly gasZ: number },
): number {
  assertPositive("pressurePsia", pressurePsia, "A pressure");
  assertPositive("dewPoint.pressurePsia", dewPoint.pressurePsia, "A dew point");
  assertPositive("dewPoint.gasZ", dewPoint.gasZ, "A gas z");
  if (!(producedFraction >= 0 && producedFraction < 1)) {
    throw new DomainError(
      `The produced share of the moles lies between 0 and 1, not at ${producedFraction}`,
      { input: "producedFraction", value: producedFraction },
    );
  }
  return (dewPoint.gasZ * (pressurePsia / dewPoint.pressurePsia)) / (1 - producedFraction);
}

/**
 * Two-phase z by the regression of Rayes, Piper, McCain and Poston: a shortcut when no depletion study exists.
 *
 *     z2 = 2.24353 - 0.0375281 Ppr - 3.56539/Tpr + 0.000829231 Ppr2 + 1.53428/Tpr2 + 0.131987 Ppr/Tpr
 *
 * Range 0.7 <= Ppr <= 20, 1.1 <= Tpr <= 2.1, heptanes plus at least 4 mole per cent (coefficients and range from
 * memory). To be used near the dew point only, and flagged: on the third comparative solution project's fluid it lies
 * 2.6 % above the laboratory at the dew point and 16 % below it at 1,200 and 700 psig.
 *
 * @param reducedPressure     p / Ppc of the wellstream
 * @param reducedTemperature  T / Tpc of the wellstream
 * @throws {DomainError} outside the range, where the polynomial means nothing
 * @example rayesTwoPhaseZ(5, 1.5) // => 0.821552
 * @see D. G. Rayes, L. D. Piper, W. D. McCain, S. W. Poston, SPE Form. Eval. 7 (March 1992) 87-92
 */
export function rayesTwoPhaseZ(reducedPressure: number, reducedTemperature: number): number {
  if (!(reducedPressure >= 0.7 && reducedPressure <= 20)) {
    throw new DomainError(
      `The two-phase z correlation holds for reduced pressures of 0.7 to 20, not ${reducedPressure}`,
      { input: "reducedPressure", value: reducedPressure },
    );
  }
  if (!(reducedTemperature >= 1.1 && reducedTemperature <= 2.1)) {
    throw new DomainError(
      `The two-phase z correlation holds for reduced temperatures of 1.1 to 2.1, not ${reducedTemperature}`,
      { input: "reducedTemperature", value: reducedTemperature },
    );
  }
  const t = 1 / reducedTemperature;
  return (
    2.24353 -
    0.0375281 * reducedPressure -
    3.56539 * t +
    0.000829231 * reducedPressure * reducedPressure +
    1.53428 * t * t +
    0.131987 * reducedPressure * t
  );
}
