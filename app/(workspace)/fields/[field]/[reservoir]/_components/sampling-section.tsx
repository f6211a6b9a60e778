"use client";

import { useState } from "react";
import { samplingMethods } from "@/analytics/uncertainty/sampling-schema";
import {
  ESTIMATE_TRIALS,
  MOST_SEED,
  nearestSobolTrials,
  readWhole,
  samplingLabels,
  samplingNotes,
  seedNote,
  sobolTrials,
} from "@/components/estimate/sampling-words";
import { Button } from "@/components/ui/button";
import { Segmented, Select } from "@/components/ui/choice";
import { NumberField } from "@/components/ui/field";
import { Section } from "@/components/ui/section";
import type { SamplingChoice } from "../_queries/reservoir-page";
import { useReservoir } from "../_editor/reservoir-context";
import type { Draft } from "../_editor/use-draft";

const grouped = (value: number) => value.toLocaleString("en-US");

/** How the trials of the draft are drawn. */
export function SamplingSection() {
  const { shown, draft } = useReservoir();
  if (!draft) return null;
  if (!shown || !draft.base.estimateId) {
    return (
      <Section title="How trials are drawn">
        <p className="text-ink-soft">
          Method, number and seed of the trials can be chosen once the estimate is saved.
        </p>
      </Section>
    );
  }
  const { sampling, trials, seed } = shown;
  // What was saved, here or elsewhere, is what the fields begin with.
  const key = `${sampling} ${trials} ${seed}`;
  return <SamplingForm key={key} saved={{ sampling, trials, seed }} draft={draft} />;
}

function SamplingForm({ saved, draft }: { saved: SamplingChoice; draft: Draft }) {
  const [sampling, setSampling] = useState(saved.sampling);
  const [trialsText, setTrials] = useState(grouped(saved.trials));
  const [seedText, setSeed] = useState(String(saved.seed));
  const trials = readWhole(trialsText, ESTIMATE_TRIALS);
  const seed = readWhole(seedText, [0, MOST_SEED]);
  const chosen =
    typeof trials === "number" && typeof seed === "number" ? { sampling, trials, seed } : null;
  const isChanged =
    chosen === null ||
    chosen.sampling !== saved.sampling ||
    chosen.trials !== saved.trials ||
    chosen.seed !== saved.seed;
  const isSaving = draft.saveState.kind === "saving";
  return (
    <Section
      title={`${grouped(saved.trials)} trials, ${samplingLabels[saved.sampling]}`}
      note="How trials are drawn in the full run. Results while you type come from fewer trials, drawn the same way."
    >
      <form
        className="grid max-w-md gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          if (chosen && isChanged && !isSaving) void draft.saveSampling(chosen);
        }}
      >
        <div className="grid gap-1">
          <Segmented
            label="Method"
            value={sampling}
            options={samplingMethods.map((value) => ({ value, label: samplingLabels[value] }))}
            onChange={(next) => {
              setSampling(next);
              if (next === "sobol" && typeof trials === "number") {
                setTrials(grouped(nearestSobolTrials(trials)));
              }
            }}
          />
          <p className="text-12 text-ink-soft">{samplingNotes[sampling]}</p>
        </div>
        {sampling === "sobol" ? (
          <Select
            label="Trials"
            value={trialsText}
            options={sobolTrials().map((count) => ({
              value: grouped(count),
              label: grouped(count),
            }))}
            onChange={setTrials}
          />
        ) : (
          <NumberField
            label="Trials"
            inputMode="numeric"
            value={trialsText}
            error={typeof trials === "string" ? trials : undefined}
            onChange={(event) => setTrials(event.target.value)}
          />
        )}
        <NumberField
          label="Seed"
          inputMode="numeric"
          value={seedText}
          hint={seedNote}
          error={typeof seed === "string" ? seed : undefined}
          onChange={(event) => setSeed(event.target.value)}
        />
        {isChanged && (
          <div className="grid justify-items-start gap-1">
            <Button
              type="submit"
              kind="primary"
              disabled={chosen === null}
              busy={isSaving}
              busyLabel="Saving…"
            >
              Save how trials are drawn
            </Button>
            <p className="text-12 text-ink-soft">
              The results go and come back with the next full run: other trials, other last digits.
            </p>
          </div>
        )}
      </form>
    </Section>
  );
}
