"use client";

import { useRef, type KeyboardEvent, type PointerEvent } from "react";
import { percent, positionOn, valueAt, type Scale } from "@/components/charts/scale";
import { psia } from "./words";

export interface AbandonmentLineProps {
  pressurePsia: number;
  scale: Scale;
  /** what is known of: from the lowest pressure of the curve to its dew point */
  lowest: number;
  highest: number;
  /** read out with the pressure: what it brings */
  describe: string;
  /** room left for the y ticks [px] */
  left: number;
  onChange: (pressurePsia: number) => void;
}

const STEP = 10;
const PAGE = 100;

/** The abandonment pressure as a line through both panels: dragged, or moved with the arrow keys. */
export function AbandonmentLine({
  pressurePsia,
  scale,
  lowest,
  highest,
  describe,
  left,
  onChange,
}: AbandonmentLineProps) {
  const area = useRef<HTMLDivElement>(null);
  const move = (to: number) =>
    onChange(Math.min(highest, Math.max(lowest, Math.round(to / STEP) * STEP)));

  function follow(event: PointerEvent) {
    const box = area.current?.getBoundingClientRect();
    if (box) move(valueAt(scale, ((event.clientX - box.left) / box.width) * 100));
  }

  function handleKey(event: KeyboardEvent) {
    const step = {
      ArrowLeft: -STEP,
      ArrowDown: -STEP,
      ArrowRight: STEP,
      ArrowUp: STEP,
      PageDown: -PAGE,
      PageUp: PAGE,
    }[event.key];
    const to = { Home: lowest, End: highest }[event.key] ?? (step && pressurePsia + step);
    if (to === undefined) return;
    event.preventDefault();
    move(to);
  }

  const position = positionOn(scale, pressurePsia);
  return (
    <div className="abandonment-area" ref={area} style={{ left }}>
      <div
        className="abandonment-line"
        role="slider"
        tabIndex={0}
        aria-label="Abandonment pressure"
        aria-valuemin={lowest}
        aria-valuemax={highest}
        aria-valuenow={pressurePsia}
        aria-valuetext={`${psia(pressurePsia)} psia. ${describe}`}
        style={{ left: percent(position) }}
        onPointerDown={(event) => {
          event.currentTarget.setPointerCapture(event.pointerId);
          follow(event);
        }}
        onPointerMove={(event) =>
          event.currentTarget.hasPointerCapture(event.pointerId) && follow(event)
        }
        onKeyDown={handleKey}
      >
        <i aria-hidden="true" />
        <span aria-hidden="true" data-side={position > 70 ? "left" : undefined}>
          Abandon at <b>{Math.round(pressurePsia).toLocaleString("en-US")}</b> psia
        </span>
      </div>
    </div>
  );
}
