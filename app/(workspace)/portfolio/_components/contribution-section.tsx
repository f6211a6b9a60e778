"use client";

import Link from "next/link";
import type { ContributionView } from "@/app/api/v1/fields/ranking-schema";
import type { Statement } from "@/app/api/v1/portfolio/schema";
import { useBasis } from "@/components/basis/use-basis";
import { StackedTotals } from "@/components/charts/stacked-totals";
import { capital, numberWords, type Reporting } from "@/components/portfolio/reporting";
import { Figure } from "@/components/ui/figure";
import { formatFigure, formatPercent } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { ColumnHeading, FigureCell, FolioCell, LedgerTable, TotalRow } from "@/components/ui/table";
import { liquidOf } from "./liquid";
import { contributionTitle } from "./total-words";

const NAMED = 6;
const percentiles = ["p90", "p50", "p10"] as const;

/** What each field holds when the total comes out at its own P90, P50 and P10: the columns add up to these. */
export function ContributionSection({
  statement,
  reporting,
}: {
  statement: Statement;
  reporting: Reporting;
}) {
  const { withBasis } = useBasis();
  const { totals } = statement;
  if (!totals || totals.contributions.length < 2) return null;
  const liquid = liquidOf(statement, reporting);
  const total = totals.trialByTrial.condensateRecoverableStb;
  const fields = [...totals.contributions].sort((a, b) => b.shareOfVariance - a.shareOfVariance);
  const named = fields.slice(0, NAMED);
  const rest = fields.slice(NAMED);
  const others = rest.length > 0 ? sumOf(rest) : null;

  return (
    <Section
      title={contributionTitle(totals.contributions, total)}
      note={`What each field brings on average when the portfolio comes out at its own P90, P50 and P10, ${liquid.unit}, so that each column adds up. Ordered by share of the variance; ± is one standard error of sampling alone.`}
    >
      <StackedTotals
        label={`What fields bring to the portfolio’s ${liquid.name}`}
        rows={percentiles.map((key) => ({
          label: key.toUpperCase(),
          total: formatFigure(total[key] * liquid.perStb),
          parts: [
            ...named.map((field) => ({ name: field.name, value: field[key] })),
            ...(others ? [{ name: `${rest.length} others`, value: others[key] }] : []),
          ],
        }))}
      />
      <LedgerTable caption={`Contributions to the portfolio’s ${liquid.name}, ${liquid.unit}`}>
        <thead>
          <tr>
            <FolioCell heading>Line</FolioCell>
            <ColumnHeading>Field</ColumnHeading>
            {percentiles.map((key) => (
              <ColumnHeading key={key} align="right">
                At {key.toUpperCase()}
              </ColumnHeading>
            ))}
            <ColumnHeading align="right">Of variance</ColumnHeading>
          </tr>
        </thead>
        <tbody>
          {named.map((field, index) => (
            <tr key={field.fieldId}>
              <FolioCell>{index + 1}</FolioCell>
              <th scope="row">
                <Link href={withBasis(`/fields/${field.slug}`)}>{field.name}</Link>
              </th>
              {percentiles.map((key) => (
                <td key={key} className="right">
                  <Figure value={field[key] * liquid.perStb} />
                  {field.standardErrors && (
                    <small className="block text-ink-soft">
                      <span aria-hidden="true">±</span>
                      <span className="sr-only">plus or minus </span>
                      <Figure value={field.standardErrors[key] * liquid.perStb} digits={2} />
                    </small>
                  )}
                </td>
              ))}
              <td className="right strong">{formatPercent(field.shareOfVariance)}</td>
            </tr>
          ))}
          {others && (
            <tr>
              <FolioCell />
              <td className="wrap">{capital(numberWords(rest.length))} others together</td>
              {percentiles.map((key) => (
                <FigureCell key={key} value={others[key] * liquid.perStb} />
              ))}
              <td className="right">{formatPercent(others.shareOfVariance)}</td>
            </tr>
          )}
        </tbody>
        <tfoot>
          <TotalRow>
            <FolioCell />
            <th scope="row">Portfolio</th>
            {percentiles.map((key) => (
              <FigureCell key={key} value={total[key] * liquid.perStb} />
            ))}
            <td className="right">{formatPercent(1)}</td>
          </TotalRow>
        </tfoot>
      </LedgerTable>
    </Section>
  );
}

type Part = Pick<ContributionView, "shareOfVariance" | "p90" | "p50" | "p10">;

const sumOf = (fields: readonly Part[]): Part => {
  const of = (key: keyof Part) => fields.reduce((sum, field) => sum + field[key], 0);
  return {
    shareOfVariance: of("shareOfVariance"),
    p90: of("p90"),
    p50: of("p50"),
    p10: of("p10"),
  };
};
