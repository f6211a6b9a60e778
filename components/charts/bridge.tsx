import { formatFigure } from "@/components/ui/format";
import { Plot, PlotLabel } from "./plot";
import { positionOn, scaleFor, ticksOf, type Scale } from "./scale";

export interface BridgeStep {
  label: string;
  /** change of the total; all of them add up to the whole change, as changes of a mean or shared-out effects do */
  change: number;
}

export interface BridgeProps {
  /** "Mean liquid value, $ million" */
  quantity: string;
  from: { label: string; value: number };
  steps: readonly BridgeStep[];
  to: { label: string; value: number };
  height?: number;
  /** bars under each other at every width, for labels too long to stand under a bar */
  horizontal?: boolean;
}

interface Bar {
  label: string;
  kind: "end" | "rise" | "fall";
  low: number;
  high: number;
  /** the total after this bar */
  after: number;
  text: string;
}

/** The same decimals for every bar, so that what is printed adds up as drawn: "5,560 +245 −58". */
const decimalsFor = (total: number) =>
  Math.min(3, Math.max(0, 2 - Math.floor(Math.log10(Math.abs(total) || 1))));

function barsOf({ from, steps, to }: BridgeProps): Bar[] {
  const decimals = decimalsFor(Math.max(Math.abs(from.value), Math.abs(to.value)));
  const end = (label: string, value: number): Bar => ({
    label,
    kind: "end",
    low: 0,
    high: value,
    after: value,
    text: formatFigure(value, { decimals }),
  });
  let total = from.value;
  const middle = steps.map(({ label, change }): Bar => {
    const before = total;
    total += change;
    return {
      label,
      kind: change < 0 ? "fall" : "rise",
      low: Math.min(before, total),
      high: Math.max(before, total),
      after: total,
      text: formatFigure(change, { decimals, signed: true }),
    };
  });
  return [end(from.label, from.value), ...middle, end(to.label, to.value)];
}

/** An axis that starts just below the lowest step, so that small changes can be seen; it says so. */
function bridgeScale(bars: readonly Bar[]): Scale {
  const levels = bars.flatMap(({ kind, low, high }) => (kind === "end" ? [high] : [low, high]));
  const low = Math.min(...levels);
  const high = Math.max(...levels);
  const spread = high - low || Math.abs(high) || 1;
  if (low <= 0 || spread > low) return scaleFor(levels, { kind: "linear", pad: 0.08 });
  const ticks = ticksOf({ kind: "linear", domain: [low - spread * 0.5, high] }, 5);
  return { kind: "linear", domain: [ticks[0].value, high + spread * 0.12] };
}

/** Where a cut axis starts, wherever the bars stand: "axis starts at 5,000, not at 0". */
const startWords = (scale: Scale) => `axis starts at ${ticksOf(scale, 5)[0].label}, not at 0`;

/** What moved a figure from one state to the next. A fall is a hollow bar and a minus sign, never red. */
export function Bridge(props: BridgeProps) {
  const { quantity, height = 250, horizontal = false } = props;
  const bars = barsOf(props);
  const scale = bridgeScale(bars);
  if (horizontal) return <BridgeList bars={bars} scale={scale} quantity={quantity} />;
  const start = scale.domain[0];
  const yOf = (value: number) => 100 - positionOn(scale, value);
  const slot = 100 / bars.length;
  const inset = slot * 0.2;
  const spoken = bars.map(({ label, text }) => `${label} ${text}`).join(", ");

  return (
    <>
      <div className="phone:hidden">
        <Plot
          label={`Bridge of ${quantity}: ${spoken}`}
          height={height}
          yTitle={start === 0 ? quantity : `${quantity} (${startWords(scale)})`}
          yTicks={ticksOf(scale, 5).map((tick) => ({ ...tick, position: 100 - tick.position }))}
          xTicks={bars.map(({ label }, index) => ({
            value: index,
            label,
            position: (index + 0.5) * slot,
          }))}
          shapes={bars.map((bar, index) => {
            const top = yOf(bar.high);
            const bottom = bar.kind === "end" ? 100 : yOf(bar.low);
            return (
              <g key={bar.label}>
                <rect
                  className={`bridge-${bar.kind}`}
                  x={index * slot + inset}
                  width={slot - 2 * inset}
                  y={top}
                  height={Math.max(bottom - top, 0)}
                />
                {index < bars.length - 1 && (
                  <line
                    className="line-soft line-thin"
                    x1={(index + 1) * slot - inset}
                    x2={(index + 1) * slot + inset}
                    y1={yOf(bar.after)}
                    y2={yOf(bar.after)}
                  />
                )}
              </g>
            );
          })}
        >
          {bars.map((bar, index) => (
            <PlotLabel
              key={bar.label}
              x={(index + 0.5) * slot}
              y={yOf(bar.high)}
              anchor="above"
              dy={-3}
            >
              <b className={bar.kind === "rise" ? "text-positive" : undefined}>{bar.text}</b>
            </PlotLabel>
          ))}
        </Plot>
      </div>
      <div className="hidden phone:block">
        <BridgeList bars={bars} scale={scale} quantity={quantity} />
      </div>
    </>
  );
}

/** The same steps as a list of bars: for a phone, and for a narrow column. */
export function BridgeList({
  bars,
  scale,
  quantity,
}: {
  bars: readonly Bar[];
  scale: Scale;
  quantity: string;
}) {
  const start = scale.domain[0];
  return (
    <table className="ledger-table bridge-list">
      <caption className={start === 0 ? "sr-only" : "bridge-caption"}>
        {start === 0 ? quantity : `${quantity}. ${startWords(scale)}.`}
      </caption>
      <tbody>
        {bars.map((bar) => {
          const left = bar.kind === "end" ? 0 : positionOn(scale, bar.low);
          return (
            <tr key={bar.label}>
              <th scope="row" className={bar.kind === "end" ? "wrap" : "wrap plain"}>
                {bar.label}
              </th>
              <td className="bridge-cell" aria-hidden="true">
                <i
                  className={`bridge-${bar.kind}`}
                  style={{ left: `${left}%`, width: `${positionOn(scale, bar.high) - left}%` }}
                />
              </td>
              <td className={`right strong${bar.kind === "rise" ? " text-positive" : ""}`}>
                {bar.text}
              </td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}
