import type { CSSProperties } from "react";
import { formatFigure, formatPercent } from "@/components/ui/format";
import type { Tone } from "./range-mark";
import { percent, positionOn, scaleFor } from "./scale";

export interface TornadoDriver {
  name: string;
  /** the result with this input at its P90, and at its P10, the others at their P50 */
  atP90: number;
  atP10: number;
  /** squared rank correlation over the sum of them, 0 to 1 */
  share: number;
}

export interface TornadoProps {
  /** what is driven: "Condensate to the tank" */
  name: string;
  unit: string;
  drivers: readonly TornadoDriver[];
  /** the result with every input at its P50 */
  centre: number;
  tone?: Tone;
  /** room for the names [px] */
  nameWidth?: number;
}

/**
 * Inputs in the order given, each drawn from the result at its P90 (pale) to the
 * result at its P10 (full), whichever side that falls on.
 */
export function Tornado({
  name,
  unit,
  drivers,
  centre,
  tone = "condensate",
  nameWidth = 128,
}: TornadoProps) {
  const scale = scaleFor([centre, ...drivers.flatMap(({ atP90, atP10 }) => [atP90, atP10])], {
    kind: "linear",
    fromZero: false,
    pad: 0,
  });
  const middle = positionOn(scale, centre);

  return (
    <div
      className="tornado"
      data-tone={tone}
      role="table"
      aria-label={`What drives ${name}, ${unit}`}
      style={{ "--tornado-name": `${nameWidth}px` } as CSSProperties}
    >
      <div role="row" className="sr-only">
        <span role="columnheader">Input</span>
        <span role="columnheader">{`${name} at its P90 and P10, ${unit}`}</span>
        <span role="columnheader">Squared rank correlation, share of the sum</span>
      </div>
      {drivers.map((driver) => (
        <div key={driver.name} role="row" className="tornado-row">
          <span role="rowheader">{driver.name}</span>
          <span role="cell" className="tornado-bars">
            <Bar kind="low" from={middle} to={positionOn(scale, driver.atP90)} />
            <Bar kind="high" from={middle} to={positionOn(scale, driver.atP10)} />
            <EndLabel
              value={driver.atP90}
              at={positionOn(scale, driver.atP90)}
              left={driver.atP90 <= driver.atP10}
            />
            <EndLabel
              value={driver.atP10}
              at={positionOn(scale, driver.atP10)}
              left={driver.atP10 < driver.atP90}
            />
          </span>
          <span role="cell" className="tornado-share">
            {formatPercent(driver.share)}
          </span>
        </div>
      ))}
      <div className="tornado-axis" aria-hidden="true">
        <i style={{ left: percent(middle) }} />
        <span style={{ left: percent(middle) }}>all at P50 {formatFigure(centre)}</span>
      </div>
    </div>
  );
}

function Bar({ kind, from, to }: { kind: "low" | "high"; from: number; to: number }) {
  const left = Math.min(from, to);
  return (
    <i className={kind} style={{ left: percent(left), width: percent(Math.abs(to - from)) }} />
  );
}

function EndLabel({ value, at, left }: { value: number; at: number; left: boolean }) {
  return (
    <span style={left ? { right: percent(100 - at) } : { left: percent(at) }}>
      {formatFigure(value)}
    </span>
  );
}
