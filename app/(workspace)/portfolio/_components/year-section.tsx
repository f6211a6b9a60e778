"use client";

import Link from "next/link";
import type { Statement } from "@/app/api/v1/portfolio/schema";
import { useBasis } from "@/components/basis/use-basis";
import { Bridge } from "@/components/charts/bridge";
import { ChartFrame } from "@/components/charts/chart-frame";
import { capital, moneyWords, numberWords, type Reporting } from "@/components/portfolio/reporting";
import { formatDate, formatFigure } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { ColumnHeading, LedgerTable, TotalRow } from "@/components/ui/table";
import { liquidOf } from "./liquid";

type Year = NonNullable<Statement["year"]>;

interface PartProps {
  statement: Statement;
  reporting: Reporting;
  year: Year;
}

const NAMED = 6;

const sumOf = (moves: Year["moves"]) => moves.reduce((sum, { changeStb }) => sum + changeStb, 0);

/** The fields whose estimates moved the mean most in a year. */
export function MoversSection({ statement, reporting, year }: PartProps) {
  const { withBasis } = useBasis();
  const liquid = liquidOf(statement, reporting);
  const revised = year.moves.filter(({ isNew }) => !isNew);
  const added = year.moves.filter(({ isNew }) => isNew);
  const named = revised.slice(0, NAMED);
  const rest = revised.slice(NAMED);
  const cell = (stb: number) => (
    <td
      className="right strong"
      style={stb > 0 ? { color: "var(--positive)" } : undefined}
      title={`${formatFigure(stb * liquid.perStb, { digits: 6, signed: true })} ${liquid.unit}`}
    >
      {formatFigure(stb * liquid.perStb, { signed: true })}
    </td>
  );
  return (
    <Section
      title="What moved most"
      note={`Change in mean ${liquid.name}, ${liquid.unit}, from estimates revised since ${formatDate(year.since)}`}
    >
      {year.moves.length === 0 ? (
        <p className="text-13 text-ink-soft">No estimate has changed since then.</p>
      ) : (
        <LedgerTable caption={`Change in mean ${liquid.name} by field`} density="executive">
          <thead className="sr-only">
            <tr>
              <ColumnHeading>Field</ColumnHeading>
              <ColumnHeading align="right">Change</ColumnHeading>
            </tr>
          </thead>
          <tbody>
            {named.map(({ slug, name, changeStb }) => (
              <tr key={slug}>
                <th scope="row">
                  <Link href={withBasis(`/fields/${slug}`)}>{name}</Link>
                </th>
                {cell(changeStb)}
              </tr>
            ))}
            {rest.length > 0 && (
              <tr>
                <td>{capital(numberWords(rest.length))} others, net</td>
                {cell(sumOf(rest))}
              </tr>
            )}
            {added.length > 0 && (
              <tr>
                <td className="wrap">
                  {capital(numberWords(added.length))} new:{" "}
                  {added
                    .slice(0, 4)
                    .map(({ name }) => name)
                    .join(", ")}
                  {added.length > 4 && ` and ${numberWords(added.length - 4)} more`}
                </td>
                {cell(sumOf(added))}
              </tr>
            )}
          </tbody>
          <tfoot>
            <TotalRow>
              <th scope="row">All fields</th>
              {cell(sumOf(year.moves))}
            </TotalRow>
          </tfoot>
        </LedgerTable>
      )}
    </Section>
  );
}

/** From the mean of a year ago to that of now, in steps that add exactly because means do. */
export function YearBridge({ statement, reporting, year }: PartProps) {
  const liquid = liquidOf(statement, reporting);
  if (year.moves.length === 0) return null;
  const revised = year.moves.filter(({ isNew }) => !isNew);
  const steps = [
    { label: "Raised", change: sumOf(revised.filter(({ changeStb }) => changeStb > 0)) },
    { label: "Lowered", change: sumOf(revised.filter(({ changeStb }) => changeStb < 0)) },
    { label: "New fields", change: sumOf(year.moves.filter(({ isNew }) => isNew)) },
  ]
    .filter(({ change }) => change !== 0)
    .map(({ label, change }) => ({ label, change: change * liquid.perStb }));
  const before = year.condensateMeanBeforeStb * liquid.perStb;
  const change = sumOf(year.moves) * liquid.perStb;
  const size = liquid.isMoney
    ? moneyWords(Math.abs(change) / reporting.money.factor, reporting.currency)
    : `${formatFigure(Math.abs(change))} ${liquid.unit}`;
  const since = formatDate(year.since);

  return (
    <ChartFrame
      title={`${change < 0 ? "Down" : "Up"} ${size} on the estimates of a year ago`}
      note={`Estimates in force on ${since} against those of now, at today’s interests, chances and prices. Means add, so each step is exact.`}
      fileName="portfolio-liquid-year"
      data={{
        columns: [{ label: "Step" }, { label: `Mean ${liquid.name}`, unit: liquid.unit }],
        rows: [
          [since, before],
          ...steps.map((step) => [step.label, step.change]),
          ["Now", before + change],
        ],
      }}
    >
      <Bridge
        quantity={`Mean ${liquid.name}, ${liquid.unit}`}
        from={{ label: since, value: before }}
        steps={steps}
        to={{ label: "Now", value: before + change }}
      />
    </ChartFrame>
  );
}
