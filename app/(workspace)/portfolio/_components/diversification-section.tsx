import type { Statement } from "@/app/api/v1/portfolio/schema";
import { RangeMark } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import type { Reporting } from "@/components/portfolio/reporting";
import { formatFigure } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { ColumnHeading, FigureCell, LedgerTable } from "@/components/ui/table";
import { liquidOf } from "./liquid";
import { diversificationTitle } from "./total-words";

const rows = [
  { key: "p90", label: "P90" },
  { key: "p50", label: "P50" },
  { key: "p10", label: "P10" },
  { key: "mean", label: "Mean" },
] as const;

/** What adding up trial by trial does to each percentile, against the sum of the column. */
export function DiversificationSection({
  statement,
  reporting,
}: {
  statement: Statement;
  reporting: Reporting;
}) {
  const { totals, dependence } = statement;
  if (!totals) return null;
  const liquid = liquidOf(statement, reporting);
  const total = liquid.rangeOf(totals.trialByTrial);
  const sum = liquid.rangeOf(totals.arithmeticSum);
  const scale = scaleFor([total.p90, total.p10, sum.p90, sum.p10], { kind: "linear", pad: 0.06 });

  return (
    <Section
      title={diversificationTitle(total, sum, totals.fields, liquid.unit)}
      note={`${capitalised(liquid.name)}, ${liquid.unit}, ${reporting.words}. Fields move together by “${dependence.name}”.`}
    >
      <RangeMark
        name={`Portfolio ${liquid.name}, trial by trial, against the arithmetic sum of percentiles`}
        range={total}
        before={{ ...sum, mean: null }}
        unit={liquid.unit}
        scale={scale}
        gridLines={false}
        tipSide="left"
      />
      <LedgerTable caption={`Portfolio ${liquid.name}, trial by trial and as an arithmetic sum`}>
        <thead>
          <tr>
            <th scope="col" />
            <ColumnHeading align="right">Trial by trial</ColumnHeading>
            <ColumnHeading align="right">
              <span title="One standard error of sampling alone, on the safe side">±</span>
            </ColumnHeading>
            <ColumnHeading align="right">Arithmetic sum</ColumnHeading>
            <ColumnHeading align="right">Diversification</ColumnHeading>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ key, label }) => (
            <tr key={key}>
              <th scope="row">{label}</th>
              <FigureCell value={total[key]} strong />
              <FigureCell value={totals.standardErrors[key] * liquid.perStb} digits={2} soft />
              <td className="right arithmetic-figure">{formatFigure(sum[key])}</td>
              <td className="right">
                {key === "mean" ? "none" : formatFigure(total[key] - sum[key], { signed: true })}
              </td>
            </tr>
          ))}
        </tbody>
      </LedgerTable>
      <p className="mt-2 text-13 text-ink-soft">
        Box: the arithmetic sums, which count on every field coming out low, or high, at once. These
        are statistics of the portfolio, not reserves of any category: a portfolio’s P90 is no 1P.
      </p>
    </Section>
  );
}

const capitalised = (words: string) => words.charAt(0).toUpperCase() + words.slice(1);
