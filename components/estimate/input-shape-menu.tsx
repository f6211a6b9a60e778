import { rangeEnds } from "@/analytics/uncertainty/distribution-schema";
import type { DriverName } from "@/analytics/volumetrics/results-schema";
import { Menu, type MenuGroup } from "@/components/ui/choice";
import { Icon } from "@/components/ui/icon";
import type { InputReading } from "./input-reading";
import type { InputText } from "./input-text";
import { typedFigure } from "./quantities-of-inputs";
import { reshaped, withEnds } from "./reshape";
import { endsLabels, hasEnds, shapeOf, shapes } from "./shapes";

export interface InputShapeMenuProps {
  label: string;
  name: DriverName;
  possible: readonly [low: number, high: number];
  text: InputText;
  reading: InputReading;
  /** absent: the shape is read, not chosen */
  onChange?: (text: InputText) => void;
}

/** The shape of an input, what its low and high mean, and whether it is cut off. */
export function InputShapeMenu(props: InputShapeMenuProps) {
  const { label, name, text, reading, onChange } = props;
  const current = shapeOf(text.kind);
  if (!onChange) return <b>{current.label}</b>;
  const quantile = reading.compiled?.quantile ?? null;
  return (
    <Menu
      button={
        <>
          {current.label}
          <Icon name="chevron-down" size={9} />
        </>
      }
      label={`Shape of ${label}: ${current.label}`}
      buttonClassName="shape-button"
      groups={[
        {
          heading: "Shape",
          entries: shapes.map((shape) => ({
            label: shape.label,
            note: shape.note,
            current: shape.kind === text.kind,
            onSelect: () => onChange(reshaped(name, text, quantile, shape.kind)),
          })),
        },
        ...(hasEnds(text.kind)
          ? [
              {
                heading: "Low and high are",
                entries: rangeEnds.map((ends) => ({
                  label: endsLabels[ends],
                  current: ends === (text.ends ?? "limits"),
                  onSelect: () => onChange(withEnds(text, quantile, ends)),
                })),
              },
            ]
          : []),
        boundsGroup(props, onChange),
      ]}
    />
  );
}

function boundsGroup(
  { text, possible }: InputShapeMenuProps,
  onChange: (text: InputText) => void,
): MenuGroup {
  const isBounded = text.minimum !== "" || text.maximum !== "";
  const notes: Partial<Record<InputText["kind"], string>> = {
    constant: "one value has nothing to cut off",
    scenarios: "each case is cut off where the input ends",
  };
  return {
    heading: "Bounds",
    entries: [
      {
        label: isBounded ? "Take the bounds away" : "Cut off what cannot be",
        note: notes[text.kind] ?? (isBounded ? undefined : "keeps only the curve inside"),
        disabled: text.kind in notes,
        onSelect: () =>
          onChange({
            ...text,
            minimum: isBounded ? "" : typedFigure(possible[0]),
            maximum: isBounded || possible[1] === Infinity ? "" : typedFigure(possible[1]),
          }),
      },
    ],
  };
}
