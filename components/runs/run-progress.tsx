import type { ReactNode } from "react";
import type { RunView } from "@/app/api/v1/runs/schema";
import { formatDate } from "@/components/ui/format";
import { Notice, Progress } from "@/components/ui/status";
import { fractionOf, progressWords } from "./run-words";

/** How far a run is, how fast it goes and how long it still takes; or why it stands still and what to do. */
export function RunProgress({
  run,
  label,
  note,
  action,
  lastHeard = null,
}: {
  run: RunView;
  label: string;
  note?: ReactNode;
  /** a Cancel button */
  action?: ReactNode;
  /** when the server last answered, while it does not: then nobody knows how fast the run is, or whether it goes on */
  lastHeard?: Date | null;
}) {
  const { counts, stalled } = run;
  return (
    <div className="grid grid-cols-1 gap-3">
      <Progress
        label={lastHeard ? `Last heard ${formatDate(lastHeard, "clock")} UTC` : label}
        fraction={fractionOf(run)}
        detail={progressWords(lastHeard ? { ...run, remainingSeconds: null } : run)}
        note={
          lastHeard
            ? "The server does not answer, so how far the run is now is not known. What was done is kept; this page asks again by itself."
            : (note ?? "You may leave this page; the run goes on.")
        }
        action={lastHeard ? null : action}
      />
      <p className="run-facts">
        <span>
          <b>{counts.done}</b> done
        </span>
        <span>
          <b>{counts.running}</b> running
        </span>
        <span>
          <b>{counts.waiting}</b> waiting
        </span>
        {counts.failed > 0 && (
          <span>
            <b>{counts.failed}</b> failed
          </span>
        )}
        {counts.passedOver > 0 && (
          <span>
            <b>{counts.passedOver}</b> passed over
          </span>
        )}
      </p>
      {stalled && !lastHeard && (
        <Notice title="Nothing has moved for a while.">
          No worker process is there, or all are busy with other work. Nothing is lost: the run goes
          on by itself as soon as a worker is free. If none is running, an administrator starts one;
          one begins with the product, and more can be started on other machines.
        </Notice>
      )}
    </div>
  );
}
