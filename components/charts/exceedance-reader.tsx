"use client";

import { useState, type KeyboardEvent, type PointerEvent } from "react";
import { formatFigure, formatPercent } from "@/components/ui/format";
import { chanceOf, type ExceedanceCurve } from "./exceedance-curve";
import { PlotDot, PlotLabel } from "./plot";
import { positionOn, valueAt, type Scale } from "./scale";

/** Reads the chance of any amount off the curve, under the pointer or with the arrow keys. */
export function ExceedanceReader({
  curve,
  scale,
  unit,
}: {
  curve: ExceedanceCurve;
  scale: Scale;
  unit: string;
}) {
  const [position, setPosition] = useState<number | null>(null);
  const at = position ?? 50;
  const value = valueAt(scale, at);
  const chance = chanceOf(curve, value);

  function handleMove(event: PointerEvent<HTMLDivElement>) {
    const box = event.currentTarget.getBoundingClientRect();
    setPosition(Math.min(100, Math.max(0, ((event.clientX - box.left) / box.width) * 100)));
  }

  function handleKey(event: KeyboardEvent) {
    const step = {
      ArrowRight: 1,
      ArrowUp: 1,
      ArrowLeft: -1,
      ArrowDown: -1,
      PageUp: 10,
      PageDown: -10,
    }[event.key];
    if (event.key === "Escape") return setPosition(null);
    if (!step) return;
    event.preventDefault();
    setPosition(Math.min(100, Math.max(0, at + step)));
  }

  return (
    <div
      className="absolute inset-0"
      role="slider"
      tabIndex={0}
      aria-label={`Amount, ${unit}`}
      aria-valuemin={scale.domain[0]}
      aria-valuemax={scale.domain[1]}
      aria-valuenow={Number(value.toPrecision(3))}
      aria-valuetext={`${formatPercent(chance)} chance of at least ${formatFigure(value)} ${unit}`}
      onPointerMove={handleMove}
      onPointerLeave={() => setPosition(null)}
      onFocus={(event) => event.currentTarget.matches(":focus-visible") && setPosition(50)}
      onBlur={() => setPosition(null)}
      onKeyDown={handleKey}
    >
      {position !== null && (
        <>
          <span className="cross-hair" style={{ left: `${position}%` }} />
          <PlotDot x={positionOn(scale, value)} y={100 - chance * 100} shape="open" />
          <PlotLabel
            x={position}
            y={100 - chance * 100}
            anchor={position > 60 ? "end" : "start"}
            dx={position > 60 ? -10 : 10}
            dy={chance > 0.9 ? 18 : -18}
          >
            <span className="bg-ink px-2 py-0.5 text-paper [text-shadow:none]">
              {formatPercent(chance)} chance of at least {formatFigure(value)} {unit}
            </span>
          </PlotLabel>
        </>
      )}
    </div>
  );
}
