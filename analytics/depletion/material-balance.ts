/** What is left in the cell of a constant-volume depletion, from what came out of it. */
import { DomainError } from "../errors";
import { degreesRankine, GAS_CONSTANT } from "../units/conversions";
import { balanceComponents, HEPTANES_PLUS, type LumpedGas } from "./lumped-gas";
import { twoPhaseZFromMoles } from "./two-phase-z";

/** A row with everything that the balance needs. */
export interface CellRow {
  readonly pressurePsia: number;
  /** wellstream produced so far, share of the moles at the dew point */
  readonly producedFraction: number;
  readonly gasZ: number;
  /** retrograde liquid, fraction of the cell's volume at the dew point */
  readonly liquidFraction: number;
  /** gas produced in this step, which is in equilibrium with the liquid left */
  readonly gas: LumpedGas;
}

export interface CellConditions {
  readonly dewPointPsia: number;
  /** gas z at the dew point */
  readonly dewPointZ: number;
  readonly temperatureDegF: number;
}

/** The cell after one step; moles per mole of the fluid at the dew point. */
export interface CellState {
  readonly pressurePsia: number;
  readonly twoPhaseZ: number;
  readonly gasMoles: number;
  /** by difference: 1 less produced less gas */
  readonly liquidMoles: number;
  /** of each component in the liquid, in the order of `balanceComponents`; below zero where the table contradicts itself */
  readonly liquidComponentMoles: Float64Array;
  /** how far rounding of the reported figures alone can move each of them */
  readonly roundingMoles: Float64Array;
  /** y/x; null where either is not above zero */
  readonly kValues: readonly (number | null)[];
  /** the liquid's properties; null where its moles, mass or volume are not above zero */
  readonly liquid: {
    readonly molecularWeight: number;
    readonly densityLbPerCubicFoot: number;
    /** null when the liquid has no heptanes plus */
    readonly heptanesPlusMolecularWeight: number | null;
  } | null;
}

/** Half the last digit of a laboratory's columns: z 0.001, liquid 0.1 %, compositions 0.01 %, produced 0.001 %. */
const HALF_DIGIT = { z: 0.0005, liquid: 0.0005, moleFraction: 0.00005, produced: 0.000005 };

/** Gas in the cell, moles per mole at the dew point: G = (p/pd)(zd/z)(1 - SL). */
export function gasMolesInCell(
  row: Pick<CellRow, "pressurePsia" | "gasZ" | "liquidFraction">,
  cell: Pick<CellConditions, "dewPointPsia" | "dewPointZ">,
): number {
  return (
    (row.pressurePsia / cell.dewPointPsia) * (cell.dewPointZ / row.gasZ) * (1 - row.liquidFraction)
  );
}

function liquidProperties(
  row: CellRow,
  cell: CellConditions,
  liquidMoles: number,
  componentMoles: Float64Array,
  lightMolecularWeights: Float64Array,
  heptanesPlusPounds: number,
): CellState["liquid"] {
  let pounds = heptanesPlusPounds;
  for (let i = 0; i < HEPTANES_PLUS; i += 1) pounds += componentMoles[i] * lightMolecularWeights[i];
  if (!(liquidMoles > 0 && pounds > 0 && row.liquidFraction > 0)) return null;
  const cellCubicFeet =
    (cell.dewPointZ * GAS_CONSTANT * degreesRankine(cell.temperatureDegF)) / cell.dewPointPsia;
  const heavyMoles = componentMoles[HEPTANES_PLUS];
  return {
    molecularWeight: pounds / liquidMoles,
    densityLbPerCubicFoot: pounds / (row.liquidFraction * cellCubicFeet),
    heptanesPlusMolecularWeight:
      heavyMoles > 0 && heptanesPlusPounds > 0 ? heptanesPlusPounds / heavyMoles : null,
  };
}

/**
 * Balances each component forward from the dew point. Per mole of the fluid there, with zi its composition, yk the gas
 * of step k, n_k the produced share, SL the liquid's share of the cell:
 *
 *     G_k = (p/pd)(zd/z_k)(1 - SL_k)         L_k = 1 - n_k - G_k
 *     x_ik L_k = z_i - sum_j (n_j - n_j-1) y_ij - G_k y_ik,      K_ik = y_ik / x_ik
 *
 * The liquid's mass follows the same way, with heptanes plus by the molecular weight of each step, and its density
 * from its share of the cell's volume, zd R T / pd per mole.
 *
 * @param feed  the fluid at the dew point
 * @param rows  every step below the dew point in order, none left out; a gap would give its gas the next step's
 *              composition
 * @returns     a state a row
 * @throws {DomainError} when a pressure, z or produced share is impossible
 * @see C. H. Whitson, S. B. Torp, J. Pet. Technol. 35 (March 1983) 610-620
 */
export function balanceCell(
  feed: LumpedGas,
  cell: CellConditions,
  rows: readonly CellRow[],
): CellState[] {
  const left = Float64Array.from(feed.moleFractions);
  const lightMolecularWeights = Float64Array.from(feed.molecularWeights);
  let heavyPoundsLeft = left[HEPTANES_PLUS] * feed.molecularWeights[HEPTANES_PLUS];
  let producedBefore = 0;
  return rows.map((row) => {
    if (!(row.gasZ > 0 && row.gasZ < Infinity)) {
      throw new DomainError(`A gas z is above zero, not ${row.gasZ}`, {
        input: "gasZ",
        value: row.gasZ,
      });
    }
    const twoPhaseZ = twoPhaseZFromMoles(row.pressurePsia, row.producedFraction, {
      pressurePsia: cell.dewPointPsia,
      gasZ: cell.dewPointZ,
    });
    const step = row.producedFraction - producedBefore;
    producedBefore = row.producedFraction;
    const gasMoles = gasMolesInCell(row, cell);
    const liquidMoles = 1 - row.producedFraction - gasMoles;

    const y = row.gas.moleFractions;
    const componentMoles = new Float64Array(balanceComponents.length);
    const roundingMoles = new Float64Array(balanceComponents.length);
    for (let i = 0; i < componentMoles.length; i += 1) {
      left[i] -= step * y[i];
      componentMoles[i] = left[i] - gasMoles * y[i];
      roundingMoles[i] =
        gasMoles * y[i] * (HALF_DIGIT.z / row.gasZ + HALF_DIGIT.liquid / (1 - row.liquidFraction)) +
        HALF_DIGIT.moleFraction * (1 + row.producedFraction + gasMoles) +
        2 * HALF_DIGIT.produced;
      if (row.gas.molecularWeights[i] > 0 && i < HEPTANES_PLUS) {
        lightMolecularWeights[i] = row.gas.molecularWeights[i];
      }
    }
    const heavyGas = y[HEPTANES_PLUS] * row.gas.molecularWeights[HEPTANES_PLUS];
    heavyPoundsLeft -= step * heavyGas;

    return {
      pressurePsia: row.pressurePsia,
      twoPhaseZ,
      gasMoles,
      liquidMoles,
      liquidComponentMoles: componentMoles,
      roundingMoles,
      kValues: Array.from(componentMoles, (moles, i) =>
        moles > 0 && y[i] > 0 && liquidMoles > 0 ? (y[i] * liquidMoles) / moles : null,
      ),
      liquid: liquidProperties(
        row,
        cell,
        liquidMoles,
        componentMoles,
        lightMolecularWeights,
        heavyPoundsLeft - gasMoles * heavyGas,
      ),
    };
  });
}
