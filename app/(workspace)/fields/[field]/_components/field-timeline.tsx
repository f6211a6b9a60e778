"use client";

import Link from "next/link";
import type { FieldFileView } from "@/app/api/v1/fields/file-schema";
import { useBasis } from "@/components/basis/use-basis";
import { RangeMark, RangeScale } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { resultBasisOf, resultFactor, resultUnit, scaled } from "@/components/estimate/result-rows";
import { capital, countOf } from "@/components/portfolio/reporting";
import { formatDate, fractionDigits } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { ColumnHeading, FigureCell, LedgerTable } from "@/components/ui/table";
import { StateMark } from "@/components/ui/text";

const name = "condensateRecoverableStb";

/** Every revision of every reservoir by its date, newest first, with its P50 and mean on one scale. */
export function FieldTimeline({ file }: { file: FieldFileView }) {
  const { basis, withBasis } = useBasis();
  const resultBasis = resultBasisOf(basis, file.field);
  const factor = resultFactor(name, resultBasis);
  const unit = resultUnit(name, resultBasis);
  const events = file.reservoirs
    .flatMap((reservoir) =>
      reservoir.revisions.map((revision) => ({
        reservoir,
        revision,
        at: revision.decidedAt ?? revision.submittedAt ?? revision.createdAt,
        range: revision[name] && scaled(revision[name], factor),
      })),
    )
    .sort((a, b) => b.at.localeCompare(a.at));
  if (events.length === 0) return null;
  const scale = scaleFor(
    events.flatMap(({ range }) => (range ? [range.p90, range.p10, range.mean] : [])),
  );
  const digits = fractionDigits(events.map(({ range }) => range?.p50));
  const meanDigits = fractionDigits(events.map(({ range }) => range?.mean));
  return (
    <Section
      title={`${capital(countOf(events.length, "revision"))} since ${formatDate(events.at(-1)?.at, "month")}`}
      note={`Condensate to the tank, ${unit}, each as it was run. ${resultBasis.words}.`}
    >
      <LedgerTable caption="History of the field" framed className="stacked-rows stacked-p50">
        <thead>
          <tr>
            <ColumnHeading>Date</ColumnHeading>
            <ColumnHeading>Reservoir</ColumnHeading>
            <ColumnHeading>Revision</ColumnHeading>
            <ColumnHeading className="hide-phone">What was new</ColumnHeading>
            <ColumnHeading align="right">P50</ColumnHeading>
            <ColumnHeading align="right" className="hide-phone">
              Mean
            </ColumnHeading>
            <ColumnHeading mark>
              <span className="sr-only">Range</span>
              <RangeScale scale={scale} />
            </ColumnHeading>
          </tr>
        </thead>
        <tbody>
          {events.map(({ reservoir, revision, at, range }) => (
            <tr key={revision.estimateId}>
              <td className="stacked-note">{formatDate(at)}</td>
              <th scope="row" className="wrap">
                <Link href={withBasis(`/fields/${file.field.slug}/${reservoir.slug}/history`)}>
                  {reservoir.name}
                </Link>
              </th>
              <td className="stacked-aside">
                <StateMark state={revision.state} revision={revision.revision} worded />
              </td>
              <td className="wrap hide-phone">
                {revision.note}
                <small className="block text-ink-soft">
                  {revision.decider
                    ? `${revision.creator}; decided by ${revision.decider}`
                    : revision.creator}
                </small>
              </td>
              <FigureCell value={range?.p50} fraction={digits} strong />
              <FigureCell value={range?.mean} fraction={meanDigits} className="hide-phone" />
              <td className="mark">
                {range ? (
                  <RangeMark
                    name={`${reservoir.name} r${revision.revision}`}
                    range={range}
                    unit={unit}
                    scale={scale}
                    tone={revision.state === "superseded" ? "soft" : "condensate"}
                    tipSide="right"
                  />
                ) : (
                  <span className="no-mark">Not run</span>
                )}
              </td>
            </tr>
          ))}
        </tbody>
      </LedgerTable>
    </Section>
  );
}
