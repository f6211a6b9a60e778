import { useId } from "react";
import { DATA_VALUES, type DataShape } from "@/analytics/uncertainty/distribution-schema";
import { CumulativeFit } from "@/components/charts/cumulative-fit";
import { Segmented } from "@/components/ui/choice";
import { formatFigure } from "@/components/ui/format";
import { Icon } from "@/components/ui/icon";
import type { DetailPanelProps } from "./detail-panel";
import { testsInWords, type TestWords } from "./fit-words";
import { refusedWords } from "./pasted-cells";

const shapeLabels: { value: DataShape; label: string }[] = [
  { value: "empirical", label: "As measured" },
  { value: "normal", label: "Normal" },
  { value: "lognormal", label: "Lognormal" },
];

/** Measured values, the curve that is made of them, and whether they agree. */
export function DataPanel({ about, text, reading, notesId, onChange }: DetailPanelProps) {
  const id = useId();
  const { data } = text;
  if (!data) return null;
  const values = reading.cells?.values ?? [];
  const { compiled } = reading;
  const left = refusedWords(reading.cells?.refused ?? []);
  return (
    <div className="range-panel data-panel">
      <div className="grid content-start gap-1.5">
        <label className="field-label" htmlFor={`${id}-cells`}>
          Values{about.unit && `, ${about.unit}`}
          {onChange && ": paste a column"}
        </label>
        <textarea
          id={`${id}-cells`}
          className="field-area"
          rows={9}
          spellCheck={false}
          readOnly={!onChange}
          value={data.cells}
          aria-describedby={`${id}-count ${notesId}`}
          onChange={(event) =>
            onChange?.({ ...text, data: { ...data, cells: event.target.value } })
          }
        />
        <p id={`${id}-count`} role="status" className="text-13">
          <b>{countWords(values)}</b> {left && <span className="text-warning-ink">{left}</span>}
        </p>
      </div>
      <div className="grid content-start gap-2">
        {onChange ? (
          <Segmented
            label={`Curve of ${about.label}`}
            value={data.shape}
            options={shapeLabels}
            onChange={(shape) => onChange({ ...text, data: { ...data, shape } })}
          />
        ) : (
          <b>{shapeLabels.find(({ value }) => value === data.shape)?.label}</b>
        )}
        {compiled && values.length > 0 && (
          <CumulativeFit
            name={about.label}
            unit={about.unit}
            values={values}
            cdf={data.shape === "empirical" ? null : compiled.cdf}
          />
        )}
        <Tests tests={testsInWords(data.shape, values)} shape={data.shape} />
      </div>
    </div>
  );
}

function countWords(values: readonly number[]): string {
  if (values.length === 0) return `At least ${DATA_VALUES[0]} values are needed.`;
  const low = formatFigure(Math.min(...values));
  const high = formatFigure(Math.max(...values));
  return `${values.length.toLocaleString("en-US")} ${values.length === 1 ? "value" : "values"}, ${low} to ${high}.`;
}

function Tests({ tests, shape }: { tests: TestWords[] | null; shape: DataShape }) {
  if (shape === "empirical") {
    return (
      <p className="text-13 text-ink-soft">
        The values are taken as they are, straight between neighbours. Nothing lies below the lowest
        or above the highest, so few values leave the ends too short.
      </p>
    );
  }
  if (!tests) return null;
  return (
    <ul className="finding-list">
      {tests.map(({ name, figure, text, isContradicted }) => (
        <li key={name} data-tone={isContradicted || figure === null ? "warning" : "done"}>
          <Icon name={isContradicted || figure === null ? "warning" : "tick"} size={13} />
          <span>
            <b>
              {name}
              {figure && `, ${figure}`}
            </b>
            {text}
          </span>
        </li>
      ))}
    </ul>
  );
}
