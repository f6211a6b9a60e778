"use client";

import { useState } from "react";
import { densityCurve } from "@/analytics/uncertainty/distribution";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import type { Warning } from "@/analytics/warnings";
import { DensityCurve } from "@/components/charts/density-curve";
import { formatFigure, MISSING } from "@/components/ui/format";
import type { CaseSet } from "./case-sets";
import { hasUnevenChances } from "./case-weights";
import { DetailPanel, panelSummary } from "./detail-panel";
import { hasBounds, InputBounds } from "./input-bounds";
import { driverCatalogue, type InputDescription } from "./input-catalogue";
import { InputNotes } from "./input-notes";
import type { InputReading } from "./input-reading";
import { InputShapeMenu } from "./input-shape-menu";
import type { InputText } from "./input-text";
import { typedFigure } from "./quantities-of-inputs";
import { QuantityInput } from "./quantity-input";
import { withValues } from "./reshape";
import { isDetailed, parametersOfShape, type Slot } from "./shapes";
import { suspectUnit, type UnitSuspicion } from "./unit-suspicion";

/** What is usual for an input, and what is possible. */
export interface ExpectedRange {
  usual: readonly [low: number, high: number];
  possible: readonly [low: number, high: number];
  /** usual P10/P90 ratio; `null` where a ratio says nothing */
  ratio?: readonly [low: number, high: number] | null;
}

export interface InputRowProps {
  name: DriverName;
  /** number of the ledger line */
  line: number;
  /** tells rows of the same input apart: whose abandonment pressure it is */
  of?: string;
  expected: ExpectedRange;
  text: InputText;
  reading: InputReading;
  warnings: readonly Warning[];
  /** sets of cases that inputs share; `null` for an input that can share none */
  caseSets?: readonly CaseSet[] | null;
  /** absent: the row is read, not typed */
  onChange?: (text: InputText) => void;
}

const slots: Slot[] = ["low", "best", "high"];
const percentileOf = { low: "p90", best: "p50", high: "p10" } as const;
const columnName = { low: "P90", best: "P50", high: "P10" } as const;

/** One line of the input table, and under it what there is to say about the line. */
export function InputRow({
  name,
  line,
  of,
  expected,
  text,
  reading,
  warnings,
  caseSets = null,
  onChange,
}: InputRowProps) {
  const about = describe(name, of);
  const rowId = `${name}${of ? `-${of}` : ""}`.replace(/\W+/g, "-");
  const notesId = `notes-${rowId}`;
  const panelId = `panel-${rowId}`;
  const hasPanel = isDetailed(text.kind);
  const [isOpen, setOpen] = useState(hasPanel && !reading.isComplete);
  const change =
    onChange &&
    ((next: InputText) => {
      if (next.kind !== text.kind) setOpen(isDetailed(next.kind));
      onChange(next);
    });
  const suspicion = onChange ? suspicionOf(name, expected, text, reading) : null;
  const isSaidInPanel = hasPanel && isOpen && hasUnevenChances(text);
  const problems = [
    ...new Set(
      [
        isSaidInPanel ? null : reading.problem,
        ...Object.values(reading.fields).map((field) => field.problem),
      ].filter((problem): problem is string => problem !== null),
    ),
  ];
  // The question about units says what the warning about the range says, and more.
  const shown = suspicion
    ? warnings.filter(({ code }) => code !== "unusual_value" && code !== "wide_range")
    : warnings;
  const hasNotes = problems.length > 0 || suspicion !== null || shown.length > 0;
  const showsBounds = hasBounds(text);
  const showsPanel = hasPanel && isOpen;
  const isFlagged = suspicion !== null || shown.length > 0;

  return (
    <>
      <tr data-followed={hasNotes || showsBounds || showsPanel || undefined}>
        <td className="folio">{line}</td>
        <th scope="row">
          {about.label}
          <small>{about.unitWords}</small>
        </th>
        {slots.map((slot) => (
          <SlotCell
            key={slot}
            {...{ about, name, slot, text, reading, suspicion, notesId, onChange }}
            flagged={isFlagged && suspicion === null}
          />
        ))}
        <td className="curve">
          <Curve {...{ about, expected, reading }} flagged={isFlagged} />
        </td>
        <td className="hint">
          <span className="hint-line">
            <InputShapeMenu
              label={about.label}
              possible={expected.possible}
              {...{ name, text, reading }}
              onChange={change}
            />
            {hasPanel && (
              <button
                type="button"
                className="shape-button"
                aria-expanded={isOpen}
                aria-controls={isOpen ? panelId : undefined}
                aria-label={`${panelVerb(isOpen, onChange !== undefined)} the ${panelNouns[text.kind] ?? "figures"} of ${about.label}`}
                onClick={() => setOpen(!isOpen)}
              >
                {panelVerb(isOpen, onChange !== undefined)}
              </button>
            )}
            <span className="text-ink-soft">
              Usual {typedFigure(expected.usual[0])} to {typedFigure(expected.usual[1])}
            </span>
          </span>
          {hasPanel && !isOpen && (
            <span className="panel-summary">{panelSummary(text, reading)}</span>
          )}
          <Said label={about.label} text={text} onChange={onChange} />
        </td>
      </tr>
      {showsPanel && (
        <tr className="follow" data-followed={hasNotes || showsBounds || undefined} id={panelId}>
          <td className="folio" />
          <td colSpan={6}>
            <DetailPanel {...{ about, name, text, reading, notesId, caseSets, onChange }} />
          </td>
        </tr>
      )}
      {showsBounds && (
        <tr className="follow" data-followed={hasNotes || undefined}>
          <td className="folio" />
          <td colSpan={6}>
            <InputBounds {...{ about, text, reading, notesId, onChange }} />
          </td>
        </tr>
      )}
      {hasNotes && (
        <tr className="follow">
          <td className="folio" />
          <td colSpan={6}>
            <InputNotes
              id={notesId}
              unit={about.unit}
              problems={problems}
              cutOff={reading.cutOff}
              suspicion={suspicion}
              warnings={shown}
              onConvert={onChange && ((values) => onChange(withValues(text, values)))}
              onCutOff={
                onChange && (({ key, value }) => onChange({ ...text, [key]: typedFigure(value) }))
              }
            />
          </td>
        </tr>
      )}
    </>
  );
}

