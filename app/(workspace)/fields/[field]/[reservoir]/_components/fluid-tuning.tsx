"use client";

import { useRef, useState } from "react";
import { errorWords } from "@/app/_client/request";
import { TuningDialog } from "@/components/fluid/tuning-dialog";
import { Button } from "@/components/ui/button";
import { useToast } from "@/components/ui/toast";
import type { FluidStudy } from "../_editor/use-fluid-study";
import type { SampleDraft } from "../_editor/use-sample";
import { useTuning } from "../_queries/fluid-calculations";

/** Opens the tuning; what it finds goes into the sample only when it is taken over. */
export function FluidTuning({ draft, study }: { draft: SampleDraft; study: FluidStudy }) {
  const tuning = useTuning();
  const toast = useToast();
  const [isOpen, setOpen] = useState(false);
  const running = useRef<AbortController | null>(null);
  const { sheet, table } = study;
  const { characterisation } = draft.reading;

  if (!sheet || !table) {
    return (
      <p className="text-12 text-ink-soft">
        Tuning needs a composition and the laboratory’s depletion table.
      </p>
    );
  }
  function stop() {
    running.current?.abort();
    tuning.reset();
  }
  return (
    <>
      <Button
        size="small"
        onClick={() => {
          tuning.reset();
          setOpen(true);
        }}
      >
        Tune to the laboratory’s table
      </Button>
      <TuningDialog
        open={isOpen}
        onClose={() => {
          stop();
          setOpen(false);
        }}
        measured={table}
        result={tuning.data ?? null}
        busy={tuning.isPending}
        failure={tuning.error ? errorWords(tuning.error) : null}
        onRun={(tunables) => {
          running.current = new AbortController();
          tuning.mutate({
            body: { sheet, table, characterisation, tunables },
            signal: running.current.signal,
          });
        }}
        onCancel={stop}
        onAccept={(result) => {
          draft.change({
            characterisation: result.characterisation,
            tuning: result.record,
          });
          setOpen(false);
          toast({
            title: "The tuned equation of state is in use",
            detail: "Save the sample to keep it.",
          });
        }}
      />
    </>
  );
}
