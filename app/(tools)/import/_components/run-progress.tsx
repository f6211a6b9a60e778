import type { ImportDetail } from "@/app/api/v1/imports/schema";
import { Section } from "@/components/ui/section";
import { Notice, Progress } from "@/components/ui/status";
import { LedgerTable } from "@/components/ui/table";
import { rowsWords } from "./import-words";

/** How far the simulations of the taken rows are, and which could not be run. */
export function RunProgress({ file }: { file: ImportDetail }) {
  const { runs, state, rowsApplied, rowsBad, rowsUnchanged } = file;
  const left = [
    rowsUnchanged > 0 && `${rowsWords(rowsUnchanged)} unchanged`,
    rowsBad > 0 && `${rowsWords(rowsBad)} left out`,
  ].filter(Boolean);
  return (
    <div className="grid grid-cols-1 gap-3">
      {state === "applying" && (
        <Progress
          label="Running the simulations"
          fraction={runs.total === 0 ? 1 : runs.done / runs.total}
          detail={`${runs.done} of ${runs.total}`}
          note="The rows are in the book already. You may leave this page; the runs go on."
        />
      )}
      {runs.waiting && (
        <Notice tone="info" title="The runs are waiting for the worker process.">
          It is away or busy with other work. Nothing is lost: they start as soon as it is there.
        </Notice>
      )}
      {state === "applied" && (
        <Notice
          tone="success"
          title={
            rowsApplied > 0
              ? `${rowsWords(rowsApplied)} taken as drafts.`
              : "The book had all of it already."
          }
        >
          {left.length > 0 && `${left.join(", ")}. `}
          {rowsApplied > 0 && "Open a reservoir below to look at its results and submit it."}
        </Notice>
      )}
      {runs.failed.length > 0 && (
        <Section
          title={`${rowsWords(runs.failed.length)} could not be run`}
          note="Their drafts are kept, without results."
        >
          <LedgerTable caption="Rows that could not be run">
            <thead>
              <tr>
                <th scope="col" className="right">
                  Line
                </th>
                <th scope="col">Reservoir</th>
                <th scope="col">Reason</th>
              </tr>
            </thead>
            <tbody>
              {runs.failed.map(({ line, reservoir, reason }) => (
                <tr key={line}>
                  <td className="right">{line}</td>
                  <th scope="row">{reservoir}</th>
                  <td className="wrap min-w-56">{reason}</td>
                </tr>
              ))}
            </tbody>
          </LedgerTable>
        </Section>
      )}
    </div>
  );
}
