"use client";

import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import type { RunView } from "@/app/api/v1/runs/schema";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { useCancelRun, useRetryRun } from "../_queries/runs";

export interface RunActionProps {
  run: RunView;
  action: "cancel" | "retry";
}

/** Stops a run after asking, or takes it up again; nothing for people who may not, or when there is nothing to do. */
export function RunAction({ run, action }: RunActionProps) {
  const [isAsking, setIsAsking] = useState(false);
  const cancel = useCancelRun();
  const retry = useRetryRun();
  if (!run.can[action]) return null;
  const change = action === "cancel" ? cancel : retry;

  function handleCancel() {
    setIsAsking(false);
    cancel.mutate(run.id);
  }

  return (
    <>
      {change.error && <span className="field-error">{errorWords(change.error)}</span>}
      {action === "retry" ? (
        <Button size="small" busy={retry.isPending} onClick={() => retry.mutate(run.id)}>
          {run.counts.failed > 0 ? "Retry what failed" : "Take it up again"}
        </Button>
      ) : (
        <Button
          size="small"
          busy={cancel.isPending}
          busyLabel="Cancelling…"
          onClick={() => setIsAsking(true)}
        >
          Cancel
        </Button>
      )}
      <Dialog
        open={isAsking}
        onClose={() => setIsAsking(false)}
        title="Cancel this run?"
        description="What is done stays done. What still waits is passed over, and what is being computed now is dropped. It can be taken up again later."
        actions={
          <>
            <Button onClick={() => setIsAsking(false)}>Let it run</Button>
            <Button kind="primary" onClick={handleCancel}>
              Cancel the run
            </Button>
          </>
        }
      />
    </>
  );
}
