/** Is this depletion study consistent with itself? */
import type { Stream } from "../composition/stream";
import { cellRows } from "./cell-rows";
import {
  checkClosure,
  checkComponents,
  checkHoffmann,
  checkLiquid,
  checkTwoPhaseZ,
  hoffmannLines,
  placedStates,
} from "./check-balance";
import { checkGasZAgainstComposition } from "./check-gas-z";
import {
  checkDewPointComposition,
  checkHeptanesPlusTrend,
  checkHeptanesPlusWeight,
  checkTotals,
} from "./check-produced-gas";
import {
  checkFirstRow,
  checkGasZ,
  checkLiquidCurve,
  checkPressures,
  checkProduced,
} from "./check-rows";
import type { DepletionTable } from "./depletion-table-schema";
import type { Finding } from "./finding-schema";
import { lumpStream } from "./lumped-gas";

/**
 * Checks a constant-volume depletion table against itself: order and ranges of its columns, totals of its gases, the
 * balance of moles and of every component forward from the dew point, the density of the liquid that the balance
 * leaves, and the straightness of the Hoffmann plot. Nothing is corrected and no row is left out silently.
 *
 * Limits at which a check passes, warns or fails are common practice without a source, except the rounding of the
 * figures themselves.
 *
 * @param stream  the wellstream, which is the gas at the dew point
 * @returns       one finding or more for every check, in the order in which a reader would go through the table
 * @see C. H. Whitson, S. B. Torp, J. Pet. Technol. 35 (March 1983) 610-620, on balances of depletion studies;
 *   A. E. Hoffmann, J. S. Crump, C. R. Hocott, Trans. AIME 198 (1953) 1-10
 */
export function checkTable(table: DepletionTable, stream: Stream): Finding[] {
  const wellstream = lumpStream(stream);
  const followed = cellRows(table);
  const states = placedStates(followed, stream);
  return [
    ...checkPressures(table),
    ...checkFirstRow(table),
    ...checkProduced(table),
    ...checkTotals(table),
    ...checkDewPointComposition(table, wellstream),
    ...checkLiquidCurve(table),
    ...checkGasZ(table),
    ...checkGasZAgainstComposition(table, stream),
    ...checkTwoPhaseZ(table),
    ...checkClosure(table, followed, states),
    ...checkComponents(table, states),
    ...checkLiquid(table, states),
    ...checkHoffmann(table, hoffmannLines(table.temperatureDegF, states)),
    ...checkHeptanesPlusTrend(table, wellstream),
    ...checkHeptanesPlusWeight(table, wellstream),
  ];
}
