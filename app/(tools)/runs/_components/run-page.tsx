"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useEffect, useRef } from "react";

import { ReadError } from "@/app/_client/read-error";
import type { RunView } from "@/app/api/v1/runs/schema";

import { formatDate } from "@/components/ui/format";
import { Page, PageHead, Section, Stack } from "@/components/ui/section";
import { Notice, Skeleton } from "@/components/ui/status";
import { isUnderWay, lastHeardOf, useComparison, useRun } from "../../_queries/runs";
import { RunAction } from "../../_components/run-action";
import { RunItems } from "./run-items";
import { RunProgress } from "@/components/runs/run-progress";
import { durationWords, movedNote, runTitle, type Comparison } from "@/components/runs/run-words";
import { SettlingSteps } from "./settling-steps";

const crumbs = [{ label: "Runs", href: "/runs" }, { label: "Run" }];

/** One run: how far it is, what it found, and every estimate of it. */
export function RunPage({ id }: { id: string }) {
  const query = useRun(id);
  const { data: run, error, refetch } = query;
  const { data: comparison } = useComparison(run);
  useRefreshAtEnd(run);

  if (!run) {
    return (
      <Page>
        <PageHead title="Run" crumbs={crumbs} />
        {error ? (
          <ReadError error={error} onRetry={refetch}>
            What the run has done is kept; only this page could not be read.
          </ReadError>
        ) : (
          <Skeleton lines={8} label="Loading the run" />
        )}
      </Page>
    );
  }
  return (
    <Page>
      <PageHead
        title={runTitle(run, comparison ?? null)}
        crumbs={crumbs}
        lead={run.title}
        meta={<RunMeta run={run} />}
        actions={<RunAction run={run} action="retry" />}
      />
      <Stack>
        <RunState run={run} comparison={comparison ?? null} lastHeard={lastHeardOf(query)} />
        {run.kind === "untilSettled" ? (
          <Section
            title="More trials, step by step"
            note="Each step doubles the trials. It ends when the 95 % interval of P90, P50 and P10 is narrow enough, or at the most trials allowed."
          >
            <SettlingSteps id={id} live={isUnderWay(run)} />
          </Section>
        ) : (
          <RunItems run={run} moved={comparison?.beyond ?? null} />
        )}
      </Stack>
    </Page>
  );
}

/** Open estimates have new results when a run ends, and with them pages that show them. */
function useRefreshAtEnd(run: RunView | undefined): void {
  const client = useQueryClient();
  const wasUnderWay = useRef(false);
  const underWay = isUnderWay(run);
  useEffect(() => {
    if (wasUnderWay.current && !underWay) void client.invalidateQueries();
    wasUnderWay.current = underWay;
  }, [client, underWay]);
}

function RunMeta({ run }: { run: RunView }) {
  const { startedAt, finishedAt, workers } = run;
  return (
    <>
      <span>
        {run.createdBy?.name ?? "Somebody who has left"}, {formatDate(run.createdAt, "time")} UTC
      </span>
      {startedAt && finishedAt && (
        <span>Took {durationWords((Date.parse(finishedAt) - Date.parse(startedAt)) / 1000)}</span>
      )}
      {workers.length > 0 && (
        <span>{workers.length === 1 ? "One worker" : `${workers.length} workers`}</span>
      )}
    </>
  );
}

/** Where the run stands, and what to do about it. */
function RunState({
  run,
  comparison,
  lastHeard,
}: {
  run: RunView;
  comparison: Comparison | null;
  lastHeard: Date | null;
}) {
  const { counts } = run;
  if (isUnderWay(run))
    return (
      <RunProgress
        run={run}
        label="Computing"
        lastHeard={lastHeard}
        action={<RunAction run={run} action="cancel" />}
      />
    );
  if (run.state === "cancelled") {
    return (
      <Notice tone="info" title="The run was cancelled.">
        Results that were done are kept; the rest was passed over.
      </Notice>
    );
  }
  return (
    <div className="grid grid-cols-1 gap-3">
      {counts.failed > 0 && (
        <Notice title={`${counts.failed} could not be computed.`}>
          Their stored results are as they were. The reasons are below; repair the inputs, or retry
          when the reason has gone.
        </Notice>
      )}
      {comparison && comparison.compared > 0 && (
        <p className="text-13 text-ink-soft">
          Compared: P90, P50 and P10 of recoverable condensate, before and now.{" "}
          {movedNote(comparison)}
        </p>
      )}
    </div>
  );
}
