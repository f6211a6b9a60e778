"use client";

import { useState, type ReactNode } from "react";
import { errorWords } from "@/app/_client/request";
import { useCan } from "@/app/_client/use-session";
import type { FluidSampleView } from "@/app/api/v1/fluid-samples/schema";
import { isSameFluid } from "@/components/estimate/differences";
import type { RecoveryRoute } from "@/analytics/recovery/recovery-curve-schema";
import { readPlan } from "@/components/estimate/plan-reading";
import type { AvailableCurve } from "@/components/fluid/available-curves";
import { FluidFigures, testWords } from "@/components/fluid/fluid-figures";
import { noRemarks, type SheetRemarks } from "@/components/fluid/take-lab-sheet";
import {
  conceptText,
  editsOfPlan,
  noEdits,
  type ConceptEdits,
} from "@/components/recovery/concept-assumptions";
import { Button } from "@/components/ui/button";
import { formatDate } from "@/components/ui/format";
import { Stack } from "@/components/ui/section";
import { Notice } from "@/components/ui/status";
import { useReservoir } from "../_editor/reservoir-context";
import { useFluidStudy } from "../_editor/use-fluid-study";
import type { SampleDraft } from "../_editor/use-sample";
import { refusalsOf } from "../_queries/fluid-calculations";
import { FluidDepletion } from "./fluid-depletion";
import { FluidEntry } from "./fluid-entry";
import { FluidLabFile } from "./fluid-lab-file";
import { FluidPhase } from "./fluid-phase";
import { PressureOverZSection } from "./pressure-over-z-section";
import { SampleForm } from "./sample-form";
import { UseSampleDialog } from "./use-sample-dialog";

/** Liquid below it does not flow, per cent of pore space; common practice, no source. */
const usualCriticalBand = { low: 10, high: 20 };

/** One fluid sample: its sheets, and everything that follows from them. */
export function FluidSample({
  sample,
  isNewer,
  draft,
  chooser,
  onSaved,
}: {
  sample: FluidSampleView | null;
  /** the estimate was made with an earlier version of its separator test */
  isNewer: boolean;
  draft: SampleDraft;
  chooser: ReactNode;
  onSaved: (sample: FluidSampleView) => void;
}) {
  const { page, reading: estimate, draft: estimateDraft, text: estimateText } = useReservoir();
  const can = useCan();
  const mayType = can(sample ? "fluidSample.update" : "fluidSample.create");
  const [isUsing, setUsing] = useState(false);
  const [remarks, setRemarks] = useState<SheetRemarks>(noRemarks);
  const [route, setRoute] = useState<RecoveryRoute | null>(null);
  const [typedAbandonment, setAbandonment] = useState<number | null>(null);
  const [criticalBand, setCriticalBand] = useState(usualCriticalBand);
  const [typedEdits, setEdits] = useState<ConceptEdits | null>(null);
  const planned = estimateText?.usesPlan ? estimateText.plan : null;
  const edits = typedEdits ?? (planned ? editsOfPlan(planned) : noEdits);
  const { text, reading } = draft;
  const reservoir = stateOf(estimate);
  const study = useFluidStudy(text, reading, reservoir);
  const wellstream = study.wellstream.data ?? null;
  const curve =
    study.curves.find((candidate) => candidate.route === route) ?? study.curves.at(0) ?? null;
  // The line begins where depletion is compared with other concepts: at P50 of what is assumed there.
  const depletion =
    curve &&
    estimateText &&
    readPlan(
      conceptText(
        "depletion",
        {
          curve: curve.curve,
          sampleName: sample?.name ?? null,
          pressurePsia: estimate?.inputs.pressurePsia.compiled?.range ?? null,
          depthFt: estimateText.depthFt,
          criticalSaturation: { low: criticalBand.low / 100, high: criticalBand.high / 100 },
        },
        edits,
      ),
    );
  const abandonmentRange =
    (depletion && depletion.inputs.abandonmentPressurePsia.compiled?.range) ?? null;
  const place = `${page.field.slug}-${page.slug}`;
  const isReady = wellstream !== null && study.test !== null && !study.wellstream.error;
  const shared = {
    draft,
    study,
    mayType,
    reservoir,
    place,
    remarks,
    setRemarks,
    criticalBand,
    setCriticalBand,
    curve,
    setRoute,
    waterSaturation: estimate?.inputs.waterSaturation.compiled?.range.p50 ?? null,
    edits,
    onEdits: setEdits,
    abandonmentRange,
    abandonment: curve && abandonmentOn(curve, typedAbandonment ?? abandonmentRange?.p50 ?? null),
    onAbandon: setAbandonment,
  };

  return (
    <Stack close>
      <div className="flex flex-wrap items-end justify-between gap-3">
        {chooser || <h2>A first sample</h2>}
        <div className="flex flex-wrap items-center gap-2">
          {mayType && draft.isChanged && (
            <>
              <span className="text-13 text-ink-soft">
                Not saved{draft.restoredAt && `, typed ${formatDate(draft.restoredAt, "time")}`}
              </span>
              <Button onClick={draft.revert}>{sample ? "Back to the saved one" : "Clear"}</Button>
            </>
          )}
          {estimateDraft && isReady && (
            <Button kind="primary" onClick={() => setUsing(true)}>
              Use in the draft
            </Button>
          )}
        </div>
      </div>
      {isNewer && (
        <Notice
          title="The estimate was made with an earlier separator test of this sample."
          actions={
            estimateDraft && isReady && !draft.isChanged ? (
              <Button size="small" onClick={() => setUsing(true)}>
                Update the draft
              </Button>
            ) : undefined
          }
        >
          It keeps that copy until the newer one is put into a draft.
        </Notice>
      )}
      {mayType && <FluidLabFile draft={draft} onTaken={setRemarks} />}
      <nav className="fluid-anchors" aria-label="Parts of the sample">
        <a href="#sheets">Sheets</a>
        <a href="#phase">Phase behaviour</a>
        <a href="#depletion">Depletion</a>
        <a href="#checks">Checks</a>
        {mayType && <a href="#keep">Keep it</a>}
      </nav>
      <FluidFigures
        wellstream={wellstream}
        composition={study.composition.data}
        equationOfState={study.equationOfState.data}
        curve={curve}
        measuredDewPointPsia={study.measuredDewPointPsia}
        temperatureDegF={study.temperatureDegF}
        initialPressurePsia={reservoir?.pressurePsia ?? null}
        isComputed={text.origin === "computed"}
      />
      <Failures study={study} />
      <div className="fluid-top">
        <FluidEntry {...shared} />
        <FluidPhase {...shared} />
      </div>
      <FluidDepletion {...shared} sampleName={sample?.name ?? null} />
      <PressureOverZSection {...shared} />
      {mayType && (
        <div id="keep">
          <SampleForm
            sample={sample}
            draft={draft}
            test={study.wellstream.error ? null : study.test}
            onSaved={onSaved}
          />
        </div>
      )}
      {estimateDraft && study.test && wellstream && (
        <UseSampleDialog
          open={isUsing}
          onClose={() => setUsing(false)}
          // The saved sheet itself, to the last digit: a draft that differs from it would lose its sample.
          {...(sample && isSameFluid(sample.separatorTest, study.test)
            ? { test: sample.separatorTest, sampleId: sample.id }
            : { test: study.test, sampleId: null })}
          origin={testWords(text.origin === "computed", study.equationOfState.data)}
          yieldStbPerMmscf={wellstream.condensateYieldStbPerMmscf}
        />
      )}
    </Stack>
  );
}

