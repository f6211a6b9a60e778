"use client";

import { BarChart, type CustomTooltipProps } from "@tremor/react";
import { formatFigure, formatPercent } from "@/components/ui/format";
import type { Tone } from "./range-mark";

export interface HistogramBin {
  low: number;
  high: number;
  /** fraction of the trials in the bin */
  share: number;
}

export interface HistogramProps {
  /** read out in place of the drawing */
  label: string;
  bins: readonly HistogramBin[];
  unit: string;
  tone: Exclude<Tone, "soft">;
  height?: number;
}

const category = "Share of trials";

/** Tops of the axis whose quarters are whole per cents, so that the five ticks are exact. */
const tops = [0.04, 0.08, 0.12, 0.16, 0.2, 0.28, 0.4, 0.6, 0.8];

/** How the trials spread over equal steps: Tremor's bars in our type and colours. */
export function Histogram({ label, bins, unit, tone, height = 220 }: HistogramProps) {
  const highest = Math.max(...bins.map(({ share }) => share));
  return (
    <div className="histogram">
      <div className="mb-1 text-12 text-ink-soft">{category}</div>
      <div role="img" aria-label={label}>
        <BarChart
          data={bins.map(({ low, high, share }) => ({
            middle: formatFigure((low + high) / 2, { digits: 2 }),
            span: `${formatFigure(low)} to ${formatFigure(high)} ${unit}`,
            [category]: share,
          }))}
          index="middle"
          categories={[category]}
          colors={[tone]}
          valueFormatter={(share) => formatPercent(share)}
          maxValue={tops.find((top) => top >= highest) ?? 1}
          showLegend={false}
          showAnimation={false}
          startEndOnly={false}
          intervalType="preserveStartEnd"
          tickGap={40}
          yAxisWidth={44}
          barCategoryGap="6%"
          style={{ height }}
          customTooltip={BinTooltip}
        />
      </div>
      <div className="text-right text-12 text-ink-soft">{unit}, middle of each step</div>
    </div>
  );
}

function BinTooltip({ payload, active }: CustomTooltipProps) {
  const bin = payload?.[0];
  if (!active || !bin) return null;
  return (
    <div className="bg-ink px-2 py-1 text-12 text-paper">
      <b>{formatPercent(Number(bin.value), { decimals: 1 })}</b> of trials, {bin.payload.span}
    </div>
  );
}
