import { RangeMark, RangeScale } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { fractionDigits } from "@/components/ui/format";
import { FigureCell, LedgerTable } from "@/components/ui/table";
import { Unit } from "@/components/ui/text";
import { halfWidthText, trialsText, type SettleStepView } from "./settle-words";

/** One line a doubling: how well the percentiles are known, and where they have come to stand. */
export function SettleSteps({
  steps,
  tolerance,
  factor,
  unit,
}: {
  steps: readonly SettleStepView[];
  tolerance: number;
  /** from STB to the unit shown */
  factor: number;
  unit: string;
}) {
  const ranges = steps.map(({ condensateRecoverableStb: { p90, p50, p10, mean } }) => ({
    p90: p90 * factor,
    p50: p50 * factor,
    p10: p10 * factor,
    mean: mean * factor,
  }));
  const scale = scaleFor(ranges.flatMap(({ p90, p10 }) => [p90, p10]));
  const digits = fractionDigits(
    ranges.map(({ p50 }) => p50),
    { digits: 4 },
  );
  return (
    <LedgerTable caption="Doublings of the trials">
      <thead>
        <tr>
          <th scope="col" className="right">
            Trials
          </th>
          <th scope="col" className="right">
            Least known
          </th>
          <th scope="col" className="right">
            P50 <Unit>{unit}</Unit>
          </th>
          <th scope="col" className="mark">
            <RangeScale scale={scale} ticks={3} />
          </th>
        </tr>
      </thead>
      <tbody>
        {steps.map(({ trials, worst }, index) => (
          <tr key={trials}>
            <th scope="row" className="right plain">
              {trialsText(trials)}
            </th>
            <td className={worst <= tolerance ? "right strong" : "right"}>
              {halfWidthText(worst)}
            </td>
            <FigureCell value={ranges[index].p50} digits={4} fraction={digits} />
            <td className="mark">
              <RangeMark
                name={`Condensate to the tank after ${trialsText(trials)} trials`}
                range={ranges[index]}
                unit={unit}
                scale={scale}
                ticks={3}
              />
            </td>
          </tr>
        ))}
      </tbody>
    </LedgerTable>
  );
}
