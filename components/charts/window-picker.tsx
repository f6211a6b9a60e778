"use client";

import { useRef, useState, type KeyboardEvent, type PointerEvent } from "react";
import { formatFigure } from "@/components/ui/format";
import type { HistogramBin } from "./histogram";
import { Plot } from "./plot";
import { percent, positionOn, ticksOf, valueAt, type Scale } from "./scale";

export interface ValueWindow {
  low: number;
  high: number;
}

export interface WindowPickerProps {
  /** "Condensate to the tank" */
  name: string;
  unit: string;
  bins: readonly HistogramBin[];
  window: ValueWindow;
  /** called when a drag ends, and for every step of a key */
  onChange: (window: ValueWindow) => void;
  tone?: string;
  height?: number;
}

/** Share of the axis that a key moves an end. */
const STEP = 1;
/** Less than this is a click that slipped, not a window. */
const LEAST_DRAG = 1.5;

const ordered = (a: number, b: number): [number, number] => (a < b ? [a, b] : [b, a]);
const within = (position: number) => Math.min(100, Math.max(0, position));

/** A histogram over which a window of amounts is dragged, or moved end by end with the keys. */
export function WindowPicker({
  name,
  unit,
  bins,
  window,
  onChange,
  tone,
  height = 150,
}: WindowPickerProps) {
  const area = useRef<HTMLDivElement>(null);
  /** positions [%] while the pointer is down: where it began, where it is */
  const [drag, setDrag] = useState<[number, number] | null>(null);
  const scale: Scale = {
    kind: "linear",
    domain: [bins[0]?.low ?? 0, bins.at(-1)?.high ?? 1],
  };
  const highest = Math.max(...bins.map(({ share }) => share), 1e-9);
  const kept: [number, number] = [
    within(positionOn(scale, window.low)),
    within(positionOn(scale, window.high)),
  ];
  const [left, right] = drag ? ordered(...drag) : kept;

  function positionOf(event: PointerEvent) {
    const box = area.current?.getBoundingClientRect();
    return box ? within(((event.clientX - box.left) / box.width) * 100) : 0;
  }

  function begin(event: PointerEvent, fixed?: number) {
    event.preventDefault();
    event.stopPropagation();
    area.current?.setPointerCapture(event.pointerId);
    const at = positionOf(event);
    setDrag([fixed ?? at, at]);
  }

  function finish() {
    if (!drag) return;
    const [from, to] = ordered(...drag);
    setDrag(null);
    if (to - from >= LEAST_DRAG) onChange({ low: valueAt(scale, from), high: valueAt(scale, to) });
  }

  return (
    <Plot
      label={`Histogram of ${name} with the chosen window from ${formatFigure(window.low)} to ${formatFigure(window.high)} ${unit}`}
      height={height}
      tone={tone}
      left={12}
      xTitle={unit}
      xTicks={ticksOf(scale, 6)}
      shapes={bins.map(({ low, high, share }) => (
        <rect
          key={low}
          className="area-bar"
          x={positionOn(scale, low)}
          width={Math.max(positionOn(scale, high) - positionOn(scale, low) - 0.15, 0)}
          y={100 - (share / highest) * 96}
          height={(share / highest) * 96}
        />
      ))}
    >
      <div
        ref={area}
        className="window-picker"
        onPointerDown={(event) => begin(event)}
        onPointerMove={(event) => drag && setDrag([drag[0], positionOf(event)])}
        onPointerUp={finish}
        onPointerCancel={() => setDrag(null)}
      >
        <i style={{ left: percent(left), width: percent(right - left) }} />
        {(["low", "high"] as const).map((end) => (
          <Handle
            key={end}
            label={`${end === "low" ? "Low" : "High"} end of the window, ${unit}`}
            at={end === "low" ? left : right}
            scale={scale}
            onGrab={(event) => begin(event, end === "low" ? right : left)}
            onMove={(position) => {
              const low = end === "low" ? Math.min(position, right - STEP) : left;
              const high = end === "high" ? Math.max(position, left + STEP) : right;
              onChange({ low: valueAt(scale, within(low)), high: valueAt(scale, within(high)) });
            }}
          />
        ))}
      </div>
    </Plot>
  );
}

const steps: Partial<Record<string, number>> = {
  ArrowRight: STEP,
  ArrowUp: STEP,
  ArrowLeft: -STEP,
  ArrowDown: -STEP,
  PageUp: 10 * STEP,
  PageDown: -10 * STEP,
};

function Handle({
  label,
  at,
  scale,
  onGrab,
  onMove,
}: {
  label: string;
  at: number;
  scale: Scale;
  onGrab: (event: PointerEvent) => void;
  onMove: (position: number) => void;
}) {
  const value = valueAt(scale, at);
  function handleKey(event: KeyboardEvent) {
    const step = steps[event.key];
    if (step === undefined) return;
    event.preventDefault();
    onMove(at + step);
  }
  return (
    <span
      className="window-handle"
      role="slider"
      tabIndex={0}
      aria-label={label}
      aria-valuemin={scale.domain[0]}
      aria-valuemax={scale.domain[1]}
      aria-valuenow={Number(value.toPrecision(3))}
      aria-valuetext={formatFigure(value)}
      style={{ left: percent(at) }}
      onPointerDown={onGrab}
      onKeyDown={handleKey}
    />
  );
}
