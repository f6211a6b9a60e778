"use client";

import { useState } from "react";
import type { EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import type { ResultName } from "@/analytics/volumetrics/results-schema";
import { errorWords } from "@/app/_client/request";
import type { EstimateBodyView } from "@/app/api/v1/estimates/schema";
import { ChangeExplanation } from "@/components/drivers/change-explanation";
import { resultLabels, resultOptions } from "@/components/drivers/driver-names";
import { resultFactor, resultUnit } from "@/components/estimate/result-rows";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/choice";
import { Section } from "@/components/ui/section";
import { Notice, Skeleton } from "@/components/ui/status";
import { useReservoir } from "../_editor/reservoir-context";
import { useSettled } from "../_editor/use-live-results";
import { useChange } from "../_queries/change";

const PAUSE_MS = 800;

/** What explains the change in P50 from the approved revision to the one on show. */
export function ExplainedChange() {
  const { shown, before, draft, resultBasis, place } = useReservoir();
  const [result, setResult] = useState<ResultName>("condensateRecoverableStb");
  const inputs = useSettled((draft ? draft.reading.estimate : shown?.inputs) ?? null, PAUSE_MS);
  const { explanation, isStale, isPending, error, refetch } = useChange(
    before && shown && inputs
      ? {
          from: sideOf(before, before.inputs),
          to: sideOf(shown, inputs),
          result,
        }
      : null,
  );
  if (!before || !shown) return null;
  const name = resultLabels[result];
  return (
    <div>
      {error ? (
        <Section title="What explains the change in P50">
          <Notice
            tone="error"
            live={false}
            title="The change could not be explained."
            actions={
              <Button size="small" onClick={refetch}>
                Try again
              </Button>
            }
          >
            {errorWords(error)} The figures above stand.
          </Notice>
        </Section>
      ) : explanation ? (
        <div aria-busy={isStale} className={isStale ? "opacity-60" : undefined}>
          <ChangeExplanation
            explanation={explanation}
            from={`r${before.revision}`}
            to={`r${shown.revision}`}
            name={name}
            factor={resultFactor(result, resultBasis)}
            unit={resultUnit(result, resultBasis)}
            fileName={`${place.field}-${place.reservoir}-${result}`}
            storedTrials={Math.max(before.trials, shown.trials)}
          />
        </div>
      ) : (
        <Section title="What explains the change in P50">
          {isPending ? (
            <Skeleton lines={6} label="Making the differences one by one" />
          ) : (
            <p className="text-13 text-ink-soft">Appears when every input is filled in.</p>
          )}
        </Section>
      )}
      <div className="mt-3">
        <Select
          label="Result that is explained"
          value={result}
          options={resultOptions}
          onChange={setResult}
          className="w-64"
        />
      </div>
    </div>
  );
}

const sideOf = ({ seed, trials, sampling }: EstimateBodyView, inputs: EstimateInputs) => ({
  inputs,
  seed,
  trials,
  sampling,
});
