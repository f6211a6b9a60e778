"use client";

import { useState, type ReactNode } from "react";
import type { RecoveryRoute } from "@/analytics/recovery/recovery-curve-schema";
import {
  producingConcepts,
  type ProducingConcept,
} from "@/analytics/recovery/recovery-plan-schema";
import type { ConceptStart } from "@/analytics/recovery/starting-plan";
import { errorWords } from "@/app/_client/request";
import { ChartFrame } from "@/components/charts/chart-frame";
import { readEstimate } from "@/components/estimate/estimate-reading";
import type { EstimateText } from "@/components/estimate/estimate-text";
import { FindingList } from "@/components/estimate/finding-list";
import { readPlan } from "@/components/estimate/plan-reading";
import type { PlanText } from "@/components/estimate/plan-text";
import { conceptLabels, shortConcepts } from "@/components/estimate/plan-words";
import { resultFactor, resultUnit } from "@/components/estimate/result-rows";
import { RouteFlag } from "@/components/estimate/route-flag";
import { routeWords, type AvailableCurve } from "@/components/fluid/available-curves";
import { AssumptionTable, type ConceptTexts } from "@/components/recovery/assumption-table";
import {
  conceptText,
  isEdited,
  noEdits,
  withEdit,
  type ConceptEdits,
} from "@/components/recovery/concept-assumptions";
import { ConceptBars } from "@/components/recovery/concept-bars";
import { conceptFinding } from "@/components/recovery/concept-findings";
import { conceptData, ConceptTable } from "@/components/recovery/concept-table";
import { warningsByConcept } from "@/components/recovery/concept-warnings";
import { GasBalance, PhaseTable } from "@/components/recovery/phase-table";
import { Button } from "@/components/ui/button";
import { Disclosure } from "@/components/ui/dialog";
import { formatFigure } from "@/components/ui/format";
import { Columns, Section, Stack } from "@/components/ui/section";
import { Notice, Skeleton } from "@/components/ui/status";
import { useReservoir } from "../_editor/reservoir-context";
import { useConcepts } from "../_queries/recovery";
import { NearWellSection, type NearWellSectionProps } from "./near-well-section";
import { UsePlanDialog } from "./use-plan-dialog";

export interface ConceptComparisonProps {
  /** depletion curves of the sample, most trusted first, as `availableCurves` gives them; may be empty */
  curves: readonly AvailableCurve[];
  /** what the estimate of the near-well loss flashes; `null` without a composition */
  fluid: NearWellSectionProps["fluid"] | null;
  /** named in the sources of a plan that is put into the draft; `null` for a sample that was not saved */
  sampleName: string | null;
  /** the curve that the page's figures stand on; absent: the most trusted */
  route?: RecoveryRoute | null;
  /** per cent of pore space, as set at the curve */
  criticalBand: { low: number; high: number };
  /** what was typed over the figures to start from */
  edits: ConceptEdits;
  onEdits: (edits: ConceptEdits) => void;
  /** why there is no curve, where that is known */
  noCurveReason: string | null;
  /** stands beside the bars on a wide screen */
  beside: ReactNode;
}

/**
 * Where the liquid goes by depletion, with compression and by cycling, and the way into the draft. Needs a
 * `ReservoirProvider` above it; takes the estimate's inputs, seed, basis and draft from there.
 */
export function ConceptComparison(props: ConceptComparisonProps) {
  const { text } = useReservoir();
  const chosen = props.curves.find(({ route }) => route === props.route) ?? props.curves[0];
  if (chosen && text) return <Comparison {...props} chosen={chosen} text={text} />;
  return (
    <Columns>
      {props.beside}
      <Section title="Where the liquid goes">
        <p className="text-13 text-ink-soft">
          {text
            ? `Depletion, compression and cycling stand side by side here as soon as there is a depletion curve. ${props.noCurveReason ?? ""}`
            : "Appears when an estimate is begun."}
        </p>
      </Section>
    </Columns>
  );
}

