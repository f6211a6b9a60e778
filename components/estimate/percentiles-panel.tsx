import { percentileFamilies } from "@/analytics/uncertainty/distribution-schema";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/choice";
import { formatFigure, formatPercent, MISSING } from "@/components/ui/format";
import type { DetailPanelProps } from "./detail-panel";
import { familyLabels, needsThree, residualFinding, residualsOf } from "./fit-words";
import type { PercentilesText } from "./input-text";
import { PanelFigure } from "./panel-parts";

/** Two or three percentiles of any chance, the curve through them, and how far it misses each. */
export function PercentilesPanel({ about, text, reading, notesId, onChange }: DetailPanelProps) {
  const typed = text.percentiles;
  if (!typed) return null;
  const change = onChange && ((next: PercentilesText) => onChange({ ...text, percentiles: next }));
  const { definition, quantile } = reading.compiled ?? {};
  const residuals =
    definition?.kind === "percentiles" && quantile ? residualsOf(definition, quantile) : null;
  const setPoint = (index: number, part: Partial<PercentilesText["points"][number]>) =>
    change?.({
      ...typed,
      points: typed.points.map((point, at) => (at === index ? { ...point, ...part } : point)),
    });
  const { points } = typed;
  return (
    <div className="range-panel">
      <div className="range-panel-head">
        {change ? (
          <Select
            label="Curve through them"
            value={typed.family}
            options={percentileFamilies.map((family) => ({
              value: family,
              label: familyLabels[family],
              note: needsThree(family) && points.length < 3 ? "needs three percentiles" : undefined,
              disabled: needsThree(family) && points.length < 3,
            }))}
            onChange={(family) => change({ ...typed, family })}
          />
        ) : (
          <b>{familyLabels[typed.family]} curve</b>
        )}
        {residuals && (
          <p role="status" aria-live="polite">
            {residualFinding(typed.family, residuals)}
          </p>
        )}
      </div>
      <table className="range-panel-table percentiles-table">
        <caption className="sr-only">
          Percentiles of {about.label}, and what the curve has there
        </caption>
        <thead>
          <tr>
            <th scope="col">Chance of at least</th>
            <th scope="col">Asked</th>
            <th scope="col" className="right">
              Given by the curve
            </th>
            <th scope="col" className="right">
              Difference
            </th>
            {change && (
              <th scope="col">
                <span className="sr-only">Take out</span>
              </th>
            )}
          </tr>
        </thead>
        <tbody>
          {points.map((point, index) => {
            const residual = residuals?.[index];
            const which = `${about.label}, percentile ${index + 1}`;
            return (
              <tr key={index}>
                <td data-label="Chance of at least">
                  <PanelFigure
                    label={`${which}, chance of at least the value`}
                    value={point.exceedance}
                    unit="%"
                    reading={reading.fields[`points.${index}.exceedance`]}
                    notesId={notesId}
                    onChange={change && ((exceedance) => setPoint(index, { exceedance }))}
                  />
                </td>
                <td data-label="Asked">
                  <PanelFigure
                    label={`${which}, value`}
                    value={point.value}
                    unit={about.unit}
                    reading={reading.fields[`points.${index}.value`]}
                    notesId={notesId}
                    onChange={change && ((value) => setPoint(index, { value }))}
                  />
                </td>
                <td className="right" data-label="Given by the curve">
                  {residual ? formatFigure(residual.given) : MISSING}
                </td>
                <td className="right" data-label="Difference">
                  {residual ? differenceWords(residual) : MISSING}
                </td>
                {change && (
                  <td>
                    <Button
                      size="small"
                      kind="quiet"
                      disabled={points.length <= 2}
                      aria-label={`Take out percentile ${index + 1} of ${about.label}`}
                      onClick={() =>
                        change({
                          family: needsThree(typed.family) ? "lognormal" : typed.family,
                          points: points.filter((_, at) => at !== index),
                        })
                      }
                    >
                      Take out
                    </Button>
                  </td>
                )}
              </tr>
            );
          })}
        </tbody>
      </table>
      {change && points.length < 3 && (
        <Button
          size="small"
          onClick={() => change({ ...typed, points: [...points, { exceedance: "50", value: "" }] })}
        >
          Add a third percentile
        </Button>
      )}
    </div>
  );
}

/** Misses below a ten-thousandth are rounding. */
const NO_MISS = 1e-4;

function differenceWords({ difference, share }: { difference: number; share: number | null }) {
  if (Math.abs(share ?? difference) < NO_MISS) return "none";
  const figure = formatFigure(difference, { digits: 2, signed: true });
  return share === null ? figure : `${figure} (${formatPercent(Math.abs(share), { decimals: 1 })})`;
}
