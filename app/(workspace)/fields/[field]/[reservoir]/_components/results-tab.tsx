"use client";

import { useState } from "react";
import { recoveryRouteLabels } from "@/analytics/recovery/recovery-curve-schema";
import type { ResultName } from "@/analytics/volumetrics/results-schema";
import { chanceOf } from "@/components/charts/exceedance-curve";
import { ExceedanceSection } from "@/components/estimate/exceedance-section";
import { HistogramSection } from "@/components/estimate/histogram-section";
import {
  deterministicWords,
  swansonFinding,
  swansonReason,
} from "@/components/estimate/moment-findings";
import { MomentsTable } from "@/components/estimate/moments-table";
import { conceptLabels } from "@/components/estimate/plan-words";
import { PrecisionTable } from "@/components/estimate/precision-table";
import {
  enoughTrials,
  errorWords,
  precisionFinding,
  runWords,
} from "@/components/estimate/precision-words";
import { resultGroups, resultFactor, resultUnit } from "@/components/estimate/result-rows";
import { ResultTable } from "@/components/estimate/result-table";
import { PlaceBar, PlaceKey } from "@/components/recovery/concept-bars";
import { GasBalance, PhaseTable } from "@/components/recovery/phase-table";
import { Columns, Section, Stack } from "@/components/ui/section";
import { EmptyState, Skeleton } from "@/components/ui/status";
import { LedgerTable, FigureCell } from "@/components/ui/table";
import { formatDate, formatPercent, fractionDigits } from "@/components/ui/format";
import { useReservoir } from "../_editor/reservoir-context";
import { ConditionalSection } from "./conditional-section";
import { derivedRows } from "./derived-rows";
import { DriversSection } from "./drivers-section";
import { SettlePanel } from "./settle-panel";

/** Everything a run gives, with the errors of its sampling. */
export function ResultsTab() {
  const { results, resultBasis, before, shown, place, draft } = useReservoir();
  const [result, setResult] = useState<ResultName>("condensateRecoverableStb");
  const { summary } = results;
  if (!summary) {
    return draft?.reading.estimate ? (
      <Skeleton lines={10} label="Working the results out" />
    ) : (
      <EmptyState title="Nothing was run yet">
        Results appear here when every input is filled in.
      </EmptyState>
    );
  }
  const placeName = `${place.field}-${place.reservoir}`;
  const label = shown ? `r${shown.revision}` : "first estimate";
  const old = before?.summary ? { label: `r${before.revision}`, summary: before.summary } : null;
  return (
    <Stack>
      <Columns kind="equal">
        <Section
          title="In place and recoverable"
          note={`${resultBasis.words}. ${old ? `Box behind a mark: approved ${old.label}.` : ""}`}
        >
          <ResultTable
            caption="In place and recoverable"
            groups={resultGroups(summary, old?.summary ?? null, resultBasis)}
            isStale={results.isStale}
          />
        </Section>
        <Section
          title="What follows from the inputs"
          note="Percentiles of the trials; the wellstream is recombined in each of them."
        >
          <DerivedTable />
        </Section>
      </Columns>
      <MomentsSection />
      <Columns kind="equal">
        <ExceedanceSection
          summary={summary}
          label={label}
          before={old}
          basis={resultBasis}
          place={placeName}
        />
        <ExceedanceSection
          summary={summary}
          label={label}
          before={old}
          basis={resultBasis}
          result="salesGasScf"
          name="Sales gas"
          place={placeName}
        />
      </Columns>
      <Columns kind="equal">
        <HistogramSection
          summary={summary}
          basis={resultBasis}
          result="condensateRecoverableStb"
          name="Condensate to the tank"
          place={placeName}
        />
        <HistogramSection
          summary={summary}
          basis={resultBasis}
          result="wetGasInPlaceScf"
          name="Wet gas in place"
          place={placeName}
        />
      </Columns>
      <Columns kind="equal">
        <DriversSection result={result} onResult={setResult} />
        <ConditionalSection key={result} result={result} />
      </Columns>
      <RecoverySection />
      <SamplingSection />
    </Stack>
  );
}