const describe = (name: DriverName, of: string | undefined): InputDescription => {
  const about = driverCatalogue[name];
  return of ? { ...about, label: `${about.label}, ${of}` } : about;
};

/** Only shapes whose figures are values of the input can be in another unit as a whole. */
function suspicionOf(
  name: DriverName,
  { usual, ratio }: ExpectedRange,
  text: InputText,
  reading: InputReading,
): UnitSuspicion | null {
  const parameters = parametersOfShape(text);
  if (parameters.some(({ key, inUnit }) => !inUnit || key === "standardDeviation")) return null;
  const values = parameters.flatMap(({ key }) => {
    const value = reading.fields[key].value;
    return value === null ? [] : [{ key, value }];
  });
  if (values.length < parameters.length) return null;
  return suspectUnit(name, values, {
    low: usual[0],
    high: usual[1],
    ratioHigh: ratio?.[1] ?? null,
  });
}

interface CellProps {
  about: InputDescription;
  name: DriverName;
  slot: Slot;
  text: InputText;
  reading: InputReading;
  suspicion: UnitSuspicion | null;
  flagged: boolean;
  notesId: string;
  onChange?: (text: InputText) => void;
}

/** A parameter to type, or the percentile that follows from the others. */
function SlotCell({
  about,
  slot,
  text,
  reading,
  suspicion,
  flagged,
  notesId,
  onChange,
}: CellProps) {
  const parameter = parametersOfShape(text).find((candidate) => candidate.slot === slot);
  const percentile = reading.compiled?.range[percentileOf[slot]];
  if (!parameter || !onChange) {
    const typed = parameter && reading.fields[parameter.key].value;
    const differs = parameter && parameter.label !== columnName[slot];
    return (
      <td className="slot">
        <span className="derived" data-typed={parameter ? "" : undefined}>
          {formatFigure(onChange ? percentile : (percentile ?? typed))}
        </span>
        <span className="slot-name" data-same="">
          {columnName[slot]}
          {!onChange && differs && typed !== null && typed !== undefined && (
            <span className="sr-only">{`; ${parameter.label} ${formatFigure(typed)}`}</span>
          )}
        </span>
      </td>
    );
  }
  return (
    <td className="slot">
      <QuantityInput
        label={`${about.label}, ${parameter.label}`}
        value={text.fields[parameter.key] ?? ""}
        unit={parameter.inUnit ? about.unit : undefined}
        reading={reading.fields[parameter.key]}
        flagged={flagged || (suspicion?.keys.includes(parameter.key) ?? false)}
        describedBy={notesId}
        onChange={(value) =>
          onChange({ ...text, fields: { ...text.fields, [parameter.key]: value } })
        }
      />
      <span
        className="slot-name"
        aria-hidden="true"
        data-same={parameter.label === columnName[slot] || undefined}
      >
        {parameter.label}
      </span>
    </td>
  );
}

function Curve({
  about,
  expected,
  reading,
  flagged,
}: {
  about: InputDescription;
  expected: ExpectedRange;
  reading: InputReading;
  flagged: boolean;
}) {
  const { compiled, distribution } = reading;
  if (!compiled || !distribution) {
    return <span className="text-ink-soft">{reading.isComplete ? "No curve" : "To fill in"}</span>;
  }
  if (distribution.kind === "constant") return <span className="text-ink-soft">One value</span>;
  const { x, density } = densityCurve(distribution);
  const [low, high] = expected.usual;
  return (
    <DensityCurve
      name={about.label}
      unit={about.unit || undefined}
      points={x.map((value, index) => ({ x: value, density: density[index] }))}
      atoms={distribution.kind === "scenarios" ? compiled.atoms : undefined}
      range={compiled.range}
      usual={{ low, high }}
      flagged={flagged}
    />
  );
}

/** Where the range comes from, and why it is this one. */
function Said({
  label,
  text,
  onChange,
}: {
  label: string;
  text: InputText;
  onChange?: (text: InputText) => void;
}) {
  if (!onChange) {
    return (
      <>
        <span className="text-ink-soft">{text.source || MISSING}</span>
        {text.reason && <span className="said">{text.reason}</span>}
      </>
    );
  }
  return (
    <>
      <input
        className="source-input"
        aria-label={`Source of ${label}`}
        placeholder="Where this comes from"
        maxLength={500}
        value={text.source}
        onChange={(event) => onChange({ ...text, source: event.target.value })}
      />
      <textarea
        className="source-input reason-input"
        aria-label={`Why this range of ${label}`}
        placeholder="Why this range"
        rows={1}
        maxLength={2_000}
        value={text.reason ?? ""}
        onChange={(event) => onChange({ ...text, reason: event.target.value })}
      />
    </>
  );
}

const panelVerb = (isOpen: boolean, isTyped: boolean) =>
  isOpen ? "Close" : isTyped ? "Edit" : "Show";

const panelNouns: Partial<Record<InputText["kind"], string>> = {
  percentiles: "percentiles",
  data: "values",
  scenarios: "cases",
};
