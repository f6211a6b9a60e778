"use client";

import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import { useSession } from "@/app/_client/use-session";
import { Button } from "@/components/ui/button";
import { TextArea } from "@/components/ui/field";
import { Notice } from "@/components/ui/status";
import { useToast } from "@/components/ui/toast";
import { useReservoir } from "../_editor/reservoir-context";
import { decide, useEstimateStep } from "../_queries/reservoir-page";

/** Approve, or return with a note. Shown to those who may; to a reviewer of their own work it says why not. */
export function DecisionPanel() {
  const { shown, before, place } = useReservoir();
  const session = useSession();
  const toast = useToast();
  const [note, setNote] = useState("");
  const [noteProblem, setNoteProblem] = useState<string>();
  const step = useEstimateStep(place, (decision: "approve" | "return") => {
    if (!shown) throw new Error("There is nothing to decide on.");
    return decide(decision, shown.id, shown.version, note.trim());
  });

  if (!shown || shown.state !== "submitted") return null;
  if (!shown.can.approve && !shown.can.return) {
    const isOwn = [shown.creator?.id, shown.submitter?.id].includes(session.data?.id);
    return isOwn ? (
      <p className="text-13 text-ink-soft">This is your own work; another person decides on it.</p>
    ) : null;
  }

  const author = shown.submitter?.name ?? shown.creator?.name ?? "the author";
  function handle(decision: "approve" | "return") {
    if (decision === "return" && note.trim() === "") {
      setNoteProblem(`Say what ${author} should change.`);
      return;
    }
    step.mutate(decision, {
      onSuccess: (estimate) =>
        toast({
          title:
            decision === "approve"
              ? `r${estimate.revision} is approved`
              : `r${estimate.revision} went back to ${author}`,
        }),
    });
  }

  return (
    <section className="decision" aria-label="Decision">
      <h2>Your decision</h2>
      <TextArea
        label={`Note to ${author}`}
        hint="Needed to return; kept with the revision either way."
        error={noteProblem}
        rows={3}
        maxLength={5000}
        value={note}
        onChange={(event) => {
          setNote(event.target.value);
          setNoteProblem(undefined);
        }}
      />
      {step.error && (
        <Notice tone="error" title="Nothing was decided.">
          {errorWords(step.error)}
        </Notice>
      )}
      <div className="grid grid-cols-2 gap-2">
        <Button
          icon="return"
          busy={step.isPending && step.variables === "return"}
          onClick={() => handle("return")}
        >
          Return with note
        </Button>
        <Button
          kind="primary"
          icon="tick"
          busy={step.isPending && step.variables === "approve"}
          onClick={() => handle("approve")}
        >
          Approve r{shown.revision}
        </Button>
      </div>
      <p className="text-12 text-ink-soft">
        {before && `r${before.revision} stays approved until r${shown.revision} is. `}
        You did not work on this estimate.
      </p>
    </section>
  );
}
