"use client";

import { useState } from "react";
import type { QuantitySummary, ResultName } from "@/analytics/volumetrics/results-schema";
import { errorWords } from "@/app/_client/request";
import { chanceOf } from "@/components/charts/exceedance-curve";
import type { HistogramBin } from "@/components/charts/histogram";
import { WindowPicker, type ValueWindow } from "@/components/charts/window-picker";
import { ConditionalTable } from "@/components/drivers/conditional-table";
import { resultLabels } from "@/components/drivers/driver-names";
import { binsOf } from "@/components/estimate/histogram-section";
import { resultFactor, resultUnit } from "@/components/estimate/result-rows";
import { Button } from "@/components/ui/button";
import { Segmented } from "@/components/ui/choice";
import { NumberField } from "@/components/ui/field";
import { formatFigure, formatPercent } from "@/components/ui/format";
import { Section } from "@/components/ui/section";
import { Notice, Skeleton } from "@/components/ui/status";
import { useReservoir } from "../_editor/reservoir-context";
import { ABOVE_P10, useQuestion } from "../_editor/use-question";
import { useSettled } from "../_editor/use-live-results";
import { useConditional } from "../_queries/sensitivity";

type Choice = "aboveP10" | "aboveP50" | "belowP90" | "window";
interface Chances {
  from: number;
  to: number;
}

const choices: { value: Choice; label: string }[] = [
  { value: "aboveP10", label: "Above P10" },
  { value: "aboveP50", label: "Above P50" },
  { value: "belowP90", label: "Below P90" },
  { value: "window", label: "A window" },
];

const fixed: Record<Exclude<Choice, "window">, Chances> = {
  aboveP10: ABOVE_P10,
  aboveP50: { from: 0.5, to: 1 },
  belowP90: { from: 0, to: 0.1 },
};

/** Fewer trials than these have nothing to say. */
const LEAST_SHARE = 0.01;
const PAUSE_MS = 400;

/** The last half per cent at either end goes with the window, as the histogram is cut off there. */
const EDGE = 0.005;

/** The share of trials below each end of a window of amounts, to a thousandth. */
export function chancesOf(
  { exceedance }: Pick<QuantitySummary, "exceedance">,
  { low, high }: ValueWindow,
): Chances {
  const below = (value: number) => {
    const chance = Math.round((1 - chanceOf(exceedance, value)) * 1000) / 1000;
    return chance <= EDGE ? 0 : chance >= 1 - EDGE ? 1 : chance;
  };
  return { from: below(low), to: below(high) };
}

/** The bins that hold all but the last of the trials: a long thin tail leaves no room for the rest. */
function withoutTail(bins: readonly HistogramBin[]): HistogramBin[] {
  let share = 0;
  return bins.filter((bin) => {
    const isInside = share < 1 - EDGE;
    share += bin.share;
    return isInside;
  });
}

