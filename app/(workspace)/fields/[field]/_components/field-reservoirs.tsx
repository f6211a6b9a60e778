"use client";

import Link from "next/link";
import { useCan } from "@/app/_client/use-session";
import type { FieldFileView, RevisionRangeView } from "@/app/api/v1/fields/file-schema";
import { useBasis } from "@/components/basis/use-basis";
import { RangeMark, RangeScale } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { resultBasisOf, resultFactor, resultUnit, scaled } from "@/components/estimate/result-rows";
import { RouteFlag } from "@/components/estimate/route-flag";
import { countOf, capital } from "@/components/portfolio/reporting";
import { Button } from "@/components/ui/button";
import { fractionDigits, MISSING } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { EmptyState } from "@/components/ui/status";
import {
  ArithmeticRow,
  ColumnHeading,
  FigureCell,
  LedgerTable,
  TotalRow,
} from "@/components/ui/table";
import { StateMark } from "@/components/ui/text";
import type { Range } from "@/analytics/volumetrics/results-schema";

const name = "condensateRecoverableStb";
const levels = ["p90", "p50", "p10", "mean"] as const;

/** Reservoirs with their marks on one scale, closed by the total trial by trial and the sum that it is not. */
export function FieldReservoirs({ file, onAdd }: { file: FieldFileView; onAdd: () => void }) {
  const { basis, withBasis } = useBasis();
  const can = useCan();
  const resultBasis = resultBasisOf(basis, file.field);
  const factor = resultFactor(name, resultBasis);
  const unit = resultUnit(name, resultBasis);

  if (file.reservoirs.length === 0) {
    return (
      <EmptyState
        title="No reservoir yet"
        action={
          can("reservoir.create") && (
            <Button kind="primary" onClick={onAdd}>
              Add the first reservoir
            </Button>
          )
        }
      >
        A field is estimated reservoir by reservoir: each has its rock, its fluid and its ranges.
      </EmptyState>
    );
  }
  const rows = file.reservoirs.map((reservoir) => {
    const chosen = chosenRevision(reservoir.revisions, basis.estimates);
    const range = chosen?.[name] ? scaled(chosen[name], factor) : null;
    return { ...reservoir, chosen, range };
  });
  // Trial by trial, with interest and chance applied on the server.
  const total =
    file.ranked.ranges && scaled(file.ranked.ranges[name], factor / (resultBasis.factor || 1));
  const summed = sumOf(rows.flatMap(({ range }) => (range ? [range] : [])));
  const shown = [...rows.map(({ range }) => range), total, summed];
  const scale = scaleFor(
    shown.flatMap((range) => (range ? [range.p90, range.p10, range.mean] : [])),
  );
  const digits = Object.fromEntries(
    levels.map((level) => [level, fractionDigits(shown.map((range) => range?.[level]))]),
  ) as Record<(typeof levels)[number], number>;
  const isSeveral = rows.filter(({ range }) => range).length > 1;

  return (
    <Section
      title={titleOf(file, rows.filter(({ range }) => range).length)}
      note={`Condensate to the tank, ${unit}. ${resultBasis.words}.`}
    >
      <LedgerTable caption="Reservoirs of the field" framed className="stacked-rows">
        <thead>
          <tr>
            <ColumnHeading>Reservoir</ColumnHeading>
            <ColumnHeading>Estimate</ColumnHeading>
            <ColumnHeading align="right" className="hide-phone">
              Depth
            </ColumnHeading>
            {levels.map((level) => (
              <ColumnHeading
                key={level}
                align="right"
                className={level === "mean" ? "hide-phone" : ""}
              >
                {level === "mean" ? "Mean" : level.toUpperCase()}
              </ColumnHeading>
            ))}
            <ColumnHeading mark>
              <span className="sr-only">Range</span>
              <RangeScale scale={scale} />
            </ColumnHeading>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ id, slug, name: reservoirName, depthFt, chosen, range, revisions }) => (
            <tr key={id}>
              <th scope="row" className="wrap">
                <Link href={withBasis(`/fields/${file.field.slug}/${slug}`)}>{reservoirName}</Link>{" "}
                <RouteFlag route={chosen?.recoveryRoute} short />
              </th>
              <td className="stacked-aside">
                {chosen ? <StateMark state={chosen.state} revision={chosen.revision} /> : MISSING}
                <OpenState revisions={revisions} chosen={chosen} />
              </td>
              <td className="stacked-aside right hide-phone">
                {depthFt === null ? MISSING : `${depthFt.toLocaleString("en-US")} ft`}
              </td>
              {levels.map((level) => (
                <FigureCell
                  key={level}
                  value={range?.[level]}
                  fraction={digits[level]}
                  strong={level === "p50"}
                  className={level === "mean" ? "hide-phone" : undefined}
                />
              ))}
              <td className="mark">
                {range ? (
                  <RangeMark
                    name={reservoirName}
                    range={range}
                    unit={unit}
                    scale={scale}
                    tipSide="right"
                  />
                ) : (
                  <span className="no-mark">
                    No {basis.estimates === "approved" ? "approved " : ""}estimate
                  </span>
                )}
              </td>
            </tr>
          ))}
          {total && (
            <TotalRow>
              <th scope="row">The field, trial by trial</th>
              <td />
              <td className="hide-phone" />
              {levels.map((level) => (
                <FigureCell
                  key={level}
                  value={total[level]}
                  fraction={digits[level]}
                  className={level === "mean" ? "hide-phone" : undefined}
                />
              ))}
              <td className="mark">
                <RangeMark
                  name={file.field.name}
                  range={total}
                  unit={unit}
                  scale={scale}
                  tipSide="right"
                />
              </td>
            </TotalRow>
          )}
          {isSeveral && (
            <ArithmeticRow>
              <th scope="row">Arithmetic sum, for comparison</th>
              <td />
              <td className="hide-phone" />
              {levels.map((level) => (
                <FigureCell
                  key={level}
                  value={summed?.[level]}
                  fraction={digits[level]}
                  className={level === "mean" ? "hide-phone" : undefined}
                />
              ))}
              <td className="mark" />
            </ArithmeticRow>
          )}
        </tbody>
      </LedgerTable>
    </Section>
  );
}

