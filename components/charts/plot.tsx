import type { CSSProperties, ReactNode } from "react";
import { percent, type Tick } from "./scale";

export interface PlotProps {
  /** read out in place of the drawing: what it is and its main figures */
  label: string;
  height?: number;
  /** room for the y ticks [px] */
  left?: number;
  yTitle?: string;
  xTitle?: string;
  xTicks?: readonly Tick[];
  /** positions from the top [%] */
  yTicks?: readonly Tick[];
  verticalRules?: boolean;
  tone?: string;
  /** svg shapes on a 100 × 100 grid that stretches */
  shapes: ReactNode;
  /** labels and dots, in HTML, placed in percent */
  children?: ReactNode;
}

/** The frame of a plot: grid and axis in a stretching svg, all type and dots in HTML over it. */
export function Plot({
  label,
  height = 260,
  left = 48,
  yTitle,
  xTitle,
  xTicks = [],
  yTicks = [],
  verticalRules = false,
  tone,
  shapes,
  children,
}: PlotProps) {
  return (
    <div
      className="plot"
      data-tone={tone}
      data-x-title={xTitle ? "" : undefined}
      style={{ "--plot-height": `${height}px`, "--plot-left": `${left}px` } as CSSProperties}
    >
      {yTitle && (
        <div className="y-title" aria-hidden="true">
          {yTitle}
        </div>
      )}
      <div className="plot-area">
        <svg
          viewBox="0 0 100 100"
          preserveAspectRatio="none"
          role="img"
          aria-label={label}
          focusable="false"
        >
          {yTicks.map(({ value, position }) => (
            <line key={value} className="grid-rule" x1="0" x2="100" y1={position} y2={position} />
          ))}
          {verticalRules &&
            xTicks.map(({ value, position }) => (
              <line key={value} className="grid-rule" y1="0" y2="100" x1={position} x2={position} />
            ))}
          {shapes}
          <line className="axis-rule" x1="0" x2="100" y1="100" y2="100" />
        </svg>
        {yTicks.map((tick) => (
          <span
            key={tick.value}
            className="y-tick"
            aria-hidden="true"
            style={{ top: percent(tick.position) }}
          >
            {tick.label}
          </span>
        ))}
        {xTicks.map((tick) => (
          <span
            key={tick.value}
            className="x-tick"
            aria-hidden="true"
            style={{ left: percent(tick.position) }}
          >
            {tick.label}
          </span>
        ))}
        {children}
      </div>
      {xTitle && (
        <div className="x-title" aria-hidden="true">
          {xTitle}
        </div>
      )}
    </div>
  );
}

export interface PlotLabelProps {
  x: number;
  y: number;
  anchor?: "start" | "middle" | "end" | "above";
  soft?: boolean;
  toned?: boolean;
  /** shift from the point [px] */
  dx?: number;
  dy?: number;
  children: ReactNode;
}

export function PlotLabel({
  x,
  y,
  anchor = "middle",
  soft,
  toned,
  dx,
  dy,
  children,
}: PlotLabelProps) {
  return (
    <span
      className="label"
      aria-hidden="true"
      data-anchor={anchor}
      data-soft={soft || undefined}
      data-toned={toned || undefined}
      style={{ left: percent(x), top: percent(y), marginLeft: dx, marginTop: dy }}
    >
      {children}
    </span>
  );
}

/** A point. Open: what it was. Diamond: what is no probability (an arithmetic sum, an override). */
export function PlotDot({
  x,
  y,
  shape = "full",
}: {
  x: number;
  y: number;
  shape?: "full" | "open" | "diamond" | "square" | "small";
}) {
  return (
    <span
      className="dot"
      aria-hidden="true"
      data-shape={shape}
      style={{ left: percent(x), top: percent(y) }}
    />
  );
}