/** What the trials of a part of the range have in common. */
export function ConditionalSection({ result }: { result: ResultName }) {
  const { results, resultBasis, place } = useReservoir();
  const [choice, setChoice] = useState<Choice>("aboveP10");
  /** in the engine's unit; `null` before one was dragged or typed */
  const [window, setWindow] = useState<ValueWindow | null>(null);
  const quantity = results.summary?.results[result] ?? null;
  const middle = quantity && { low: quantity.p50, high: quantity.p10 };
  const shownWindow = window ?? middle;
  const chosen =
    choice !== "window"
      ? fixed[choice]
      : quantity && shownWindow
        ? chancesOf(quantity, shownWindow)
        : fixed.aboveP50;
  const settled = useSettled(chosen, PAUSE_MS);
  const isTooThin = chosen.to - chosen.from < LEAST_SHARE;
  const question = useQuestion(result, settled);
  const asked = settled.to - settled.from >= LEAST_SHARE;
  const query = useConditional(asked ? question : null);
  const factor = resultFactor(result, resultBasis);
  const unit = resultUnit(result, resultBasis);
  const name = resultLabels[result];
  if (!results.summary || !quantity) return null;

  return (
    <Section
      className="asked-section"
      title="What do the chosen trials share?"
      note={`Of ${name.toLowerCase()}: pick a part of its range and see which inputs put it there.`}
    >
      <div className="mb-4 flex flex-wrap items-end gap-x-6 gap-y-3">
        <Segmented label="Trials" value={choice} options={choices} onChange={setChoice} />
        <span className="pb-1 text-13 text-ink-soft" role="status">
          {query.isStale && "Looking at them"}
        </span>
      </div>
      {choice === "window" && shownWindow && (
        <div className="mb-6">
          <WindowFields
            window={shownWindow}
            factor={factor}
            unit={unit}
            share={chosen.to - chosen.from}
            onChange={setWindow}
          />
          <WindowPicker
            name={name}
            unit={unit}
            bins={withoutTail(binsOf(quantity, factor))}
            window={{ low: shownWindow.low * factor, high: shownWindow.high * factor }}
            tone={result.endsWith("Scf") ? "gas" : "condensate"}
            onChange={({ low, high }) => setWindow({ low: low / factor, high: high / factor })}
          />
        </div>
      )}
      {isTooThin ? (
        <Notice title="Fewer than one trial in a hundred lies in this window." live={false}>
          Drag it wider, or type amounts further apart.
        </Notice>
      ) : query.error ? (
        <Notice
          tone="error"
          live={false}
          title="The chosen trials could not be looked at."
          actions={
            <Button size="small" onClick={query.refetch}>
              Try again
            </Button>
          }
        >
          {errorWords(query.error)}
        </Notice>
      ) : query.view ? (
        <div aria-busy={query.isStale} className={query.isStale ? "opacity-60" : undefined}>
          <ConditionalTable
            view={query.view.conditional}
            trials={query.view.trials}
            storedTrials={results.summary.trials}
            name={name}
            unit={unit}
            factor={factor}
            fileName={`${place.field}-${place.reservoir}-${result}`}
          />
        </div>
      ) : (
        <Skeleton lines={8} label="Looking at the chosen trials" />
      )}
    </Section>
  );
}

/** The window typed as amounts; a figure that is none, or ends the wrong way round, changes nothing and says so. */
function WindowFields({
  window,
  factor,
  unit,
  share,
  onChange,
}: {
  window: ValueWindow;
  factor: number;
  unit: string;
  share: number;
  onChange: (window: ValueWindow) => void;
}) {
  /** what stands in a field while it differs from the window */
  const [typed, setTyped] = useState<{ low?: string; high?: string }>({});
  const read = (end: keyof ValueWindow) => {
    const text = typed[end];
    if (text === undefined) return window[end];
    const value = Number(text.replaceAll(",", "").trim());
    return text.trim() === "" || !Number.isFinite(value) ? null : value / factor;
  };
  const low = read("low");
  const high = read("high");
  const isReversed = low !== null && high !== null && low >= high;
  const textOf = (end: keyof ValueWindow) => typed[end] ?? formatFigure(window[end] * factor);

  function take() {
    if (low === null || high === null || isReversed) return;
    setTyped({});
    if (low !== window.low || high !== window.high) onChange({ low, high });
  }
  const problem = (value: number | null) => (value === null ? "Type a number." : undefined);
  return (
    <form
      className="mb-2 flex flex-wrap items-start gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        take();
      }}
    >
      <NumberField
        label="From"
        unit={unit}
        className="w-40"
        value={textOf("low")}
        error={problem(low)}
        onChange={(event) => setTyped({ ...typed, low: event.target.value })}
        onBlur={take}
      />
      <NumberField
        label="To"
        unit={unit}
        className="w-40"
        value={textOf("high")}
        error={problem(high) ?? (isReversed ? "Must be above the first." : undefined)}
        onChange={(event) => setTyped({ ...typed, high: event.target.value })}
        onBlur={take}
      />
      <p className="self-end pb-1.5 text-13 text-ink-soft" aria-live="polite">
        {formatPercent(share, { decimals: share < 0.1 ? 1 : 0 })} of the trials. Drag over the
        histogram to choose others.
      </p>
    </form>
  );
}
