import type { SimulationSummary } from "@/analytics/volumetrics/results-schema";
import { swansonMean } from "@/analytics/uncertainty/swanson";
import { resultLabels, resultOptions } from "@/components/drivers/driver-names";
import { formatPercent, fractionDigits, MISSING } from "@/components/ui/format";
import { FigureCell, LedgerTable } from "@/components/ui/table";
import { Unit } from "@/components/ui/text";
import { resultFactor, resultUnit, type ResultBasis } from "./result-rows";

/** What stands in for a range as one figure, beside the range: mean, Swanson's mean, mode, deterministic case. */
export function MomentsTable({
  summary,
  basis,
}: {
  summary: SimulationSummary;
  basis: ResultBasis;
}) {
  return (
    <LedgerTable caption="Single figures that stand for the range" stickyColumn>
      <thead>
        <tr>
          <th scope="col">Quantity</th>
          {[
            "P90",
            "P50",
            "P10",
            "Mean",
            "Swanson’s mean",
            "off by",
            "Mode",
            "Std deviation",
            "All at P50",
          ].map((heading) => (
            <th key={heading} scope="col" className="right">
              {heading}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {resultOptions.map(({ value: name }) => {
          const quantity = summary.results[name];
          const factor = resultFactor(name, basis);
          const swanson = swansonMean(quantity);
          const figures = {
            p90: quantity.p90 * factor,
            p50: quantity.p50 * factor,
            p10: quantity.p10 * factor,
            mean: quantity.mean * factor,
            swanson: swanson * factor,
            mode: quantity.mode === undefined ? null : quantity.mode * factor,
            deviation: quantity.standardDeviation * factor,
            deterministic: summary.deterministic[name] * factor,
          };
          const digits = fractionDigits(Object.values(figures));
          return (
            <tr key={name}>
              <th scope="row" className="plain">
                {resultLabels[name]} <Unit>{resultUnit(name, basis)}</Unit>
              </th>
              <FigureCell value={figures.p90} fraction={digits} />
              <FigureCell value={figures.p50} fraction={digits} />
              <FigureCell value={figures.p10} fraction={digits} />
              <FigureCell value={figures.mean} fraction={digits} strong />
              <FigureCell value={figures.swanson} fraction={digits} />
              <td className="right soft">
                {quantity.mean === 0
                  ? MISSING
                  : formatPercent(swanson / quantity.mean - 1, { signed: true, decimals: 1 })}
              </td>
              <FigureCell value={figures.mode} fraction={digits} />
              <FigureCell value={figures.deviation} fraction={digits} />
              <FigureCell value={figures.deterministic} fraction={digits} soft />
            </tr>
          );
        })}
      </tbody>
    </LedgerTable>
  );
}
