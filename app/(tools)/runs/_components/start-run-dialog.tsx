"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { errorWords, ProblemError } from "@/app/_client/request";
import { useCan } from "@/app/_client/use-session";
import { runScopes, type RunScope } from "@/models/vocabulary";
import { Button, LinkButton } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/status";
import { useStartRun } from "../../_queries/runs";
import { scopes } from "@/components/runs/run-words";

/** Asks what to recalculate, saying of each choice what it changes. */
export function StartRunDialog({ onClose }: { onClose: () => void }) {
  const router = useRouter();
  const start = useStartRun();
  const existing = start.error instanceof ProblemError ? start.error.existingId : undefined;
  const [scope, setScope] = useState<RunScope>("approved");
  const mayRun = useCan()("estimate.run");
  const isRefused = (value: RunScope) => value !== "approved" && !mayRun;

  async function handleStart() {
    try {
      const run = await start.mutateAsync({ kind: "recalculation", scope });
      router.push(`/runs/${run.id}`);
    } catch {
      // The notice says why, with the run that is under way already; the choice stands.
    }
  }

  return (
    <Dialog
      open
      onClose={onClose}
      title="Recalculate with today’s engine"
      description="Seeds, numbers of trials and ways of sampling stay those of each estimate."
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button
            kind="primary"
            busy={start.isPending}
            busyLabel="Starting…"
            onClick={() => void handleStart()}
          >
            Start
          </Button>
        </>
      }
    >
      <fieldset className="scope-choice">
        <legend className="sr-only">What to recalculate</legend>
        {runScopes.map((value) => (
          <label key={value} className={isRefused(value) ? "text-ink-soft" : undefined}>
            <input
              type="radio"
              name="scope"
              value={value}
              checked={scope === value}
              disabled={isRefused(value)}
              onChange={() => setScope(value)}
            />
            <span>
              <b>{scopes[value].label}</b>
              <small>{scopes[value].note}</small>
              {isRefused(value) && (
                <small>Not for your role: drafts get new results from an engineer.</small>
              )}
            </span>
          </label>
        ))}
      </fieldset>
      {start.error && (
        <div className="mt-3">
          <Notice
            tone="error"
            title={errorWords(start.error)}
            actions={
              existing && (
                <LinkButton size="small" href={`/runs/${existing}`}>
                  Look at it
                </LinkButton>
              )
            }
          >
            Nothing was begun.
          </Notice>
        </div>
      )}
    </Dialog>
  );
}
