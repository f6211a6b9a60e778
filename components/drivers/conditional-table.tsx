import type { Sensitivity } from "@/analytics/sensitivity/sensitivity-schema";
import { ChartFrame } from "@/components/charts/chart-frame";
import { RangeMark } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { driverCatalogue } from "@/components/estimate/input-catalogue";
import { formatFigure, formatPercent, fractionDigits } from "@/components/ui/format";
import { FigureCell, LedgerTable } from "@/components/ui/table";
import { Unit } from "@/components/ui/text";
import { byMove, chosenWords, conditionalFinding } from "./driver-findings";
import { inputLabel } from "./driver-names";

type View = Sensitivity["conditional"];
const levels = ["p90", "p50", "p10"] as const;

/** Inputs of the chosen trials against those of all trials, the one that moved furthest first. */
export function ConditionalTable({
  view,
  trials,
  storedTrials,
  name,
  unit,
  factor,
  fileName,
}: {
  view: View;
  /** in all, of those looked at */
  trials: number;
  /** that the estimate has */
  storedTrials: number;
  /** of the result */
  name: string;
  unit: string;
  /** from the engine's unit of the result to the unit shown */
  factor: number;
  fileName: string;
}) {
  const rows = byMove(view.inputs);
  const { result } = view;
  return (
    <ChartFrame
      level={3}
      title={conditionalFinding(view)}
      note={`${view.trials.toLocaleString("en-US")} of ${trials.toLocaleString("en-US")} trials${storedTrials > trials ? ` (drawn anew: the ${storedTrials.toLocaleString("en-US")} of the estimate are more than are looked at)` : ""}, ${name.toLowerCase()} P90 ${formatFigure(result.p90 * factor)} to P10 ${formatFigure(result.p10 * factor)} ${unit} among them. Box and soft figures: all trials. Line: the chosen ones. Rank: where the chosen trials stand on average, 50 % for an input that does not matter.`}
      fileName={`${fileName}-chosen-trials`}
      data={{
        columns: [
          { label: "Input" },
          ...["All", "Chosen"].flatMap((which) =>
            levels.map((level) => ({ label: `${which} ${level.toUpperCase()}` })),
          ),
          { label: "Mean rank" },
        ],
        rows: rows.map(({ input, all, chosen, meanRank }) => [
          inputLabel(input),
          ...levels.map((level) => all[level]),
          ...levels.map((level) => chosen[level]),
          meanRank,
        ]),
      }}
    >
      <LedgerTable
        caption={`${chosenWords(view)} against all`}
        density="change"
        framed
        className="stacked-rows"
      >
        <thead>
          <tr>
            <th scope="col">Input</th>
            {levels.map((level) => (
              <th key={level} scope="col" className="right">
                {level.toUpperCase()}
              </th>
            ))}
            <th scope="col" className="mark">
              P90 to P10, each on its own scale
            </th>
            <th scope="col" className="right">
              Mean rank
            </th>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ input, all, chosen, meanRank }) => {
            const { unit: inputUnit } = driverCatalogue[input];
            const digits = fractionDigits(
              [all, chosen].flatMap((range) => levels.map((level) => range[level])),
            );
            return (
              <tr key={input}>
                <th scope="row" className="wrap">
                  {inputLabel(input)} {inputUnit && <Unit>{inputUnit}</Unit>}
                </th>
                {levels.map((level) => (
                  <FigureCell
                    key={level}
                    value={chosen[level]}
                    before={all[level]}
                    beforeWord="all"
                    nowWord="chosen"
                    fraction={digits}
                  />
                ))}
                <td className="mark">
                  {all.p90 === all.p10 ? (
                    <span className="no-mark">One value</span>
                  ) : (
                    <RangeMark
                      name={`${inputLabel(input)} of the chosen trials`}
                      range={chosen}
                      before={all}
                      beforeWord="in all"
                      unit={inputUnit || undefined}
                      scale={scaleFor(
                        [all.p90, all.p10, chosen.p90, chosen.p10, chosen.mean, all.mean],
                        { kind: "linear", fromZero: false, pad: 0.14 },
                      )}
                      tone="ink"
                      gridLines={false}
                    />
                  )}
                </td>
                <td className="stacked-aside right strong">
                  {formatPercent(meanRank)}
                  <small className="hidden font-normal text-ink-soft phone:block">mean rank</small>
                </td>
              </tr>
            );
          })}
        </tbody>
      </LedgerTable>
    </ChartFrame>
  );
}
