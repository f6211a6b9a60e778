"use client";

import { useState } from "react";
import type { ResultName, SimulationSummary } from "@/analytics/volumetrics/results-schema";
import { errorWords } from "@/app/_client/request";
import { resultLabels, resultOptions } from "@/components/drivers/driver-names";
import { KnowingView } from "@/components/drivers/knowing-view";
import { RegressionView } from "@/components/drivers/regression-view";
import { VarianceView } from "@/components/drivers/variance-view";
import { Drivers } from "@/components/estimate/drivers";
import { Button } from "@/components/ui/button";
import { Segmented, Select } from "@/components/ui/choice";
import { Section } from "@/components/ui/section";
import { Notice, Skeleton } from "@/components/ui/status";
import { useReservoir } from "../_editor/reservoir-context";
import { useQuestion } from "../_editor/use-question";
import { useSensitivity } from "../_queries/sensitivity";

type View = "shares" | "knowing" | "regression" | "swings";

const views: { value: View; label: string }[] = [
  { value: "shares", label: "Shares of variance" },
  { value: "knowing", label: "Worth knowing" },
  { value: "regression", label: "Rank regression" },
  { value: "swings", label: "One at a time" },
];

/** Results whose swings a run keeps. */
const hasSwings = (result: ResultName): result is keyof SimulationSummary["drivers"] =>
  result === "condensateRecoverableStb" || result === "wetGasInPlaceScf";

/** What drives the spread of one result, looked at in four ways. */
export function DriversSection({
  result,
  onResult,
}: {
  result: ResultName;
  onResult: (result: ResultName) => void;
}) {
  const [view, setView] = useState<View>("shares");
  return (
    <Section
      id="drivers"
      title="What drives the spread"
      note="Four ways to ask, of one result at a time."
      className="asked-section"
    >
      <div className="mb-6 flex flex-wrap items-end gap-x-6 gap-y-3">
        <Select label="Result" value={result} options={resultOptions} onChange={onResult} />
        <Segmented label="Looked at by" value={view} options={views} onChange={setView} />
      </div>
      <DriverView result={result} view={view} />
    </Section>
  );
}

function DriverView({ result, view }: { result: ResultName; view: View }) {
  const { place, results, resultBasis } = useReservoir();
  const question = useQuestion(result);
  const { sensitivity, isStale, isPending, error, refetch } = useSensitivity(question);

  if (view === "swings") {
    const { summary } = results;
    return summary && hasSwings(result) ? (
      <Drivers
        summary={summary}
        basis={resultBasis}
        result={result}
        level={3}
        by="swing"
        inputs={question?.inputs}
      />
    ) : (
      <p className="text-13 text-ink-soft">
        A run keeps the swings of wet gas in place and of condensate to the tank. The other three
        views take every result.
      </p>
    );
  }
  if (error) {
    return (
      <Notice
        tone="error"
        live={false}
        title="What drives it could not be worked out."
        actions={
          <Button size="small" onClick={refetch}>
            Try again
          </Button>
        }
      >
        {errorWords(error)} The results above stand.
      </Notice>
    );
  }
  if (!sensitivity || !question) {
    return isPending ? (
      <Skeleton lines={8} label="Working out what drives it" />
    ) : (
      <p className="text-13 text-ink-soft">Appears when every input is filled in.</p>
    );
  }
  const shared = {
    sensitivity,
    name: resultLabels[result],
    tone: result.endsWith("Scf") ? ("gas" as const) : ("condensate" as const),
    fileName: `${place.field}-${place.reservoir}-${result}`,
  };
  return (
    <div aria-busy={isStale} className={isStale ? "opacity-60" : undefined}>
      {view === "regression" && <RegressionView {...shared} inputs={question.inputs} />}
      {view === "shares" && <VarianceView {...shared} inputs={question.inputs} />}
      {view === "knowing" && <KnowingView {...shared} />}
    </div>
  );
}