function DerivedTable() {
  const { results, resultBasis } = useReservoir();
  if (!results.summary) return null;
  return (
    <LedgerTable caption="Derived quantities">
      <thead>
        <tr>
          <th scope="col">Quantity</th>
          {["P90", "P50", "P10", "Mean"].map((level) => (
            <th key={level} scope="col" className="right">
              {level}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {derivedRows(results.summary, resultBasis).map(({ label, unit, range }) => {
          const digits = fractionDigits([range.p90, range.p50, range.p10, range.mean]);
          return (
            <tr key={label}>
              <th scope="row" className="wrap plain">
                {label} {unit && <span className="unit">{unit}</span>}
              </th>
              <FigureCell value={range.p90} fraction={digits} />
              <FigureCell value={range.p50} fraction={digits} strong />
              <FigureCell value={range.p10} fraction={digits} />
              <FigureCell value={range.mean} fraction={digits} />
            </tr>
          );
        })}
      </tbody>
    </LedgerTable>
  );
}

/** Where the condensate ends up and what is recovered when, for a revision whose recoveries a plan worked out. */
function RecoverySection() {
  const { results, resultBasis } = useReservoir();
  const recovery = results.summary?.recovery;
  if (!recovery) return null;
  const { shares, concept } = recovery;
  return (
    <Columns kind="equal">
      <Section
        title={`${formatPercent(shares.leftInRock)} of the condensate stays in the rock`}
        note={`${conceptLabels[concept]}, ${recoveryRouteLabels[recovery.route].toLowerCase()}. Means over the trials, of the condensate in place.`}
      >
        <PlaceKey />
        <PlaceBar name={conceptLabels[concept]} shares={shares} />
        {recovery.gasBalance && (
          <div className="mt-4">
            <GasBalance balance={recovery.gasBalance} basis={resultBasis} />
          </div>
        )}
      </Section>
      <Section
        title={`${formatPercent(shares.toTank)} reaches the tank`}
        note="Condensate of each phase, per cent of what is in place, and gas under it."
      >
        <PhaseTable concepts={[recovery]} />
      </Section>
    </Columns>
  );
}

/** What stands for the range as one figure, and why the usual short cuts differ from the mean. */
function MomentsSection() {
  const { results, resultBasis } = useReservoir();
  const { summary } = results;
  if (!summary) return null;
  const name = "condensateRecoverableStb";
  const quantity = summary.results[name];
  const factor = resultFactor(name, resultBasis);
  const unit = resultUnit(name, resultBasis);
  const chance = chanceOf(quantity.exceedance, summary.deterministic[name]);
  return (
    <Section
      title={swansonFinding(quantity, factor, unit)}
      note={`Condensate to the tank. ${swansonReason(quantity)} ${deterministicWords(summary.deterministic[name], chance, factor, unit)}`}
    >
      <MomentsTable summary={summary} basis={resultBasis} />
    </Section>
  );
}

/** How well the trials know the percentiles, what made them, and running on until they are known well enough. */
function SamplingSection() {
  const { results, resultBasis, shown } = useReservoir();
  const { summary } = results;
  if (!summary) return null;
  const name = "condensateRecoverableStb";
  const factor = resultFactor(name, resultBasis);
  const enough = enoughTrials(summary, summary.results[name], factor);
  const at =
    shown?.computedAt && results.isFull ? `, run ${formatDate(shown.computedAt, "time")} UTC` : "";
  return (
    <Columns kind="equal">
      <Section
        title={precisionFinding(summary.trials, summary.results[name], factor)}
        note={`Heading: condensate to the tank, 95 %. Table: one standard error of sampling. ${runWords(summary)}${at}. ${errorWords(summary)}${enough ? ` ${enough}` : ""}`}
      >
        <PrecisionTable summary={summary} basis={resultBasis} />
      </Section>
      <SettlePanel />
    </Columns>
  );
}