function Comparison({
  chosen,
  fluid,
  sampleName,
  criticalBand,
  edits,
  onEdits,
  beside,
  text,
}: ConceptComparisonProps & { chosen: AvailableCurve; text: EstimateText }) {
  const { place, shown, draft, reading, resultBasis } = useReservoir();
  const planned = text.usesPlan ? text.plan : null;
  const [using, setUsing] = useState<ProducingConcept | null>(null);
  const pressure = reading?.inputs.pressurePsia.compiled?.range;
  const start: ConceptStart = {
    curve: chosen.curve,
    sampleName,
    pressurePsia: pressure ?? null,
    depthFt: text.depthFt,
    criticalSaturation: { low: criticalBand.low / 100, high: criticalBand.high / 100 },
  };
  const texts = Object.fromEntries(
    producingConcepts.map((concept) => {
      const typed = conceptText(concept, start, edits);
      return [concept, { text: typed, reading: readPlan(typed) }];
    }),
  ) as ConceptTexts;
  // Recoveries are worked out here, so those that are typed, or not typed yet, do not matter.
  const estimate = readEstimate({ ...text, plan: texts.depletion.text, usesPlan: true });
  const results = useConcepts(
    estimate.estimate,
    {
      depletion: texts.depletion.reading.plan,
      compression: texts.compression.reading.plan,
      cycling: texts.cycling.reading.plan,
    },
    shown?.seed ?? 1,
  );
  const { concepts } = results;
  const factor = resultFactor("condensateRecoverableStb", resultBasis);
  const unit = resultUnit("condensateRecoverableStb", resultBasis);
  const inPlace = concepts[0]?.condensateInPlaceStb.mean;
  const cycling = concepts.find(({ gasBalance }) => gasBalance !== null);
  const unread = producingConcepts.filter((concept) => !texts[concept].reading.plan);
  const findings = warningsByConcept(concepts);
  const change = (now: PlanText, next: PlanText) => onEdits(withEdit(edits, now, next));

  return (
    <Stack close>
      <Columns>
        {beside}
        <Stack close>
          <ChartFrame
            title={markedTitle(conceptFinding(concepts, factor, unit), chosen.route)}
            note={
              inPlace === undefined
                ? "Condensate in place, by where it ends up."
                : `Condensate in place ${formatFigure(inPlace * factor)} ${unit}, ${resultBasis.words.toLowerCase()}. Heading and bars: means over 4,000 trials. Mark: P90 to P10 of the share that reaches the tank.`
            }
            fileName={`${place.field}-${place.reservoir}-concepts`}
            data={conceptData(concepts, resultBasis)}
          >
            {concepts.length > 0 ? (
              <ConceptBars
                concepts={concepts}
                isStale={results.isStale}
                action={
                  draft
                    ? (concept) => (
                        <UseLink
                          concept={concept}
                          isUsed={planned?.concept === concept}
                          isPossible={texts[concept].reading.plan !== null}
                          onUse={() => setUsing(concept)}
                        />
                      )
                    : undefined
                }
              />
            ) : results.isPending ? (
              <Skeleton lines={5} label="Setting the concepts side by side" />
            ) : (
              <p className="text-13 text-ink-soft">
                {estimate.estimate
                  ? "Nothing could be worked out; the assumptions below say why."
                  : "Appears when every input of the estimate is filled in and possible. Recoveries are not needed."}
              </p>
            )}
          </ChartFrame>
          {concepts.length > 0 && <ConceptTable concepts={concepts} basis={resultBasis} />}
          {results.errors.map(({ concept, error }) => (
            <Notice
              key={concept}
              tone="error"
              live={false}
              title={`${conceptLabels[concept]} could not be worked out.`}
            >
              {errorWords(error)}
            </Notice>
          ))}
          {unread.length > 0 && (
            <Notice
              title={`${unread.map((concept) => shortConcepts[concept]).join(", ")}: an assumption has to be filled in or corrected.`}
              live={false}
            />
          )}
          <p className="text-13 text-ink-soft">
            <b className="text-ink">{chosen.label}.</b> {routeWords[chosen.route].note}{" "}
            <RouteFlag route={chosen.route} />
          </p>
        </Stack>
      </Columns>
      <Disclosure label="Assumptions of the concepts">
        <div className="assumptions">
          <p className="text-13 text-ink-soft">
            Figures to start from are common practice without a source; put the field’s own in their
            place. What changes here changes the comparison, and the draft only when a concept is
            used.{" "}
            {isEdited(edits) && (
              <Button size="small" onClick={() => onEdits(noEdits)}>
                Start from common practice again
              </Button>
            )}
          </p>
          <AssumptionTable texts={texts} onChange={change} />
        </div>
      </Disclosure>
      <Columns kind="equal">
        {concepts.length > 0 && (
          <Section
            level={3}
            title="What is recovered when"
            note="Condensate of each phase, per cent of what is in place, and gas under it; means over the trials. While cycling, gas counts net of what is put back, burnt and bought."
          >
            <PhaseTable concepts={concepts} />
            {cycling?.gasBalance && (
              <div className="mt-4">
                <GasBalance balance={cycling.gasBalance} basis={resultBasis} />
              </div>
            )}
          </Section>
        )}
        <Stack close>
          {findings.length > 0 && (
            <Section level={3} title="What a reviewer will ask about the concepts">
              <FindingList findings={findings} />
            </Section>
          )}
          {fluid && pressure && (
            <NearWellSection
              fluid={fluid}
              temperatureDegF={chosen.curve.temperatureDegF}
              dewPointPsia={chosen.curve.dewPointPsia}
              initialPsia={pressure.p50}
            />
          )}
        </Stack>
      </Columns>
      {using && texts[using].reading.plan && (
        <UsePlanDialog
          plan={texts[using].reading.plan}
          view={concepts.find(({ concept }) => concept === using) ?? null}
          onClose={() => setUsing(null)}
        />
      )}
    </Stack>
  );
}

/** A heading that no measured depletion stands behind says so. */
function markedTitle(title: string, route: RecoveryRoute): string {
  const words = title[0].toLowerCase() + title.slice(1);
  if (route === "correlation") return `By correlation, ${words}`;
  return route === "untunedEquationOfState" ? `Untuned: ${words}` : title;
}

function UseLink({
  concept,
  isUsed,
  isPossible,
  onUse,
}: {
  concept: ProducingConcept;
  isUsed: boolean;
  isPossible: boolean;
  onUse: () => void;
}) {
  const words = isUsed ? "Use again" : "Use in the draft";
  return (
    <span className="use-concept">
      {isUsed && <small>In the draft</small>}
      <button
        type="button"
        className="link-button"
        disabled={!isPossible}
        aria-label={`${words}: ${conceptLabels[concept].toLowerCase()}`}
        onClick={onUse}
      >
        {words}
      </button>
    </span>
  );
}
