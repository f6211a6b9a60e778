import { Unit } from "@/components/ui/text";
import { QuantityInput } from "./quantity-input";
import type { FieldReading } from "./quantities-of-inputs";
import { EMPTY_FIELD } from "./range-reading";

/** A figure of a panel: typed, or read where nothing may be changed. */
export function PanelFigure({
  label,
  value,
  unit,
  reading = EMPTY_FIELD,
  notesId,
  onChange,
}: {
  label: string;
  value: string;
  unit?: string;
  reading?: FieldReading;
  notesId: string;
  onChange?: (text: string) => void;
}) {
  if (!onChange) {
    return (
      <span>
        {value} {unit && <Unit>{unit}</Unit>}
      </span>
    );
  }
  return (
    <QuantityInput
      label={label}
      value={value}
      unit={unit}
      reading={reading}
      describedBy={notesId}
      onChange={onChange}
    />
  );
}

/** Words in a grid, whose column is named by its heading. */
export function PanelText({
  label,
  value,
  maxLength,
  onChange,
}: {
  label: string;
  value: string;
  maxLength: number;
  onChange?: (text: string) => void;
}) {
  if (!onChange) return <b>{value}</b>;
  return (
    <span className="field-box">
      <input
        type="text"
        autoComplete="off"
        aria-label={label}
        maxLength={maxLength}
        value={value}
        onChange={(event) => onChange(event.target.value)}
      />
    </span>
  );
}
