"use client";

import type { FieldFileView } from "@/app/api/v1/fields/file-schema";
import { useBasis } from "@/components/basis/use-basis";
import { RangeMark } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { reportingOf, shownRange } from "@/components/portfolio/reporting";
import { formatDate, formatFigure } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { ColumnHeading, FigureCell, LedgerTable } from "@/components/ui/table";
import { Unit } from "@/components/ui/text";

const rows = [
  { key: "wetGasInPlaceScf", label: "Wet gas in place", kind: "gas", tone: "gas" },
  { key: "salesGasScf", label: "Sales gas", kind: "gas", tone: "gas" },
  {
    key: "condensateInPlaceStb",
    label: "Condensate in place",
    kind: "condensate",
    tone: "condensate",
  },
  {
    key: "condensateRecoverableStb",
    label: "Condensate to the tank",
    kind: "condensate",
    tone: "condensate",
  },
  { key: "liquidValue", label: "Liquid value", kind: "money", tone: "ink" },
  { key: "gasValue", label: "Gas value", kind: "money", tone: "ink" },
] as const;

/** What the field comes to on the basis, added up trial by trial. */
export function FieldFigures({ file }: { file: FieldFileView }) {
  const { basis } = useBasis();
  const { ranked, prices } = file;
  const reporting = reportingOf(basis, prices);
  if (!ranked.ranges) {
    return (
      <Section title="Nothing to add up yet">
        <p className="text-13 text-ink-soft">
          Totals appear with the first {basis.estimates === "approved" ? "approved " : ""}estimate.
        </p>
      </Section>
    );
  }
  const ranges = ranked.ranges;
  const priceWords = prices
    ? ` Values: ${prices.deckName} v${prices.deckVersion}, ${formatDate(prices.asOfOn)}, ${prices.case} case${prices.condensatePerStb === null ? "" : `, ${reporting.currency} ${formatFigure(prices.condensatePerStb)} a barrel`}, flat and undiscounted.`
    : " No price deck is published, so there are no values.";
  return (
    <Section
      title="What the field comes to"
      note={`Trial by trial, ${reporting.words}. Each mark on its own scale.${priceWords}`}
    >
      <LedgerTable caption="Totals of the field">
        <thead>
          <tr>
            <ColumnHeading>Quantity</ColumnHeading>
            <ColumnHeading align="right">P90</ColumnHeading>
            <ColumnHeading align="right">P50</ColumnHeading>
            <ColumnHeading align="right">P10</ColumnHeading>
            <ColumnHeading align="right">Mean</ColumnHeading>
            <ColumnHeading mark>P90 to P10</ColumnHeading>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ key, label, kind, tone }) => {
            const shown = reporting[kind];
            const range = ranges[key] && shownRange(ranges[key], shown);
            return (
              <tr key={key}>
                <th scope="row" className="wrap">
                  {label} <Unit>{shown.unit}</Unit>
                </th>
                <FigureCell value={range?.p90} />
                <FigureCell value={range?.p50} strong />
                <FigureCell value={range?.p10} />
                <FigureCell value={range?.mean} />
                <td className="mark">
                  {range ? (
                    <RangeMark
                      name={label}
                      range={range}
                      unit={shown.unit}
                      tone={tone}
                      gridLines={false}
                      scale={scaleFor([range.p90, range.p10, range.mean])}
                      tipSide="right"
                    />
                  ) : (
                    <span className="no-mark">No price</span>
                  )}
                </td>
              </tr>
            );
          })}
        </tbody>
      </LedgerTable>
    </Section>
  );
}
