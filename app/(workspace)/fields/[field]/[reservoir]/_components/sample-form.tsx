"use client";

import { useState } from "react";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { errorWords, ProblemError } from "@/app/_client/request";
import type { FluidSampleView } from "@/app/api/v1/fluid-samples/schema";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/field";
import { Section } from "@/components/ui/section";
import { Notice } from "@/components/ui/status";
import { useToast } from "@/components/ui/toast";
import { useReservoir } from "../_editor/reservoir-context";
import { useSaveSample } from "../_queries/fluid";

/** Keeps the sheet under a name, so that estimates can refer to it. */
export function SampleForm({
  sample,
  test,
  onSaved,
}: {
  sample: FluidSampleView | null;
  /** `null` while the sheet is not complete or not possible */
  test: SeparatorTest | null;
  onSaved: (sample: FluidSampleView) => void;
}) {
  const { page, place } = useReservoir();
  const toast = useToast();
  const [name, setName] = useState(sample?.name ?? "");
  const [sampledOn, setSampledOn] = useState(sample?.sampledOn ?? "");
  const [laboratory, setLaboratory] = useState(sample?.laboratory ?? "");
  const save = useSaveSample(place);
  const at = (pointer: string) =>
    save.error instanceof ProblemError
      ? save.error.errors.find((problem) => problem.pointer === pointer)?.detail
      : undefined;
  const isOnForm = at("#/name") !== undefined || at("#/sampledOn") !== undefined;

  function handleSave(id: string | null) {
    if (!test) return;
    save.mutate(
      {
        id,
        version: id === null ? undefined : sample?.version,
        reservoirId: page.id,
        name: name.trim(),
        sampledOn,
        laboratory: laboratory.trim(),
        separatorTest: test,
      },
      {
        onSuccess: (saved) => {
          toast({
            title: `Sample ${saved.name} is saved`,
            detail: "Estimates keep the copy they were made with.",
          });
          onSaved(saved);
        },
      },
    );
  }

  const isReady = test !== null && name.trim() !== "" && sampledOn !== "";
  return (
    <Section title={sample ? `Sample ${sample.name}` : "Keep it as a sample"} level={3}>
      <form
        className="grid gap-3"
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
            value={name}
            onChange={(event) => setName(event.target.value)}
          />
          <TextField
            label="Sampled on"
            type="date"
            required
            error={at("#/sampledOn")}
            value={sampledOn}
            onChange={(event) => setSampledOn(event.target.value)}
          />
          <TextField
            label="Laboratory"
            maxLength={200}
            value={laboratory}
            onChange={(event) => setLaboratory(event.target.value)}
          />
        </div>
        {save.error && !isOnForm && (
          <Notice tone="error" title="The sample was not saved.">
            {errorWords(save.error)} The sheet above is kept.
          </Notice>
        )}
        <div className="flex flex-wrap gap-2">
          <Button type="submit" busy={save.isPending} busyLabel="Saving…" disabled={!isReady}>
            {sample ? "Save changes" : "Save the sample"}
          </Button>
          {sample && name.trim() !== sample.name && (
            <Button disabled={!isReady} onClick={() => handleSave(null)}>
              Save as another sample
            </Button>
          )}
        </div>
      </form>
    </Section>
  );
}
