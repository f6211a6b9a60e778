import type { SimulationSummary } from "@/analytics/volumetrics/results-schema";
import { resultLabels, resultOptions } from "@/components/drivers/driver-names";
import { Figure } from "@/components/ui/figure";
import { fractionDigits } from "@/components/ui/format";
import { LedgerTable } from "@/components/ui/table";
import { Unit } from "@/components/ui/text";
import { knownOf, levelLabels, SHOWN_DIGITS, type Level } from "./precision-words";
import { resultFactor, resultUnit, type ResultBasis } from "./result-rows";

const levels: Level[] = ["p90", "p50", "p10", "mean"];

/** Each percentile with one standard error of sampling; those with fewer digits than shown say how many hold. */
export function PrecisionTable({
  summary,
  basis,
}: {
  summary: SimulationSummary;
  basis: ResultBasis;
}) {
  return (
    <LedgerTable caption="Standard errors of the percentiles" stickyColumn>
      <thead>
        <tr>
          <th scope="col">Quantity</th>
          {levels.map((level) => (
            <th key={level} scope="col" className="right">
              {levelLabels[level]}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {resultOptions.map(({ value: name }) => {
          const quantity = summary.results[name];
          const factor = resultFactor(name, basis);
          const digits = fractionDigits(
            levels.map((level) => quantity.standardErrors[level] * factor),
            { digits: 2 },
          );
          return (
            <tr key={name}>
              <th scope="row" className="plain">
                {resultLabels[name]} <Unit>{resultUnit(name, basis)}</Unit>
              </th>
              {levels.map((level) => {
                const { digits: held, enough } = knownOf(quantity, level, factor, summary.trials);
                return (
                  <td key={level} className="right">
                    <span aria-hidden="true">±</span>
                    <span className="sr-only">plus or minus </span>
                    <Figure
                      value={quantity.standardErrors[level] * factor}
                      digits={2}
                      fraction={digits}
                    />
                    {!enough && (
                      <small className="block text-warning-ink">
                        {held} of {SHOWN_DIGITS} digits
                      </small>
                    )}
                  </td>
                );
              })}
            </tr>
          );
        })}
      </tbody>
    </LedgerTable>
  );
}
