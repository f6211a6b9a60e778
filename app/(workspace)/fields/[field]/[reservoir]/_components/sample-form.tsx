"use client";

import { useState } from "react";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { currentRow, errorWords, ProblemError } from "@/app/_client/request";
import { fluidSampleSchema, type FluidSampleView } from "@/app/api/v1/fluid-samples/schema";
import { isSameFluid } from "@/components/estimate/differences";
import { SampleConflict } from "@/components/fluid/sample-conflict";
import { textOfSample, type StoredSample } from "@/components/fluid/sample-text";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { Section } from "@/components/ui/section";
import { Notice } from "@/components/ui/status";
import { useToast } from "@/components/ui/toast";
import { useReservoir } from "../_editor/reservoir-context";
import type { SampleDraft } from "../_editor/use-sample";
import { useSaveSample } from "../_queries/fluid";

/** Keeps the sheets under a name, so that estimates can refer to them. */
export function SampleForm({
  sample,
  draft,
  test,
  onSaved,
}: {
  sample: FluidSampleView | null;
  draft: SampleDraft;
  /** measured or computed; `null` while there is none */
  test: SeparatorTest | null;
  onSaved: (sample: FluidSampleView) => void;
}) {
  const { page, place } = useReservoir();
  const toast = useToast();
  const save = useSaveSample(place);
  const [theirs, setTheirs] = useState<FluidSampleView | null>(null);
  const { text, reading } = draft;
  const at = (pointer: string) =>
    save.error instanceof ProblemError
      ? save.error.errors.find((problem) => problem.pointer === pointer)?.detail
      : undefined;
  const isOnForm = at("#/name") !== undefined || at("#/sampledOn") !== undefined;
  const mine: StoredSample | null =
    test && reading.study
      ? {
          name: text.name.trim(),
          sampledOn: text.sampledOn,
          laboratory: text.laboratory.trim(),
          // An untouched sheet stays as it was stored, to the last digit.
          separatorTest:
            sample && isSameFluid(sample.separatorTest, test) ? sample.separatorTest : test,
          study: reading.study,
        }
      : null;

  function handleSave(id: string | null) {
    if (!mine) return;
    save.mutate(
      {
        id,
        version: id === null ? undefined : (draft.version ?? undefined),
        reservoirId: page.id,
        ...mine,
      },
      {
        onSuccess: (saved) => {
          draft.forget();
          toast({
            title: `Sample ${saved.name} is saved`,
            detail: "Estimates keep the copy they were made with.",
          });
          onSaved(saved);
        },
        onError: (error) => setTheirs(currentRow(error, fluidSampleSchema)),
      },
    );
  }

  const unfinished = [
    ...reading.unfinished,
    ...(reading.unfinished.length === 0 && !test ? ["the separator test"] : []),
  ];
  const isReady = mine !== null && mine.name !== "" && mine.sampledOn !== "";
  return (
    <Section title={sample ? `Sample ${sample.name}` : "Keep it as a sample"}>
      <form
        className="grid max-w-3xl gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          if (isReady) handleSave(sample?.id ?? null);
        }}
      >
        <div className="grid grid-cols-3 gap-3 phone:grid-cols-1">
          <TextField
            label="Name"
            hint="Well and number"
            required
            maxLength={120}
            error={at("#/name")}
            value={text.name}
            onChange={(event) => draft.change({ name: event.target.value })}
          />
          <TextField
            label="Sampled on"
            type="date"
            required
            error={at("#/sampledOn")}
            value={text.sampledOn}
            onChange={(event) => draft.change({ sampledOn: event.target.value })}
          />
          <TextField
            label="Laboratory"
            maxLength={200}
            value={text.laboratory}
            onChange={(event) => draft.change({ laboratory: event.target.value })}
          />
        </div>
        {unfinished.length > 0 && (
          <p className="text-13 text-ink-soft">
            To be completed or corrected first: {unfinished.join(", ")}. Until then it is kept in
            this tab.
          </p>
        )}
        {save.error && !isOnForm && !theirs && (
          <Notice tone="error" title="The sample was not saved.">
            {errorWords(save.error)} What was typed is kept.
          </Notice>
        )}
        <div className="flex flex-wrap gap-2">
          <Button type="submit" busy={save.isPending} busyLabel="Saving…" disabled={!isReady}>
            {sample ? "Save changes" : "Save the sample"}
          </Button>
          {sample && text.name.trim() !== sample.name && (
            <Button disabled={!isReady} onClick={() => handleSave(null)}>
              Save as another sample
            </Button>
          )}
        </div>
      </form>
      {theirs && mine && (
        <SampleConflict
          mine={mine}
          theirs={theirs}
          opened={sample ?? mine}
          onClose={() => setTheirs(null)}
          onResolve={(merged) => {
            draft.rebase(textOfSample(theirs), theirs.version, textOfSample(merged));
            setTheirs(null);
            save.reset();
          }}
        />
      )}
    </Section>
  );
}
