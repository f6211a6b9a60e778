"use client";

import { useState } from "react";
import { NumberField } from "@/components/ui/field";
import { readMolePercent } from "./composition-text";

export interface CriticalBand {
  /** per cent of pore space */
  low: number;
  high: number;
}

/** Ends of the critical saturation, as typed; the band follows when both can be read and stand in order. */
export function CriticalBandFields({
  band,
  onChange,
}: {
  band: CriticalBand;
  onChange: (band: CriticalBand) => void;
}) {
  const [text, setText] = useState({ low: String(band.low), high: String(band.high) });
  const read = { low: readMolePercent(text.low), high: readMolePercent(text.high) };
  const isTurned =
    read.low.value !== null && read.high.value !== null && read.low.value > read.high.value;

  function handle(end: keyof CriticalBand, typed: string) {
    const next = { ...text, [end]: typed };
    setText(next);
    const [low, high] = [readMolePercent(next.low).value, readMolePercent(next.high).value];
    if (low !== null && high !== null && low <= high) onChange({ low, high });
  }

  return (["low", "high"] as const).map((end) => (
    <NumberField
      key={end}
      className="w-36"
      label={end === "low" ? "Critical saturation from" : "to"}
      unit="%"
      value={text[end]}
      error={read[end].problem ?? (isTurned && end === "high" ? "Below the lower end." : undefined)}
      onChange={(event) => handle(end, event.target.value)}
    />
  ));
}