/** What parts of a sample's page have in common. */
export interface FluidPartProps {
  draft: SampleDraft;
  study: ReturnType<typeof useFluidStudy>;
  mayType: boolean;
  reservoir: { pressurePsia: number; temperatureDegF: number } | null;
  /** for the names of files */
  place: string;
  remarks: SheetRemarks;
  setRemarks: (remarks: SheetRemarks) => void;
  /** per cent of pore space */
  criticalBand: { low: number; high: number };
  setCriticalBand: (band: { low: number; high: number }) => void;
  /** P50 of the estimate; `null` while unknown */
  waterSaturation: number | null;
  /** what was typed over the concepts' figures to start from */
  edits: ConceptEdits;
  onEdits: (edits: ConceptEdits) => void;
  /** of depletion; `null` while unknown */
  abandonmentRange: { p90: number; p50: number; p10: number } | null;
  /** what figures stand on; `null` while there is none */
  curve: AvailableCurve | null;
  setRoute: (route: RecoveryRoute) => void;
  /** psia, on the curve; `null` without one */
  abandonment: number | null;
  onAbandon: (pressurePsia: number) => void;
}

/** Where the line of abandonment stands: where it was put, as far as the curve is known there. */
function abandonmentOn({ curve }: AvailableCurve, wanted: number | null): number {
  const { points, dewPointPsia } = curve;
  const lowest = Math.ceil(points[points.length - 1].pressurePsia);
  // A fifth of the dew point is only where the line begins; it is there to be moved, in steps of 10 psi.
  const start = Math.round((wanted ?? dewPointPsia / 5) / 10) * 10;
  return Math.min(Math.floor(dewPointPsia), Math.max(lowest, start));
}

/** Calculations that gave no answer for a reason that belongs to no field. */
function Failures({ study }: { study: ReturnType<typeof useFluidStudy> }) {
  const placed = Object.values(study.problems).flatMap((cells) => Object.values(cells));
  const failures = [
    { what: "The composition could not be worked out.", error: study.composition.error },
    { what: "The equation of state gave no answer.", error: study.equationOfState.error },
    { what: "The depletion table could not be worked out.", error: study.depletion.error },
  ].filter(
    ({ error }) =>
      error !== null && !refusalsOf(error).some(({ detail }) => placed.includes(detail)),
  );
  return failures.map(({ what, error }) => (
    <Notice key={what} tone="error" title={what}>
      {errorWords(error)} What was typed is kept.
    </Notice>
  ));
}

/** P50 of pressure and temperature, where both are known. */
function stateOf(estimate: ReturnType<typeof useReservoir>["reading"]) {
  const pressure = estimate?.inputs.pressurePsia.compiled?.range.p50;
  const temperature = estimate?.inputs.temperatureDegF.compiled?.range.p50;
  return pressure === undefined || temperature === undefined
    ? null
    : { pressurePsia: pressure, temperatureDegF: temperature };
}
