import type { CSSProperties } from "react";
import type { Tone } from "./range-mark";
import { percent, positionOn, ticksOf, type Scale } from "./scale";

/** A figure estimated from a sample; the whisker is its 95 % interval. */
export interface BarValue {
  value: number;
  standardError?: number;
}

export interface InputBar {
  name: string;
  /** the full bar, from zero */
  bar: BarValue;
  /** a pale bar behind it, from zero: a share that holds the other */
  wider?: BarValue;
  /** the figures, one a column, in words: "58 %" */
  figures: readonly string[];
}

export interface InputBarsProps {
  /** read out before the table: "Rank regression of condensate to the tank" */
  label: string;
  /** headings of the name and of the figures */
  nameHeading?: string;
  figureHeadings: readonly string[];
  rows: readonly InputBar[];
  /** a linear scale that holds zero */
  scale: Scale;
  tone?: Tone;
  format: (value: number) => string;
  nameWidth?: number;
}

const within = (position: number) => Math.min(100, Math.max(0, position));

/** Inputs under each other with a bar from zero, its figures at the right and the scale above. */
export function InputBars({
  label,
  nameHeading = "Input",
  figureHeadings,
  rows,
  scale,
  tone = "condensate",
  format,
  nameWidth = 168,
}: InputBarsProps) {
  const zero = positionOn(scale, 0);
  const ticks = ticksOf(scale, 4);
  const style = {
    "--bars-name": `${nameWidth}px`,
    "--bars-figures": figureHeadings.length,
  } as CSSProperties;
  return (
    <div className="input-bars" data-tone={tone} role="table" aria-label={label} style={style}>
      <div role="row" className="input-bars-row input-bars-head">
        <span role="columnheader">{nameHeading}</span>
        <span role="columnheader" className="input-bars-scale">
          <span className="sr-only">Bar</span>
          {ticks.map(({ value, position }) => (
            <i key={value} aria-hidden="true" style={{ left: percent(position) }}>
              {format(value)}
            </i>
          ))}
        </span>
        {figureHeadings.map((heading) => (
          <span key={heading} role="columnheader" className="input-bars-figure">
            {heading}
          </span>
        ))}
      </div>
      {rows.map(({ name, bar, wider, figures }) => (
        <div key={name} role="row" className="input-bars-row">
          <span role="rowheader">{name}</span>
          <span role="cell" className="input-bars-area">
            <span className="sr-only">{figures.join(", ")}</span>
            {ticks.map(({ value, position }) => (
              <i key={value} className="rule" style={{ left: percent(position) }} />
            ))}
            {wider && <Bar kind="wide" {...wider} scale={scale} zero={zero} />}
            <Bar kind="full" {...bar} scale={scale} zero={zero} />
            <i className="zero" style={{ left: percent(zero) }} />
          </span>
          {figures.map((figure, index) => (
            <span key={figureHeadings[index]} role="cell" className="input-bars-figure">
              {figure}
            </span>
          ))}
        </div>
      ))}
    </div>
  );
}

function Bar({
  kind,
  value,
  standardError,
  scale,
  zero,
}: BarValue & { kind: "full" | "wide"; scale: Scale; zero: number }) {
  const end = within(positionOn(scale, value));
  const left = Math.min(zero, end);
  const half = standardError === undefined ? 0 : 1.96 * standardError;
  const low = within(positionOn(scale, value - half));
  const high = within(positionOn(scale, value + half));
  return (
    <>
      <i className={kind} style={{ left: percent(left), width: percent(Math.abs(end - zero)) }} />
      {half > 0 && (
        <i
          className={`whisker ${kind}-whisker`}
          style={{ left: percent(low), width: percent(high - low) }}
        />
      )}
    </>
  );
}
