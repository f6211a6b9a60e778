"use client";

import Link from "next/link";
import type { Statement } from "@/app/api/v1/portfolio/schema";
import { useBasis } from "@/components/basis/use-basis";
import { ConcentrationBar } from "@/components/charts/concentration-bar";
import { RangeMark, RangeScale, rangePhrase } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { RouteFlag } from "@/components/estimate/route-flag";
import { capital, countOf, numberWords, type Reporting } from "@/components/portfolio/reporting";
import { formatFigure, formatPercent } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import {
  ColumnHeading,
  FigureCell,
  FolioCell,
  LedgerTable,
  MarkCell,
  TotalRow,
} from "@/components/ui/table";
import { liquidOf } from "./liquid";

const FIRST = 5;

/** The fields that carry most of the liquid, and how much they carry together. */
export function ConcentrationSection({
  statement,
  reporting,
}: {
  statement: Statement;
  reporting: Reporting;
}) {
  const { withBasis } = useBasis();
  const { fields, others, shares, totals } = statement;
  if (!totals) return null;
  const liquid = liquidOf(statement, reporting);
  const total = liquid.rangeOf(totals.trialByTrial);
  const rows = fields.flatMap(({ slug, name, basin, ranges, recoveryRoute }) =>
    ranges ? [{ slug, name, basin, recoveryRoute, range: liquid.rangeOf(ranges) }] : [],
  );
  const rest = others && { ...others, range: liquid.rangeOf(others.trialByTrial) };
  const scale = scaleFor(
    [...rows.map(({ range }) => range), ...(rest ? [rest.range] : [])].flatMap(({ p90, p10 }) => [
      p90,
      p10,
    ]),
    { kind: "linear" },
  );
  const sum = shares.reduce((all, { condensateMeanStb }) => all + condensateMeanStb, 0);
  const parts = shares.map(({ name, condensateMeanStb }) => ({
    name,
    share: sum > 0 ? condensateMeanStb / sum : 0,
  }));
  const shareOf = (count: number) =>
    parts.slice(0, count).reduce((all, { share }) => all + share, 0);
  const first = Math.min(FIRST, parts.length);

  return (
    <Section
      title={`${capital(countOf(first, "field"))} ${first === 1 ? "carries" : "carry"} ${formatPercent(shareOf(first))} of the ${liquid.isMoney ? "liquid value" : "liquid"}`}
      note={`Mean ${liquid.name}, ${liquid.unit}, ${reporting.words}. Marks: P90 to P10 on one scale.`}
    >
      <ConcentrationBar
        label={`Share of the ${liquid.name} by field`}
        parts={parts}
        bands={bandsOf(parts.length)}
      />
      <LedgerTable
        caption={`Fields by mean ${liquid.name}, ${liquid.unit}`}
        density="executive"
        className="concentration-table"
      >
        <thead>
          <tr>
            <FolioCell heading>Rank</FolioCell>
            <ColumnHeading>Field</ColumnHeading>
            <ColumnHeading className="hide-phone">Basin</ColumnHeading>
            <ColumnHeading align="right">Mean</ColumnHeading>
            <ColumnHeading mark>
              <RangeScale scale={scale} />
            </ColumnHeading>
            <ColumnHeading align="right">Running</ColumnHeading>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ slug, name, basin, range, recoveryRoute }, index) => (
            <tr key={slug}>
              <FolioCell>{index + 1}</FolioCell>
              <th scope="row">
                <Link href={withBasis(`/fields/${slug}`)}>{name}</Link>
                <RouteFlag route={recoveryRoute} short />
              </th>
              <td className="soft hide-phone">{basin.name}</td>
              <FigureCell value={range.mean} strong />
              <MarkCell>
                <RangeMark
                  name={`${name} ${liquid.name}`}
                  range={range}
                  unit={liquid.unit}
                  scale={scale}
                />
              </MarkCell>
              <td className="right">{formatPercent(shareOf(index + 1))}</td>
            </tr>
          ))}
          {rest && (
            <tr>
              <FolioCell />
              <td className="wrap">{capital(numberWords(rest.fields))} others together</td>
              <td className="hide-phone" />
              <FigureCell value={rest.range.mean} />
              <MarkCell>
                <RangeMark
                  name={`${rest.fields} others together`}
                  range={rest.range}
                  unit={liquid.unit}
                  scale={scale}
                />
              </MarkCell>
              <td className="right">{formatPercent(1)}</td>
            </tr>
          )}
        </tbody>
        <tfoot>
          <TotalRow>
            <FolioCell />
            <th scope="row">Portfolio</th>
            <td className="hide-phone" />
            <FigureCell value={total.mean} />
            <td className="mark soft" colSpan={2} title={`Mean ${formatFigure(total.mean)}`}>
              {rangePhrase(total)}
            </td>
          </TotalRow>
        </tfoot>
      </LedgerTable>
    </Section>
  );
}

/** "five fields", "next five", "twelve" */
function bandsOf(count: number): { count: number; label: string }[] {
  const first = Math.min(FIRST, count);
  const next = Math.min(FIRST, count - first);
  const rest = count - first - next;
  return [
    { count: first, label: countOf(first, "field") },
    ...(next > 0 ? [{ count: next, label: `next ${numberWords(next)}` }] : []),
    ...(rest > 0 ? [{ count: rest, label: numberWords(rest) }] : []),
  ];
}
