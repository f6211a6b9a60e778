/** Reported gas z against what the composition of each gas makes it. */
import type { Stream } from "../composition/stream";
import { ConvergenceError, DomainError } from "../errors";
import { compositionZ, defaultCompositionMethod } from "../gas/pseudocritical-composition";
import { readProducedGas } from "./check-produced-gas";
import type { DepletionTable } from "./depletion-table-schema";
import type { Finding } from "./finding-schema";
import { asReported, CheckReport, rowAtStart } from "./findings";

/**
 * How far a measured z may lie from the correlation, and from the trend of its neighbours. The correlation itself is
 * 0.6 % off on average on such gases. Common practice, no source.
 */
const OFF_CORRELATION = 0.05;
const OFF_TREND = 0.015;
/** Below this reduced temperature the correlation itself is poor. */
const LEAST_REDUCED_TEMPERATURE = 1.15;

interface Ratio {
  readonly row: number;
  readonly measured: number;
  readonly computed: number;
}

function ratios(table: DepletionTable, wellstream: Stream): Ratio[] {
  const { temperatureDegF } = table;
  // One method for all rows: a change of method on the way would look like a change of the gas.
  const method = defaultCompositionMethod(wellstream);
  return table.rows.flatMap(({ gasZ, pressurePsia }, row): Ratio[] => {
    if (gasZ === null || !(gasZ > 0)) return [];
    const read = readProducedGas(table, row);
    if (read !== null && "problem" in read) return [];
    const stream = read?.gas.stream ?? (row === 0 ? wellstream : null);
    if (stream === null) return [];
    try {
      const { zFactor, reducedTemperature } = compositionZ(
        stream,
        { pressurePsia, temperatureDegF },
        method,
      );
      if (reducedTemperature < LEAST_REDUCED_TEMPERATURE) return [];
      return [{ row, measured: gasZ, computed: zFactor }];
    } catch (error) {
      // A state that the correlation cannot take is not compared; the count of figures shows it.
      if (error instanceof DomainError || error instanceof ConvergenceError) return [];
      throw error;
    }
  });
}

/** Each gas z lies near the correlation, and keeps its distance from row to row. */
export function checkGasZAgainstComposition(table: DepletionTable, wellstream: Stream): Finding[] {
  const report = new CheckReport({
    code: "gas_z_composition",
    title: "Gas z agrees with the composition",
  });
  const column = "gasZ";
  const series = ratios(table, wellstream);
  if (series.length === 0) {
    report.missing("no row gives a gas z with a composition in the range of the z correlation.", {
      column,
    });
    return report.findings;
  }
  const off = ({ measured, computed }: Ratio) => measured / computed - 1;
  const percent = (share: number) => `${(100 * Math.abs(share)).toFixed(1)} %`;
  series.forEach((point, index) => {
    const deviation = off(point);
    if (Math.abs(deviation) > OFF_CORRELATION) {
      report.warn(
        `${rowAtStart(table, point.row)}: the gas z of ${asReported(point.measured)} is ${percent(deviation)} ` +
          `${deviation > 0 ? "above" : "below"} the ${point.computed.toFixed(3)} that follows from its composition, ` +
          "pressure and temperature.",
        { row: point.row, column },
      );
      return;
    }
    if (index === 0 || index === series.length - 1) return;
    const before = series[index - 1];
    const after = series[index + 1];
    const trend = (off(before) + off(after)) / 2;
    if (Math.abs(deviation - trend) > OFF_TREND) {
      report.warn(
        `${rowAtStart(table, point.row)}: the gas z of ${asReported(point.measured)} lies ${percent(deviation - trend)} ` +
          `${deviation > trend ? "above" : "below"} the trend of its neighbours.`,
        { row: point.row, column },
      );
    }
  });
  const furthest = series.reduce((most, point) => Math.max(most, Math.abs(off(point))), 0);
  return report.conclude(
    `${series.length} figures; the furthest is ${percent(furthest)} off the z correlation.`,
  );
}
