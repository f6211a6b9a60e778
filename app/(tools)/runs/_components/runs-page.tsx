"use client";

import Link from "next/link";
import { useState } from "react";

import { ReadError } from "@/app/_client/read-error";
import { useCan } from "@/app/_client/use-session";
import type { RunView } from "@/app/api/v1/runs/schema";
import { Button } from "@/components/ui/button";
import { formatDate } from "@/components/ui/format";
import { Page, PageHead, Section, Stack } from "@/components/ui/section";
import { EmptyState, Skeleton } from "@/components/ui/status";
import { LedgerTable } from "@/components/ui/table";
import { RUNS_PER_PAGE, isUnderWay, lastHeardOf, useRuns } from "../../_queries/runs";
import { Pager } from "./pager";
import { durationWords, estimatesWords, outcomeWords } from "@/components/runs/run-words";
import { StartRunDialog } from "./start-run-dialog";

/** What is being computed in the background, and what was. */
export function RunsPage() {
  const can = useCan();
  const [offset, setOffset] = useState(0);
  const [isStarting, setIsStarting] = useState(false);
  const query = useRuns(offset);
  const { data, error, isPending, refetch } = query;
  const lastHeard = lastHeardOf(query);
  const start = can("run.create") && (
    <Button kind="primary" onClick={() => setIsStarting(true)}>
      Recalculate
    </Button>
  );

  return (
    <Page>
      <PageHead
        title={data ? titleOf(data.items) : "Runs"}
        lead="Long work goes on in the background, on every worker there is. You may leave; a run that is interrupted goes on where it stopped, and no estimate is computed twice."
        actions={data && data.items.length > 0 && start}
      />
      <Stack>
        {isPending && <Skeleton lines={6} label="Loading the runs" />}
        {error && (
          <ReadError error={error} onRetry={refetch}>
            {lastHeard
              ? `The list is as it was when last heard, ${formatDate(lastHeard, "clock")} UTC. What was done is kept.`
              : "The list could not be read. What was done is kept."}
          </ReadError>
        )}
        {data?.items.length === 0 && (
          <EmptyState title="Nothing has been computed in the background yet" action={start}>
            Recalculate the book to see whether today’s engine repeats what was approved. Imports
            and runs until settled are listed here too.
          </EmptyState>
        )}
        {data && data.items.length > 0 && (
          <Section title="Every run" note="Newest first.">
            <RunTable runs={lastHeard ? data.items.map(withoutPace) : data.items} />
            <Pager {...data} noun="runs" step={RUNS_PER_PAGE} onPage={setOffset} />
          </Section>
        )}
      </Stack>
      {isStarting && <StartRunDialog onClose={() => setIsStarting(false)} />}
    </Page>
  );
}

function titleOf(runs: readonly RunView[]): string {
  const underWay = runs.filter(isUnderWay);
  if (underWay.length === 0) return "Nothing is running";
  const left = underWay.reduce((sum, { counts }) => sum + counts.waiting + counts.running, 0);
  return `${estimatesWords(left)} still to compute in ${underWay.length === 1 ? "one run" : `${underWay.length} runs`}`;
}

/** Nobody knows how long a run still takes while the server is silent. */
const withoutPace = (run: RunView): RunView => ({ ...run, remainingSeconds: null });

const tookWords = ({ startedAt, finishedAt }: RunView) =>
  startedAt && finishedAt
    ? durationWords((Date.parse(finishedAt) - Date.parse(startedAt)) / 1000)
    : "–";

function RunTable({ runs }: { runs: readonly RunView[] }) {
  return (
    <LedgerTable caption="Runs, newest first" framed className="stacking-table">
      <thead>
        <tr>
          <th scope="col">Run</th>
          <th scope="col">Outcome</th>
          <th scope="col" className="right">
            Took
          </th>
          <th scope="col">By</th>
          <th scope="col">Begun</th>
        </tr>
      </thead>
      <tbody>
        {runs.map((run) => (
          <tr key={run.id}>
            <th scope="row" className="wrap">
              <Link href={`/runs/${run.id}`}>{run.title}</Link>
            </th>
            <td className="wrap">
              {run.stalled || run.counts.failed > 0 ? (
                <b>{outcomeWords(run)}</b>
              ) : (
                outcomeWords(run)
              )}
            </td>
            <td className="right" data-label="Took">
              {tookWords(run)}
            </td>
            <td data-label="By">{run.createdBy?.name ?? "–"}</td>
            <td data-label="Begun">{formatDate(run.createdAt, "time")} UTC</td>
          </tr>
        ))}
      </tbody>
    </LedgerTable>
  );
}
