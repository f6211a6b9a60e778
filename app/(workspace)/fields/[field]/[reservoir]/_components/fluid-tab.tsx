"use client";

import { useState, type ReactNode } from "react";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { errorWords, ProblemError } from "@/app/_client/request";
import { useCan } from "@/app/_client/use-session";
import type { FluidSampleView } from "@/app/api/v1/fluid-samples/schema";
import { isSameFluid } from "@/components/estimate/differences";
import { DailyRates } from "@/components/estimate/daily-rates";
import { FindingList } from "@/components/estimate/finding-list";
import { SeparatorSheet } from "@/components/estimate/separator-sheet";
import {
  emptySheet,
  fieldOfPointer,
  readSheet,
  textOfTest,
  type SheetFieldName,
} from "@/components/estimate/sheet-text";
import {
  BalanceTable,
  FluidKeyFigures,
  fluidFindings,
  GasTable,
} from "@/components/estimate/wellstream-view";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/choice";
import { formatDate, formatPercent } from "@/components/ui/format";
import { Section, Stack } from "@/components/ui/section";
import { EmptyState, Notice, Skeleton } from "@/components/ui/status";
import { useReservoir } from "../_editor/reservoir-context";
import { useWellstream } from "../_queries/fluid";
import { SampleForm } from "./sample-form";
import { UseSampleDialog } from "./use-sample-dialog";

/** The sheet that the estimate itself carries, and a sheet that is no sample's yet. */
const OF_ESTIMATE = "estimate";
const NEW = "new";

/** Separator tests of the reservoir: entered, recombined as they are typed, kept as samples, used in the draft. */
export function FluidTab() {
  const { page, text } = useReservoir();
  const can = useCan();
  const used = page.fluidSamples.find((sample) =>
    isSameFluid(sample.separatorTest, text?.fluid ?? null),
  );
  const start = used?.id ?? (text?.fluid ? OF_ESTIMATE : (page.fluidSamples.at(0)?.id ?? null));
  const [chosen, setChosen] = useState<string | null>(null);
  const current = chosen ?? start;
  const sample = page.fluidSamples.find(({ id }) => id === current) ?? null;
  const test =
    current === NEW
      ? null
      : current === OF_ESTIMATE
        ? (text?.fluid ?? null)
        : (sample?.separatorTest ?? null);

  if (current === null && !can("fluidSample.create")) {
    return (
      <EmptyState title="No fluid sample yet">
        An engineer enters the separator test of a laboratory or a well-test crew here.
      </EmptyState>
    );
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
    <Stack close>
      <Sheet
        // Another sample, or the same one as somebody saved it, is another sheet.
        key={`${current ?? NEW} ${sample?.version ?? 0}`}
        sample={sample}
        test={test}
        chooser={
          options.length > 1 && (
            <Select
              className="w-72 max-w-full"
              label="Sample"
              value={current ?? NEW}
              options={options}
              onChange={(value) => setChosen(value)}
            />
          )
        }
        onSaved={(saved) => setChosen(saved.id)}
      />
    </Stack>
  );
}

function Sheet({
  sample,
  test,
  chooser,
  onSaved,
}: {
  sample: FluidSampleView | null;
  test: SeparatorTest | null;
  chooser: ReactNode;
  onSaved: (sample: FluidSampleView) => void;
}) {
  const { reading: estimate, draft } = useReservoir();
  const can = useCan();
  const mayType = can("fluidSample.create");
  const [sheet, setSheet] = useState(() => (test ? textOfTest(test) : emptySheet()));
  const [isUsing, setUsing] = useState(false);
  const reading = readSheet(sheet);
  const reservoir = stateOf(estimate);
  const query = useWellstream(reading.test, reservoir);
  const problems = problemsOf(query.error);
  const wellstream = query.data ?? null;
  const other = query.error && Object.keys(problems).length === 0 ? query.error : null;
  const dewPointPsia = reading.test?.dewPointPsia ?? null;

  return (
    <>
      <div className="flex flex-wrap items-end justify-between gap-3">
        {chooser || <h2>A first sample</h2>}
        {draft && wellstream && reading.test && !query.error && (
          <Button kind="primary" onClick={() => setUsing(true)}>
            Use in the draft
          </Button>
        )}
      </div>
      {wellstream && <FluidKeyFigures {...{ wellstream, dewPointPsia, reservoir }} />}
      <div className="fluid-columns">
        <Stack close>
          <Section
            title="Separator test"
            note="Gas volumes per stock-tank barrel, at the base of the sheet. Other units and arithmetic are read: “38 bar”, “12*640”."
          >
            <SeparatorSheet
              sheet={sheet}
              reading={reading}
              problems={problems}
              onChange={mayType ? setSheet : undefined}
            />
          </Section>
          {mayType && (
            <SampleForm
              sample={sample}
              test={query.error ? null : reading.test}
              onSaved={onSaved}
            />
          )}
        </Stack>
        <Stack close>
          {other && (
            <Notice tone="error" title="The wellstream could not be worked out.">
              {errorWords(other)}
            </Notice>
          )}
          {wellstream ? (
            <>
              <Section
                title={`Surface gas is ${formatPercent(wellstream.dryGasFraction, { decimals: 1 })} of the wellstream`}
                note="Moles that come with one stock-tank barrel, as gas at 14.696 psia and 60 °F"
              >
                <BalanceTable wellstream={wellstream} />
              </Section>
              <Section title="Does the sample hold together?">
                <FindingList findings={fluidFindings(wellstream, dewPointPsia, reservoir)} />
              </Section>
              <Section title="The gas in numbers">
                <GasTable wellstream={wellstream} />
              </Section>
              <DailyRates wellstream={wellstream} />
            </>
          ) : reading.test && query.isFetching ? (
            <Skeleton lines={8} label="Recombining" />
          ) : (
            <Section title="The wellstream">
              <p className="text-13 text-ink-soft">
                Appears when the sheet is filled in
                {reading.incomplete.length > 0
                  ? `: ${reading.incomplete.length} fields to go.`
                  : "."}
              </p>
            </Section>
          )}
        </Stack>
      </div>
      {draft && wellstream && reading.test && (
        <UseSampleDialog
          open={isUsing}
          onClose={() => setUsing(false)}
          test={reading.test}
          sampleId={sample && isSameFluid(sample.separatorTest, reading.test) ? sample.id : null}
          yieldStbPerMmscf={wellstream.condensateYieldStbPerMmscf}
        />
      )}
    </>
  );
}

/** P50 of pressure and temperature, where both are known. */
function stateOf(estimate: ReturnType<typeof useReservoir>["reading"]) {
  const pressure = estimate?.inputs.pressurePsia.compiled?.range.p50;
  const temperature = estimate?.inputs.temperatureDegF.compiled?.range.p50;
  return pressure === undefined || temperature === undefined
    ? null
    : { pressurePsia: pressure, temperatureDegF: temperature };
}

/** The engine's refusals, at the fields they are about. */
function problemsOf(error: Error | null): Partial<Record<SheetFieldName, string>> {
  if (!(error instanceof ProblemError)) return {};
  return Object.fromEntries(
    error.errors.flatMap(({ pointer, detail }) => {
      const field = fieldOfPointer(pointer);
      return field ? [[field, detail]] : [];
    }),
  );
}
