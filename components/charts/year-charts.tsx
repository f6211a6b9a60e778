"use client";

import { AreaChart, BarChart, type CustomTooltipProps } from "@tremor/react";
import { formatFigure } from "@/components/ui/format";
import type { Tone } from "./range-mark";

export interface YearSeries {
  key: string;
  label: string;
  tone: Exclude<Tone, "soft">;
}

export interface YearChartProps {
  /** read out in place of the drawing */
  label: string;
  /** one row a year: `{ year: "2027", condensate: 3.1 }` */
  data: readonly Record<string, string | number>[];
  series: readonly YearSeries[];
  unit: string;
  yTitle?: string;
  /** column that holds the year */
  index?: string;
  /** one bar of all series, or an area on top of another */
  stack?: boolean;
  height?: number;
}

const format = (value: number) =>
  formatFigure(value, Math.abs(value) >= 100 ? { decimals: 0 } : {});
const tickFormat = (value: number) =>
  value.toLocaleString("en-US", { maximumSignificantDigits: 6 }).replace("-", "\u2212");

/** What both charts have in common: our type, our colours by role, our tooltip. */
function shared({ data, series, index = "year", unit, stack, height = 240 }: YearChartProps) {
  return {
    data: data.map((row) =>
      Object.fromEntries([
        [index, row[index]],
        ...series.map(({ key, label }) => [label, row[key]]),
      ]),
    ),
    index,
    categories: series.map(({ label }) => label),
    colors: series.map(({ tone }) => tone),
    valueFormatter: tickFormat,
    stack,
    showLegend: false,
    showAnimation: false,
    yAxisWidth: 48,
    style: { height },
    customTooltip: (tooltip: CustomTooltipProps) => <YearTooltip {...tooltip} unit={unit} />,
  };
}

function YearTooltip({ payload, active, label, unit }: CustomTooltipProps & { unit: string }) {
  if (!active || !payload?.length) return null;
  return (
    <div className="bg-ink px-2 py-1 text-12 text-paper">
      <b>{label}</b>
      {payload.map(({ dataKey, value }) => (
        <div key={String(dataKey)} className="flex justify-between gap-4">
          <span>{String(dataKey)}</span>
          <span>
            {format(Number(value))} {unit}
          </span>
        </div>
      ))}
    </div>
  );
}

/** Names of the colours, where there is more than one. */
function YearLegend({ series }: { series: readonly YearSeries[] }) {
  if (series.length < 2) return null;
  return (
    <ul className="legend">
      {series.map(({ key, label, tone }) => (
        <li key={key}>
          <i className={`bg-${tone}${tone === "rock" ? " hatched" : ""}`} aria-hidden="true" />
          {label}
        </li>
      ))}
    </ul>
  );
}

function YearFrame({ chart, children }: { chart: YearChartProps; children: React.ReactNode }) {
  return (
    <div className="year-chart">
      <YearLegend series={chart.series} />
      <div className="mb-1 text-12 text-ink-soft">{chart.yTitle ?? chart.unit}</div>
      <div role="img" aria-label={chart.label}>
        {children}
      </div>
    </div>
  );
}

/** Amounts by year as bars. */
export function YearBars(props: YearChartProps) {
  return (
    <YearFrame chart={props}>
      <BarChart {...shared(props)} barCategoryGap="28%" />
    </YearFrame>
  );
}

/** Amounts by year as lines over pale areas. */
export function YearAreas(props: YearChartProps) {
  return (
    <YearFrame chart={props}>
      <AreaChart {...shared(props)} showGradient={false} curveType="linear" />
    </YearFrame>
  );
}
