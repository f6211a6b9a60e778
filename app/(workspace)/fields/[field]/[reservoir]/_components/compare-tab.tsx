"use client";

import Link from "next/link";
import { comparisonHref } from "@/components/compare/sides";
import { differenceFinding } from "@/components/estimate/findings";
import {
  inputDifferences,
  isSameFluid,
  recoveryDifferences,
} from "@/components/estimate/differences";
import { CorrelationDifferences } from "@/components/estimate/difference-correlations";
import { DifferenceTable } from "@/components/estimate/difference-table";
import { ExceedanceSection } from "@/components/estimate/exceedance-section";
import { FindingList } from "@/components/estimate/finding-list";
import { resultGroups } from "@/components/estimate/result-rows";
import { PlanDifferenceTable } from "@/components/estimate/plan-difference-table";
import { ResultChangeTable } from "@/components/estimate/result-change-table";
import { Columns, Section, Stack } from "@/components/ui/section";
import { EmptyState, Skeleton } from "@/components/ui/status";
import { useReservoir } from "../_editor/reservoir-context";
import { DecisionPanel } from "./decision-panel";
import { ExplainedChange } from "./explained-change";

/** What a reviewer looks at: inputs and results against the approved revision, the checks, and the decision. */
export function CompareTab() {
  const { shown, before, draft, results, resultBasis, place, warnings, withBasis } = useReservoir();
  const inputs = draft?.reading.estimate ?? shown?.inputs ?? null;
  if (!inputs) {
    return (
      <EmptyState title="Nothing to compare yet">
        The comparison appears when every input is filled in.
      </EmptyState>
    );
  }
  if (shown?.state === "approved" && !draft) {
    return (
      <EmptyState title={`r${shown.revision} is the approved estimate`}>
        Open revisions are compared with it here.
      </EmptyState>
    );
  }
  const differences = inputDifferences(inputs, before?.inputs ?? null);
  const changed = differences.filter(({ isSame }) => !isSame);
  const fluidChanged = before !== null && !isSameFluid(inputs.fluid, before.inputs.fluid);
  const label = shown ? `r${shown.revision}` : "first estimate";
  return (
    <Columns kind="side">
      <Stack>
        <Section
          title={
            before
              ? differenceFinding(changed.length, differences.length, before.revision)
              : "A first estimate: every input is new"
          }
          note={`${before ? `Box: approved r${before.revision}. Line: ${label}. Each input on its own scale.` : "Each input on its own scale."}${fluidChanged ? " The separator test is another one." : ""}`}
        >
          <DifferenceTable
            differences={[
              ...differences,
              ...recoveryDifferences({ inputs, summary: results.summary }, before),
            ]}
            warnings={warnings}
          />
          <PlanDifferenceTable
            now={inputs.recoveryPlan}
            before={before && { plan: before.inputs.recoveryPlan, label: `r${before.revision}` }}
          />
          {before && (
            <CorrelationDifferences
              now={{ pairs: inputs.correlations, label }}
              before={{ pairs: before.inputs.correlations, label: `r${before.revision}` }}
            />
          )}
        </Section>
        {!results.summary && draft?.reading.estimate && (
          <Skeleton lines={7} label="Working the results out" />
        )}
        {results.summary && (
          <Section
            title={before ? "What it does to the results" : "Results"}
            note={`${resultBasis.words}.`}
          >
            <ResultChangeTable
              groups={resultGroups(results.summary, before?.summary ?? null, resultBasis)}
            />
          </Section>
        )}
        <ExplainedChange />
        {results.summary && (
          <ExceedanceSection
            summary={results.summary}
            label={label}
            before={
              before?.summary ? { label: `r${before.revision}`, summary: before.summary } : null
            }
            basis={resultBasis}
            place={`${place.field}-${place.reservoir}`}
          />
        )}
      </Stack>
      <aside className="editor-side" aria-label="Checks and decision">
        <Section title={warnings.length === 0 ? "No check warns" : "Checks that warn"}>
          <FindingList
            findings={
              warnings.length === 0
                ? [
                    {
                      tone: "done",
                      text: "Every input and the fluid are within their usual ranges",
                    },
                  ]
                : warnings.map(({ severity, message }) => ({
                    tone: severity === "caution" ? "caution" : "warning",
                    text: message,
                  }))
            }
          />
        </Section>
        {shown?.note && (
          <Section
            title={`What ${shown.submitter?.name ?? shown.creator?.name ?? "the author"} says`}
          >
            <p className="text-13">{shown.note}</p>
          </Section>
        )}
        <DecisionPanel />
        {shown && (
          <p className="text-13">
            <Link
              href={withBasis(
                comparisonHref({
                  left: before && { kind: "estimate", estimateId: before.id },
                  right: { kind: "estimate", estimateId: shown.id },
                }),
              )}
            >
              Compare {label} with another revision, concept or field
            </Link>
          </p>
        )}
      </aside>
    </Columns>
  );
}
