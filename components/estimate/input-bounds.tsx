import {
  compileDistribution,
  type CompiledDistribution,
} from "@/analytics/uncertainty/distribution";
import { formatFigure, formatPercent } from "@/components/ui/format";
import type { InputDescription } from "./input-catalogue";
import type { InputReading } from "./input-reading";
import type { InputText } from "./input-text";
import { QuantityInput } from "./quantity-input";
import { hasEnds } from "./shapes";

/** Bounds that cut away less than this are a safeguard, not a description. */
const LEAST_LOST_MASS = 0.0005;
/** From here on the figures typed and the figures sampled tell two stories. Common practice, no source. */
const MUCH_LOST_MASS = 0.05;

export interface InputBoundsProps {
  about: InputDescription;
  text: InputText;
  reading: InputReading;
  notesId: string;
  onChange?: (text: InputText) => void;
}

/** Whether there is anything for `InputBounds` to show. */
export const hasBounds = (text: InputText) =>
  (text.kind !== "constant" &&
    text.kind !== "scenarios" &&
    (text.minimum !== "" || text.maximum !== "")) ||
  solvesLimits(text);

const solvesLimits = ({ kind, ends }: InputText) =>
  hasEnds(kind) && ends !== undefined && ends !== "limits";

/** Where a range is cut off and how much of it that takes away; where it ends when its low and high are percentiles. */
export function InputBounds({ about, text, reading, notesId, onChange }: InputBoundsProps) {
  const { label, unit } = about;
  const isCut = text.minimum !== "" || text.maximum !== "";
  const limits = solvesLimits(text) ? limitsOf(reading) : null;
  const lost = reading.compiled?.lostMass ?? 0;
  return (
    <div className="bounds">
      {limits && (
        <span>
          Ends at {formatFigure(limits.minimum)} and {formatFigure(limits.maximum)}
          {unit && ` ${unit}`}, worked out from the two percentiles
        </span>
      )}
      {isCut && !onChange && (
        <span>
          Cut off {text.minimum !== "" && `below ${text.minimum} `}
          {text.maximum !== "" && `above ${text.maximum}`}
        </span>
      )}
      {isCut &&
        onChange &&
        (["minimum", "maximum"] as const).map((key) => (
          <span key={key} className="flex items-center gap-1.5">
            {key === "minimum" ? "Not below" : "Not above"}
            <QuantityInput
              label={`${label}, ${key === "minimum" ? "not below" : "not above"}`}
              value={text[key]}
              unit={unit}
              reading={reading.fields[key]}
              describedBy={notesId}
              onChange={(value) => onChange({ ...text, [key]: value })}
            />
          </span>
        ))}
      {lost >= LEAST_LOST_MASS && reading.compiled && (
        <span className={lost >= MUCH_LOST_MASS ? "text-warning-ink" : undefined}>
          Cuts away {formatPercent(lost, { decimals: 1 })} of the curve.{" "}
          {leftWords(reading.compiled, unit)}
        </span>
      )}
    </div>
  );
}

/** A cut curve's percentiles are no longer those that were typed; the trials follow these. */
function leftWords({ range }: CompiledDistribution, unit: string): string {
  const figures = [range.p90, range.p50, range.p10].map((value) => formatFigure(value));
  const [p90, p50, p10] = figures;
  return `What is left has P90 ${p90}, P50 ${p50} and P10 ${p10}${unit && ` ${unit}`}`;
}

/** Ends of the curve before anything is cut off. */
function limitsOf({ compiled }: InputReading): { minimum: number; maximum: number } | null {
  const definition = compiled?.definition;
  if (!definition || (definition.kind !== "pert" && definition.kind !== "triangular")) return null;
  return compileDistribution({ ...definition, minimum: undefined, maximum: undefined }).support;
}
