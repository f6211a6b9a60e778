"use client";

import { useState } from "react";
import { errorWords } from "@/app/_client/request";
import { canSubmit } from "@/components/estimate/checklist";
import { FindingList } from "@/components/estimate/finding-list";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextArea } from "@/components/ui/field";
import { Notice } from "@/components/ui/status";
import { useToast } from "@/components/ui/toast";
import { useReservoir } from "../_editor/reservoir-context";
import { useChecklist } from "../_editor/use-checklist";
import { runDraft, submitDraft, useEstimateStep } from "../_queries/reservoir-page";

/** Saves what is left to save, runs what is left to run, and hands the estimate to the reviewers. */
export function SubmitDialog({ open, onClose }: { open: boolean; onClose: () => void }) {
  const { place, shown, draft, before } = useReservoir();
  const [note, setNote] = useState(shown?.note ?? "");
  const checklist = useChecklist();
  const toast = useToast();
  const submit = useEstimateStep(place, async (reason: string) => {
    if (!draft || !shown) throw new Error("There is no draft to submit.");
    const saved = draft.isSaved ? null : await draft.save();
    if (!saved && !draft.isSaved)
      throw new Error("The draft could not be saved, so it was not submitted.");
    const version = saved?.version ?? draft.base.version ?? shown.version;
    const hasRun = !saved && shown.summary !== null;
    const ran = hasRun ? null : await runDraft(shown.id, version);
    return submitDraft(shown.id, ran?.version ?? version, reason);
  });

  function handleSubmit() {
    submit.mutate(note.trim(), {
      onSuccess: (estimate) => {
        onClose();
        toast({
          title: `r${estimate.revision} is with the reviewers`,
          detail: before ? `r${before.revision} stays approved until they decide.` : undefined,
        });
      },
    });
  }

  return (
    <Dialog
      open={open}
      onClose={onClose}
      title={`Submit r${shown?.revision ?? 1} for review`}
      description={
        before
          ? `r${before.revision} stays approved until a reviewer decides. Nobody decides on their own work.`
          : "Nobody decides on their own work: a reviewer will."
      }
      actions={
        <>
          <Button onClick={onClose}>Not yet</Button>
          <Button
            kind="primary"
            busy={submit.isPending}
            busyLabel="Running and submitting…"
            disabled={!canSubmit(checklist)}
            onClick={handleSubmit}
          >
            Submit
          </Button>
        </>
      }
    >
      <div className="grid gap-3">
        <FindingList findings={checklist} />
        <TextArea
          label="What is new, and why"
          hint="The reviewer reads this first; it stays in the history."
          rows={3}
          maxLength={5000}
          value={note}
          onChange={(event) => setNote(event.target.value)}
        />
        {submit.error && (
          <Notice tone="error" title="Not submitted.">
            {errorWords(submit.error)}
          </Notice>
        )}
      </div>
    </Dialog>
  );
}
