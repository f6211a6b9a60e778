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
