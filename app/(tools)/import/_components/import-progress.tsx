"use client";

import type { ImportDetail } from "@/app/api/v1/imports/schema";
import { RunProgress } from "@/components/runs/run-progress";
import { Section } from "@/components/ui/section";
import { Notice } from "@/components/ui/status";
import { LedgerTable } from "@/components/ui/table";
import { RunAction } from "../../_components/run-action";
import { lastHeardOf, useRun } from "../../_queries/runs";
import { rowsWords } from "./import-words";

/** How far the run of the taken rows is, with a way to stop it, and which rows could not be run. */
export function ImportProgress({ file }: { file: ImportDetail }) {
  const { runs, state, rowsApplied, rowsBad, rowsUnchanged } = file;
  const query = useRun(state === "applying" || runs.failed.length > 0 ? runs.id : null);
  const run = query.data;
  const left = [
    rowsUnchanged > 0 && `${rowsWords(rowsUnchanged)} unchanged`,
    rowsBad > 0 && `${rowsWords(rowsBad)} left out`,
  ].filter(Boolean);
  return (
    <div className="grid grid-cols-1 gap-3">
      {state === "applying" && run && (
        <RunProgress
          run={run}
          label="Running the simulations"
          lastHeard={lastHeardOf(query)}
          note="The rows are in the book already. You may leave this page; the runs go on."
          action={<RunAction run={run} action="cancel" />}
        />
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
          tools={run && <RunAction run={run} action="retry" />}
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
