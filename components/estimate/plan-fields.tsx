"use client";

import { Segmented } from "@/components/ui/choice";
import { NumberField } from "@/components/ui/field";
import { Icon } from "@/components/ui/icon";
import type { PlanReading } from "./plan-reading";
import { shownFields, type PlanFieldName, type PlanText } from "./plan-text";
import { criticalInWords, cyclingInWords, pressureLabels, waterInWords } from "./plan-words";

const about: Record<PlanFieldName, { label: string; unit?: string; hint?: string }> = {
  criticalLow: { label: "Critical saturation from", hint: "Usual 0.1 to 0.2" },
  criticalHigh: { label: "to", hint: "of pore space" },
  invadedFraction: { label: "Pore volume water takes", hint: "fraction" },
  trappedGasSaturation: { label: "Gas trapped behind it", hint: "fraction, usual 0.2 to 0.4" },
  cyclingPressurePsia: { label: "Injection begins at", unit: "psia" },
  injectedPoreVolumes: { label: "Pore volumes injected", hint: "Usual 0.5 to 1.5" },
  fuelFraction: { label: "Fuel and losses", hint: "fraction of produced gas" },
  revaporisation: {
    label: "Liquid taken up by injected gas",
    hint: "fraction of what it can hold; empty is none, on the safe side",
  },
};

export interface PlanFieldsProps {
  text: PlanText;
  reading: PlanReading;
  /** those of the concept alone, the water that all concepts share, or all */
  part?: "own" | "water" | "all";
  /** absent: the figures are read, not typed */
  onChange?: (text: PlanText) => void;
}

const parts: Record<"own" | "water", readonly PlanFieldName[]> = {
  own: ["cyclingPressurePsia", "injectedPoreVolumes", "fuelFraction", "revaporisation"],
  water: ["invadedFraction", "trappedGasSaturation"],
};

/** Single figures of a plan: the band of critical saturation, the water, and how gas is injected. */
export function PlanFields({ text, reading, part = "all", onChange }: PlanFieldsProps) {
  if (!onChange) return <PlanSettings reading={reading} />;
  const shown = shownFields(text).filter((name) => part === "all" || parts[part].includes(name));
  const field = (name: PlanFieldName) =>
    shown.includes(name) && (
      <NumberField
        key={name}
        className="plan-field"
        label={about[name].label}
        unit={about[name].unit}
        hint={about[name].hint}
        error={reading.fields[name].problem ?? undefined}
        preview={reading.fields[name].preview}
        value={text.fields[name]}
        onChange={(event) =>
          onChange({ ...text, fields: { ...text.fields, [name]: event.target.value } })
        }
      />
    );
  const hasCycling = part !== "water" && text.concept === "cycling";
  return (
    <div className="plan-fields">
      {field("criticalLow")}
      {field("criticalHigh")}
      {part !== "own" && text.concept !== "cycling" && (
        <div className="field">
          <span className="field-label">Water</span>
          <Segmented
            label="Water"
            value={text.waterDrive}
            options={[
              { value: "none", label: "Closed volume" },
              { value: "influx", label: "Water comes in" },
            ]}
            onChange={(waterDrive) => onChange({ ...text, waterDrive })}
          />
        </div>
      )}
      {field("invadedFraction")}
      {field("trappedGasSaturation")}
      {hasCycling && (
        <div className="field">
          <span className="field-label">While injecting</span>
          <Segmented
            label="Pressure while injecting"
            value={text.pressure}
            options={[
              { value: "maintained", label: "Pressure held" },
              { value: "declining", label: "Pressure declines" },
            ]}
            onChange={(pressure) => onChange({ ...text, pressure })}
          />
          <p className="field-hint">{pressureLabels[text.pressure]}</p>
        </div>
      )}
      {field("cyclingPressurePsia")}
      {field("injectedPoreVolumes")}
      {field("fuelFraction")}
      {field("revaporisation")}
      {reading.problem && (
        <p className="field-error basis-full">
          <Icon name="warning" />
          {reading.problem}
        </p>
      )}
    </div>
  );
}

/** The same as words, for a revision that is only read. */
function PlanSettings({ reading: { plan } }: Pick<PlanFieldsProps, "reading">) {
  if (!plan) return null;
  return (
    <dl className="plan-settings">
      <div>
        <dt>Critical saturation</dt>
        <dd>{criticalInWords(plan)}</dd>
      </div>
      <div>
        <dt>Water</dt>
        <dd>{waterInWords(plan)}</dd>
      </div>
      {plan.cycling && (
        <div>
          <dt>Injection</dt>
          <dd>{cyclingInWords(plan)}</dd>
        </div>
      )}
    </dl>
  );
}
