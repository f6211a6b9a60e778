"use client";

import { waitingWords } from "@/components/estimate/checklist";
import { Drivers } from "@/components/estimate/drivers";
import { ExceedanceSection } from "@/components/estimate/exceedance-section";
import { FindingList } from "@/components/estimate/finding-list";
import { inputOfPath } from "@/components/estimate/input-catalogue";
import { InputTable } from "@/components/estimate/input-table";
import { resultGroups } from "@/components/estimate/result-rows";
import { ResultTable } from "@/components/estimate/result-table";
import { Button, LinkButton } from "@/components/ui/button";
import { Columns, Section, Stack } from "@/components/ui/section";
import { EmptyState, Notice, Skeleton } from "@/components/ui/status";
import { useReservoir } from "../_editor/reservoir-context";
import { useChecklist } from "../_editor/use-checklist";
import { CorrelationsSection } from "./correlations-section";
import { LiveFoot } from "./live-foot";
import { Revisions } from "./revisions";
import { SamplingSection } from "./sampling-section";

/** The engineer's main place: ranges at the left, what they come to at the right, as they are typed. */
export function InputsTab() {
  const context = useReservoir();
  const { text, reading, draft, startFirst, results, resultBasis, warnings, place } = context;
  if (!text || !reading) {
    return (
      <EmptyState
        title="No estimate yet"
        action={
          startFirst && (
            <Button kind="primary" onClick={startFirst}>
              Begin the first estimate
            </Button>
          )
        }
      >
        {startFirst
          ? "Ten ranges and a separator test make the first estimate. Each field shows what is usual."
          : "An engineer has to begin it."}
      </EmptyState>
    );
  }
  return (
    <>
      <div className="editor-columns">
        <Stack>
          <section>
            <h2 className="sr-only">Inputs</h2>
            {resultBasis.units === "metric" && (
              <p className="mb-2 text-13 text-ink-soft">Inputs stay in field units.</p>
            )}
            <InputTable
              text={text}
              reading={reading}
              warnings={warnings}
              summary={results.summary}
              fluidHref={context.withBasis(`/fields/${place.field}/${place.reservoir}/fluid`)}
              onChange={draft?.setInput}
              planChanges={draft && { onPlan: draft.setPlan, onUse: draft.setUsesPlan }}
            />
            <OtherWarnings />
          </section>
          <CorrelationsSection text={text} draft={draft} />
          <Columns>
            <Exceedance />
            {draft && <SamplingSection />}
          </Columns>
        </Stack>
        <aside className="editor-side" aria-label="Results">
          <LiveResults />
        </aside>
      </div>
      <LiveFoot />
    </>
  );
}

/** Warnings that are about no single input: the fluid, the correlations, the depth. */
function OtherWarnings() {
  const { warnings, place, withBasis, text } = useReservoir();
  const about = warnings.filter((warning) => inputOfPath(warning.input) === null);
  // One input that is tied to several others is said once.
  const others = [...new Map(about.map((warning) => [warning.message, warning])).values()];
  if (others.length === 0 && text?.fluid) return null;
  const fluidHref = withBasis(`/fields/${place.field}/${place.reservoir}/fluid`);
  return (
    <div className="mt-3 grid gap-1.5">
      {!text?.fluid && (
        <Notice
          title="A fluid sample is needed before anything can be computed."
          actions={
            <LinkButton href={fluidHref} size="small">
              Enter a separator test
            </LinkButton>
          }
        />
      )}
      {others.map((warning) => (
        <Notice
          key={warning.code + warning.message}
          tone={warning.severity === "caution" ? "error" : "warning"}
          title={warning.severity === "caution" ? "Caution." : ""}
          live={false}
        >
          {warning.message}
          {warning.code === "sour_gas" &&
            " A competent person plans entry, equipment and monitoring under local rules."}
        </Notice>
      ))}
    </div>
  );
}

function Exceedance() {
  const { results, resultBasis, before, shown, place, reading } = useReservoir();
  if (!results.summary) {
    return (
      <Section title="How much, and how sure">
        <p className="text-ink-soft">
          {reading?.estimate
            ? "The curve is being worked out."
            : reading && reading.impossible.length > 0
              ? "The curve appears when no input is impossible."
              : reading && reading.problem !== null
                ? "The curve appears when the inputs can all be true together."
                : "The curve appears when every input is filled in."}
        </p>
      </Section>
    );
  }
  return (
    <ExceedanceSection
      summary={results.summary}
      label={shown ? `r${shown.revision}` : "first estimate"}
      before={before?.summary ? { label: `r${before.revision}`, summary: before.summary } : null}
      basis={resultBasis}
      place={`${place.field}-${place.reservoir}`}
    />
  );
}

/** Marks, drivers, the way to the reviewer and the revisions. */
function LiveResults() {
  const { results, resultBasis, before, draft, reading } = useReservoir();
  const { summary } = results;
  return (
    <>
      <RunWords />
      {summary ? (
        <ResultTable
          caption="Results"
          groups={resultGroups(summary, before?.summary ?? null, resultBasis)}
          isStale={results.isStale}
        />
      ) : draft?.reading.estimate ? (
        <Skeleton lines={7} label="Working the results out" />
      ) : (
        <p className="text-13 text-ink-soft">
          {reading && !reading.estimate ? waitingWords(reading) : "Not run yet."}
        </p>
      )}
      {summary && <Drivers summary={summary} basis={resultBasis} />}
      {draft && <BeforeSubmit />}
      <Revisions />
    </>
  );
}

function RunWords() {
  const { results, before, draft, reading, resultBasis } = useReservoir();
  const { summary, isFull, isStale } = results;
  if (!summary) return null;
  const { p90 } = summary.results.condensateRecoverableStb;
  const error = summary.results.condensateRecoverableStb.standardErrors.p90 / p90;
  return (
    <div className="run-status">
      <div className="run-status-line">
        <b>{isFull ? "Full run" : "Live"}</b>
        <span>
          {summary.trials.toLocaleString("en-US")} trials, seed {summary.seed}
        </span>
      </div>
      <p>
        {isStale && draft && (reading?.estimate ? "Catching up with what you typed. " : "")}
        {isStale && reading && !reading.estimate && `${waitingWords(reading)} `}
        P90 of condensate is known to within {(error * 100).toFixed(1)} % (one standard error).{" "}
        {resultBasis.words}.{before && ` Box behind a mark: approved r${before.revision}.`}
      </p>
    </div>
  );
}

function BeforeSubmit() {
  const { before } = useReservoir();
  const checklist = useChecklist();
  return (
    <section className="border-t border-rule-strong pt-3">
      <h3>Before you submit</h3>
      <FindingList findings={checklist} />
      {before && (
        <p className="mt-2 text-13 text-ink-soft">
          r{before.revision} stays approved until a reviewer decides.
        </p>
      )}
    </section>
  );
}
