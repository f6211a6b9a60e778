"use client";

import {
  isAdjusted,
  untouched,
  type Characterisation,
} from "@/analytics/equation-of-state/characterisation-schema";
import { Segmented, Select } from "@/components/ui/choice";

const splits = [
  { value: "1", label: "Kept whole" },
  { value: "2", label: "2 fractions" },
  { value: "3", label: "3 fractions" },
  { value: "4", label: "4 fractions" },
  { value: "5", label: "5 fractions" },
] as const;

const criticals = [
  { value: "keslerLee", label: "Kesler–Lee" },
  { value: "twu", label: "Twu" },
] as const;

/** How heptanes plus is split and whose critical properties it gets. Another choice takes a tuning back. */
export function EquationOfStateSettings({
  value,
  onChange,
}: {
  value: Characterisation;
  /** absent: they are read, not chosen */
  onChange?: (value: Characterisation) => void;
}) {
  const { split } = value;
  const count = split.kind === "single" ? "1" : String(split.fractions);
  if (!onChange) {
    return (
      <p className="text-13 text-ink-soft">
        Heptanes plus: {splits.find((option) => option.value === count)?.label.toLowerCase()};
        critical properties by {criticals.find((option) => option.value === value.criticals)?.label}
        .
      </p>
    );
  }
  return (
    <div className="flex flex-wrap items-end gap-x-5 gap-y-2">
      <Select
        className="w-36"
        label="Heptanes plus"
        value={count}
        options={splits}
        onChange={(next) =>
          onChange({
            ...value,
            split:
              next === "1"
                ? { kind: "single" }
                : { kind: "gamma", fractions: Number(next), shape: shapeOf(value) },
            adjustments: untouched,
          })
        }
      />
      {split.kind === "gamma" && (
        <Select
          className="w-36"
          label="Shape of the split"
          value={String(split.shape)}
          options={["0.5", "0.75", "1", "1.5", "2", "2.5"].map((shape) => ({
            value: shape,
            label: shape === "1" ? "1, exponential" : shape,
          }))}
          onChange={(shape) =>
            onChange({
              ...value,
              split: { ...split, shape: Number(shape) },
              adjustments: untouched,
            })
          }
        />
      )}
      <div className="field">
        <span className="field-label">Critical properties</span>
        <Segmented
          label="Critical properties"
          value={value.criticals}
          options={criticals}
          onChange={(next) => onChange({ ...value, criticals: next, adjustments: untouched })}
        />
      </div>
      {isAdjusted(value) && (
        <p className="basis-full text-12 text-ink-soft">Another choice takes the tuning back.</p>
      )}
    </div>
  );
}

const shapeOf = ({ split }: Characterisation) => (split.kind === "gamma" ? split.shape : 1);
