import type { DriverName } from "@/analytics/volumetrics/results-schema";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/choice";
import { formatFigure, MISSING } from "@/components/ui/format";
import type { InputDescription } from "./input-catalogue";
import type { InputReading } from "./input-reading";
import type { CaseText } from "./input-text";
import { PanelFigure, PanelText } from "./panel-parts";
import { reshapedCase } from "./reshape";
import { isDetailed, parametersOfShape, shapeOf, type ParametricKind, type Slot } from "./shapes";

/** Shapes that a case is usually given. Others come through the API, and are shown as they are. */
const caseKinds: { kind: ParametricKind; label: string }[] = [
  { kind: "constant", label: "One value" },
  { kind: "uniform", label: "Uniform" },
  { kind: "triangular", label: "Triangular" },
  { kind: "pert", label: "PERT" },
  { kind: "normalP90P10", label: "Normal, P90 and P10" },
  { kind: "lognormalP90P10", label: "Lognormal, P90 and P10" },
];

const slots: Slot[] = ["low", "best", "high"];
const percentileOf = { low: "p90", best: "p50", high: "p10" } as const;
const columnName = { low: "Low", best: "Best", high: "High" } as const;

export interface CaseRowProps {
  about: InputDescription;
  name: DriverName;
  index: number;
  text: CaseText;
  reading: InputReading;
  notesId: string;
  onChange?: (text: CaseText) => void;
  /** absent while there are only two cases */
  onRemove?: () => void;
}

/** One case: its name, its chance, and what the input is then. */
export function CaseRow({
  about,
  name,
  index,
  text,
  reading,
  notesId,
  onChange,
  onRemove,
}: CaseRowProps) {
  const which = `${about.label}, case ${text.name.trim() || index + 1}`;
  const { range } = text;
  const compiled = reading.compiled?.cases?.[index]?.compiled ?? null;
  const isListed = caseKinds.some(({ kind }) => kind === range.kind);
  return (
    <tr>
      <td data-label="Case">
        <PanelText
          label={`${about.label}, name of case ${index + 1}`}
          value={text.name}
          maxLength={60}
          onChange={onChange && ((called) => onChange({ ...text, name: called }))}
        />
      </td>
      <td data-label="Chance">
        <PanelFigure
          label={`${which}, chance`}
          value={text.weight}
          unit="%"
          reading={reading.fields[`scenarios.${index}.weight`]}
          notesId={notesId}
          onChange={onChange && ((weight) => onChange({ ...text, weight }))}
        />
      </td>
      <td data-label="The input is then">
        {onChange ? (
          <Select
            label={`${which}, the input is then`}
            labelHidden
            value={isListed ? (range.kind as ParametricKind) : null}
            placeholder={shapeOf(range.kind).label}
            options={caseKinds.map(({ kind, label }) => ({ value: kind, label }))}
            onChange={(kind) =>
              onChange({
                ...text,
                range: reshapedCase(name, range, compiled?.quantile ?? null, kind),
              })
            }
          />
        ) : (
          (caseKinds.find(({ kind }) => kind === range.kind)?.label ?? shapeOf(range.kind).label)
        )}
      </td>
      {slots.map((slot) => {
        const parameter = parametersOfShape(range).find((candidate) => candidate.slot === slot);
        const derived = isDetailed(range.kind) ? compiled?.range[percentileOf[slot]] : undefined;
        return (
          <td
            key={slot}
            className="figure-cell"
            data-unused={(!parameter && derived === undefined) || undefined}
            data-label={parameter?.label ?? columnName[slot]}
          >
            {parameter ? (
              <PanelFigure
                label={`${which}, ${parameter.label}`}
                value={range.fields[parameter.key] ?? ""}
                unit={parameter.inUnit ? about.unit : undefined}
                reading={reading.fields[`scenarios.${index}.distribution.${parameter.key}`]}
                notesId={notesId}
                onChange={
                  onChange &&
                  ((value) =>
                    onChange({
                      ...text,
                      range: { ...range, fields: { ...range.fields, [parameter.key]: value } },
                    }))
                }
              />
            ) : (
              <span className="text-ink-soft">
                {derived === undefined ? MISSING : formatFigure(derived)}
              </span>
            )}
          </td>
        );
      })}
      {onChange && (
        <td>
          <Button
            size="small"
            kind="quiet"
            disabled={!onRemove}
            aria-label={`Take out case ${text.name.trim() || index + 1} of ${about.label}`}
            onClick={onRemove}
          >
            Take out
          </Button>
        </td>
      )}
    </tr>
  );
}
