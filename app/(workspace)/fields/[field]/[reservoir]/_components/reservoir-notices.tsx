"use client";

import { errorWords } from "@/app/_client/request";
import { Button } from "@/components/ui/button";
import { formatDate } from "@/components/ui/format";
import { Notice } from "@/components/ui/status";
import { useBasis } from "@/components/basis/use-basis";
import { useReservoir } from "../_editor/reservoir-context";

/** What the person should know before they go on: returned work, restored work, work that was not saved. */
export function ReservoirNotices() {
  const { page, shown, draft, results } = useReservoir();
  const { setBasis } = useBasis();
  const { open } = page;
  return (
    <div className="mb-4 grid gap-2 empty:hidden">
      {shown?.state === "returned" && (
        <Notice
          title={`${shown.decider?.name ?? "The reviewer"} returned r${shown.revision} on ${formatDate(shown.decidedAt)}.`}
        >
          {shown.decisionNote}
        </Notice>
      )}
      {draft?.restored && (
        <Notice
          tone="info"
          title={`Work of ${formatDate(draft.restored.at, "time")} was kept in this browser and is back.`}
          actions={
            <Button size="small" onClick={draft.revert}>
              Drop it
            </Button>
          }
        >
          It will be saved with your next change, or as it stands.
        </Notice>
      )}
      {draft?.saveState.kind === "failed" && (
        <Notice
          tone="error"
          title="The draft was not saved."
          actions={
            <Button size="small" onClick={() => void draft.save()}>
              Save now
            </Button>
          }
        >
          {draft.saveState.words} What you typed is kept in this browser.
        </Notice>
      )}
      {draft?.reading.problem && (
        <Notice tone="error" title="These inputs contradict each other." live={false}>
          {draft.reading.problem}
        </Notice>
      )}
      {results.error && !results.isStale && (
        <Notice tone="error" title="The results could not be worked out." live={false}>
          {errorWords(results.error)} The figures shown are of the state before.
        </Notice>
      )}
      {!draft && open && shown && open.id !== shown.id && (
        <Notice
          tone="info"
          title={`r${open.revision} is ${open.state === "submitted" ? "with the reviewers" : open.state === "returned" ? "returned to its author" : "being worked on"}.`}
          actions={
            <Button size="small" onClick={() => setBasis({ estimates: "latest" })}>
              Show r{open.revision}
            </Button>
          }
        >
          This page shows the approved r{shown.revision}.
        </Notice>
      )}
    </div>
  );
}
