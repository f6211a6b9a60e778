"use client";

import Link from "next/link";
import { errorWords } from "@/app/_client/request";
import { reportingUnits } from "@/analytics/units/reporting-units";
import { formatPercent } from "@/components/ui/format";
import { Notice, Skeleton } from "@/components/ui/status";
import { ColumnHeading, FigureCell, LedgerTable } from "@/components/ui/table";
import { useRunItems } from "../../_queries/runs";

const condensate = reportingUnits("field", "14.696").condensate;

/** The doublings of a run until settled: what each knew, and how well. */
export function SettlingSteps({ id, live }: { id: string; live: boolean }) {
  const { data, error } = useRunItems(id, "all", 0, live);
  if (error) return <Notice tone="error" title={errorWords(error)} />;
  const item = data?.items[0];
  if (!item) return <Skeleton lines={5} label="Loading the steps" />;
  const { field, reservoir, outcome, progress, reason } = item;
  const place = (
    <Link href={`/fields/${field.slug}/${reservoir.slug}`}>
      {field.name}, {reservoir.name}
    </Link>
  );

  return (
    <div className="grid grid-cols-1 gap-3">
      {outcome && (
        <Notice
          tone={outcome.settled ? "success" : "warning"}
          title={
            outcome.settled
              ? `Settled after ${outcome.trials.toLocaleString("en-GB")} trials.`
              : `Not settled after ${outcome.trials.toLocaleString("en-GB")} trials, the most allowed.`
          }
        >
          The results are those of {place}, revision {item.revision}.
        </Notice>
      )}
      {reason && <Notice title={reason}>{place} keeps the results it had.</Notice>}
      {!progress || progress.length === 0 ? (
        <p className="text-13 text-ink-soft">No step is done yet: {place}.</p>
      ) : (
        <LedgerTable caption="Steps of the run" framed>
          <thead>
            <tr>
              <ColumnHeading align="right">Trials</ColumnHeading>
              <ColumnHeading align="right" unit="half-width">
                Least known
              </ColumnHeading>
              <ColumnHeading align="right" unit={condensate.unit}>
                P90
              </ColumnHeading>
              <ColumnHeading align="right">P50</ColumnHeading>
              <ColumnHeading align="right">P10</ColumnHeading>
            </tr>
          </thead>
          <tbody>
            {progress.map(({ trials, worst, condensateRecoverableStb: range }) => (
              <tr key={trials}>
                <th scope="row" className="right">
                  {trials.toLocaleString("en-GB")}
                </th>
                <td className="right">±{formatPercent(worst, { decimals: 2 })}</td>
                <FigureCell value={range.p90 * condensate.factor} digits={4} />
                <FigureCell value={range.p50 * condensate.factor} digits={4} />
                <FigureCell value={range.p10 * condensate.factor} digits={4} />
              </tr>
            ))}
          </tbody>
        </LedgerTable>
      )}
    </div>
  );
}