/** The revision that stands for a reservoir on the basis, as the roll-up chooses it. */
function chosenRevision(
  revisions: readonly RevisionRangeView[],
  estimates: "approved" | "latest",
): RevisionRangeView | null {
  const approved = revisions.find(({ state }) => state === "approved") ?? null;
  if (estimates === "approved") return approved;
  return revisions.find((revision) => revision[name] !== null) ?? approved;
}

/** A word for what waits beside the revision that counts. */
function OpenState({
  revisions,
  chosen,
}: {
  revisions: readonly RevisionRangeView[];
  chosen: RevisionRangeView | null;
}) {
  const open = revisions.find(({ state }) => ["draft", "submitted", "returned"].includes(state));
  if (!open || open.estimateId === chosen?.estimateId) return null;
  return <StateMark state={open.state} revision={open.revision} worded />;
}

function sumOf(ranges: readonly Range[]): Range | null {
  if (ranges.length === 0) return null;
  const add = (level: keyof Range) => ranges.reduce((sum, range) => sum + range[level], 0);
  return { p90: add("p90"), p50: add("p50"), p10: add("p10"), mean: add("mean") };
}

function titleOf(file: FieldFileView, counted: number): string {
  const all = capital(countOf(file.reservoirs.length, "reservoir"));
  if (counted === file.reservoirs.length) {
    return file.reservoirs.length === 1 ? "One reservoir" : `${all}, all in the total`;
  }
  return `${all}, ${counted === 0 ? "none" : countOf(counted, "").trim()} in the total`;
}
