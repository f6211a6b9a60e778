"use client";

import Link from "next/link";
import { rankedClasses, type RankedClass } from "@/analytics/portfolio/ranking";
import type { Statement } from "@/app/api/v1/portfolio/schema";
import { useBasis } from "@/components/basis/use-basis";
import { RangeMark, RangeScale } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { capital, type Reporting } from "@/components/portfolio/reporting";
import { formatPercent } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { ColumnHeading, FigureCell, LedgerTable, MarkCell, TotalRow } from "@/components/ui/table";
import { liquidOf } from "./liquid";

/** Where the liquid lies: basins against PRMS classes. */
export function BasinSection({
  statement,
  reporting,
}: {
  statement: Statement;
  reporting: Reporting;
}) {
  const { withBasis } = useBasis();
  const { basins } = statement;
  const liquid = liquidOf(statement, reporting);
  const classes = rankedClasses.filter((name) =>
    basins.some((basin) => basin.condensateMeanStbByClass[name] !== null),
  );
  const rows = basins.map((basin) => ({ ...basin, range: liquid.rangeOf(basin.ranges) }));
  const scale = scaleFor(
    rows.flatMap(({ range }) => [range.p90, range.p10]),
    { kind: "linear" },
  );
  const classMean = (name: RankedClass) =>
    basins.reduce((sum, basin) => sum + (basin.condensateMeanStbByClass[name] ?? 0), 0) *
    liquid.perStb;

  return (
    <Section
      title={findingOf(basins)}
      note={
        <>
          Mean {liquid.name}, {liquid.unit}, by basin and PRMS class. Variance: its share, by
          covariance with the total.
          <span className="hidden phone:inline"> Classes have columns on a wider screen.</span>
        </>
      }
    >
      <LedgerTable caption={`Mean ${liquid.name} by basin and class`} density="executive">
        <thead>
          <tr>
            <ColumnHeading>Basin</ColumnHeading>
            {classes.map((name) => (
              <ColumnHeading key={name} align="right" className="hide-phone">
                {capital(name)}
              </ColumnHeading>
            ))}
            <ColumnHeading align="right">Total</ColumnHeading>
            <ColumnHeading align="right">Variance</ColumnHeading>
            <ColumnHeading mark>
              <RangeScale scale={scale} ticks={3} />
            </ColumnHeading>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ slug, name, range, shareOfVariance, condensateMeanStbByClass }) => (
            <tr key={slug}>
              <th scope="row">
                <Link href={withBasis(`/fields?basin=${slug}`)}>{name}</Link>
              </th>
              {classes.map((prmsClass) => {
                const mean = condensateMeanStbByClass[prmsClass];
                return (
                  <FigureCell
                    key={prmsClass}
                    value={mean === null ? null : mean * liquid.perStb}
                    className="hide-phone"
                  />
                );
              })}
              <FigureCell value={range.mean} strong />
              <td className="right">{formatPercent(shareOfVariance)}</td>
              <MarkCell>
                <RangeMark
                  name={`${name} ${liquid.name}`}
                  range={range}
                  unit={liquid.unit}
                  scale={scale}
                  ticks={3}
                  tipSide="right"
                />
              </MarkCell>
            </tr>
          ))}
        </tbody>
        <tfoot>
          <TotalRow>
            <th scope="row">All</th>
            {classes.map((name) => (
              <FigureCell key={name} value={classMean(name)} className="hide-phone" />
            ))}
            <FigureCell value={classes.reduce((sum, name) => sum + classMean(name), 0)} />
            <td className="right">{formatPercent(1)}</td>
            <td className="mark" />
          </TotalRow>
        </tfoot>
      </LedgerTable>
    </Section>
  );
}

/** "Saltmarrow leads; 63 % of Corrith is not yet reserves", whatever of it is true. */
function findingOf(basins: Statement["basins"]): string {
  const [leader] = basins;
  if (!leader) return "By basin and class";
  const means = basins.map((basin) => {
    const total = basin.ranges.condensateRecoverableStb.mean;
    return {
      name: basin.name,
      total,
      open: total - (basin.condensateMeanStbByClass.reserves ?? 0),
    };
  });
  const sum = means.reduce((all, { total }) => all + total, 0);
  const lead =
    basins.length > 1
      ? `${leader.name} leads with ${formatPercent(means[0].total / sum)}`
      : `All of it lies in ${leader.name}`;
  const most = means.reduce((best, basin) => (basin.open > best.open ? basin : best));
  if (most.total <= 0 || most.open / most.total < 0.005) return `${lead}; all of it is reserves`;
  const where = most.name === leader.name ? "it" : most.name;
  return `${lead}; ${formatPercent(most.open / most.total)} of ${where} is not yet reserves`;
}
