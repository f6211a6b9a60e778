"use client";

import { useState, type ReactNode } from "react";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { useCan } from "@/app/_client/use-session";
import type { FluidSampleView } from "@/app/api/v1/fluid-samples/schema";
import { sampleOfEstimate } from "@/components/fluid/estimate-sample";
import { newSampleText, textOfSample } from "@/components/fluid/sample-text";
import { Select } from "@/components/ui/choice";
import { formatDate } from "@/components/ui/format";
import { EmptyState } from "@/components/ui/status";
import { useReservoir } from "../_editor/reservoir-context";
import { readChosenSample, writeChosenSample } from "../_editor/sample-backup";
import { useSample } from "../_editor/use-sample";
import { FluidSample } from "./fluid-sample";

/** The sheet that the estimate itself carries, and a sheet that is no sample's yet. */
const OF_ESTIMATE = "estimate";
const NEW = "new";

/** Fluid samples of the reservoir: entered, computed as they are typed, kept, used in the draft. */
export function FluidTab() {
  const { page, shown, text } = useReservoir();
  const can = useCan();
  const taken = sampleOfEstimate(page.fluidSamples, shown, text?.fluid ?? null);
  const used = taken?.sample;
  const start = used?.id ?? (text?.fluid ? OF_ESTIMATE : (page.fluidSamples.at(0)?.id ?? null));
  const [chosen, setChosen] = useState(() => readChosenSample(page.id));
  const isThere =
    chosen === NEW
      ? can("fluidSample.create")
      : chosen === OF_ESTIMATE
        ? text?.fluid !== undefined && !used
        : page.fluidSamples.some(({ id }) => id === chosen);
  const current = isThere ? chosen : start;
  const sample = page.fluidSamples.find(({ id }) => id === current) ?? null;

  if (current === null && !can("fluidSample.create")) {
    return (
      <EmptyState title="No fluid sample yet">
        An engineer enters the laboratory’s study here: separator test, composition, depletion.
      </EmptyState>
    );
  }
  function choose(sheet: string) {
    setChosen(sheet);
    writeChosenSample(page.id, sheet);
  }
  const options = [
    ...page.fluidSamples.map(({ id, name, sampledOn, laboratory }) => ({
      value: id,
      label: id === used?.id ? `${name}, in this estimate` : name,
      note: `${formatDate(sampledOn)}${laboratory ? `, ${laboratory}` : ""}`,
    })),
    ...(text?.fluid && !used ? [{ value: OF_ESTIMATE, label: "The estimate’s own sheet" }] : []),
    ...(can("fluidSample.create") ? [{ value: NEW, label: "A new sample" }] : []),
  ];
  return (
    <Sheets
      // Another sample, or the same one as somebody saved it, is another sheet.
      key={`${current ?? NEW} ${sample?.version ?? 0}`}
      name={sample?.id ?? `${page.id}.${current ?? NEW}`}
      sample={sample}
      isNewer={taken !== null && taken.isNewer && taken.sample.id === sample?.id}
      test={current === OF_ESTIMATE ? (text?.fluid ?? null) : null}
      chooser={
        options.length > 1 && (
          <Select
            className="w-72 max-w-full"
            label="Sample"
            value={current ?? NEW}
            options={options}
            onChange={choose}
          />
        )
      }
      onSaved={(saved) => choose(saved.id)}
    />
  );
}

function Sheets({
  name,
  sample,
  isNewer,
  test,
  chooser,
  onSaved,
}: {
  /** what is typed is kept under it in this tab */
  name: string;
  sample: FluidSampleView | null;
  /** the estimate was made with an earlier version of it */
  isNewer: boolean;
  test: SeparatorTest | null;
  chooser: ReactNode;
  onSaved: (sample: FluidSampleView) => void;
}) {
  const [stored] = useState(() => (sample ? textOfSample(sample) : newSampleText(test)));
  const draft = useSample(name, stored, sample?.version ?? null);
  return <FluidSample {...{ sample, isNewer, draft, chooser, onSaved }} />;
}
