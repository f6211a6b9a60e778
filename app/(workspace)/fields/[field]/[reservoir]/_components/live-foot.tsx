"use client";

import { RangeMark } from "@/components/charts/range-mark";
import { scaleFor } from "@/components/charts/scale";
import { routeMark } from "@/components/estimate/plan-words";
import { resultFactor, resultUnit, scaled } from "@/components/estimate/result-rows";
import { formatFigure } from "@/components/ui/format";
import { Unit } from "@/components/ui/text";
import { useReservoir } from "../_editor/reservoir-context";

/** On a phone, what the inputs come to rides at the bottom of the screen while they are typed. */
export function LiveFoot() {
  const { results, resultBasis, before, draft } = useReservoir();
  const { summary, isStale } = results;
  if (!draft || !summary) return null;
  const name = "condensateRecoverableStb";
  const factor = resultFactor(name, resultBasis);
  const unit = resultUnit(name, resultBasis);
  const range = scaled(summary.results[name], factor);
  const was = before?.summary ? scaled(before.summary.results[name], factor) : null;
  const mark = routeMark(summary.recovery?.route);
  const scale = scaleFor([range.p90, range.p10, range.mean, was?.p90, was?.p10], { pad: 0.06 });
  return (
    <div className="live-foot">
      <p>
        <span>{isStale ? "To the tank, catching up" : "To the tank, live"}</span>
        <span>
          {mark && <small className="text-warning-ink">{mark} </small>}
          <b>{formatFigure(range.p50)}</b> <Unit>{unit} P50</Unit>
        </span>
      </p>
      <span className="text-ink-soft">
        {formatFigure(range.p90)} to {formatFigure(range.p10)}
      </span>
      <RangeMark
        name="Condensate to the tank"
        range={range}
        before={was}
        unit={unit}
        scale={scale}
        gridLines={false}
        tipSide="right"
      />
    </div>
  );
}
