import type { FieldReading } from "./quantities-of-inputs";

export interface QuantityInputProps {
  /** full name, for a grid whose columns are named by their headings */
  label: string;
  value: string;
  unit?: string;
  reading: FieldReading;
  flagged?: boolean;
  /** id of the line that says what is wrong or unusual */
  describedBy?: string;
  onChange: (text: string) => void;
}

/**
 * One figure of a grid: text, so that arithmetic and other units can be typed. What it comes to is shown under it; what
 * is wrong with it stands in the row below, where there is room for words.
 */
export function QuantityInput({
  label,
  value,
  unit,
  reading,
  flagged = false,
  describedBy,
  onChange,
}: QuantityInputProps) {
  const isInvalid = reading.problem !== null;
  return (
    <span
      className="field-box"
      data-numeric=""
      data-invalid={isInvalid ? "" : undefined}
      data-flagged={flagged || undefined}
    >
      <input
        type="text"
        inputMode="decimal"
        autoComplete="off"
        spellCheck={false}
        aria-label={label}
        aria-invalid={isInvalid || undefined}
        aria-describedby={isInvalid || flagged ? describedBy : undefined}
        value={value}
        onChange={(event) => onChange(event.target.value)}
      />
      {unit && <span className="unit">{unit}</span>}
      {reading.preview && <output className="calculated">{reading.preview}</output>}
    </span>
  );
}
