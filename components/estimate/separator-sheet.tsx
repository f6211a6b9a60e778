"use client";

import { Checkbox } from "@/components/ui/field";
import { Segmented } from "@/components/ui/choice";
import { MISSING } from "@/components/ui/format";
import { Notice } from "@/components/ui/status";
import { Unit } from "@/components/ui/text";
import { EntryGrid } from "@/components/fluid/entry-grid";
import type { Cells } from "@/components/fluid/grid-paste";
import { QuantityInput } from "./quantity-input";
import {
  isShown,
  sheetFields,
  type SheetFieldName,
  type SheetReading,
  type SheetText,
} from "./sheet-text";

export interface SeparatorSheetProps {
  sheet: SheetText;
  reading: SheetReading;
  /** what the engine says about a field */
  problems: Partial<Record<SheetFieldName, string>>;
  /** what a laboratory's file said at a field and why it was not read */
  remarks?: Cells;
  /** absent: the sheet is read, not typed */
  onChange?: (sheet: SheetText) => void;
}

interface Row {
  label: string;
  unit: string;
  cells: [first: SheetFieldName, second: SheetFieldName | null, tank: SheetFieldName | null];
}

const stageRows: Row[] = [
  {
    label: "Pressure",
    unit: "psia",
    cells: ["primarySeparator.pressurePsia", "secondSeparator.pressurePsia", null],
  },
  {
    label: "Temperature",
    unit: "°F",
    cells: ["primarySeparator.temperatureDegF", "secondSeparator.temperatureDegF", null],
  },
  {
    label: "Gas per stock-tank barrel",
    unit: "scf/STB",
    cells: [
      "primarySeparator.gasOilRatioScfPerStb",
      "secondSeparator.gas.gasOilRatioScfPerStb",
      "stockTankGas.gasOilRatioScfPerStb",
    ],
  },
  {
    label: "Gas gravity",
    unit: "air = 1",
    cells: [
      "primarySeparator.gasGravity",
      "secondSeparator.gas.gasGravity",
      "stockTankGas.gasGravity",
    ],
  },
];

const singleRows: { name: SheetFieldName; label: string; unit: string }[] = [
  { name: "condensateApi", label: "Condensate gravity", unit: "°API" },
  {
    name: "condensateMolecularWeight",
    label: "Condensate molecular weight, if measured",
    unit: "lb/lbmol",
  },
  { name: "nitrogen", label: "Nitrogen in the wellstream", unit: "mol %" },
  { name: "carbonDioxide", label: "Carbon dioxide", unit: "mol %" },
  { name: "hydrogenSulphide", label: "Hydrogen sulphide", unit: "mol %" },
  { name: "dewPointPsia", label: "Dew point, if measured", unit: "psia" },
  { name: "basePressurePsia", label: "Base of the gas volumes, at 60 °F", unit: "psia" },
];

/** The separator test as the laboratory's sheet has it: stages side by side, then the liquid and the impurities. */
export function SeparatorSheet({
  sheet,
  reading,
  problems,
  remarks = {},
  onChange,
}: SeparatorSheetProps) {
  const hasSecond = sheet.stages === 3;
  const columns = hasSecond ? 3 : 2;
  const cell = (name: SheetFieldName) => (
    <SheetCell {...{ name, sheet, reading, problems, remarks, onChange }} />
  );
  const shown = (name: SheetFieldName | null) =>
    name !== null && isShown(sheet, name) ? name : null;
  const grid = [
    ...stageRows.map(({ cells: [first, second, tank] }) =>
      (hasSecond ? [first, second, tank] : [first, tank]).map(shown),
    ),
    // The liquid's figures stand under the stock tank's.
    ...singleRows.map(({ name }) => (hasSecond ? [null, null, name] : [null, name])),
  ];
  return (
    <div className="grid gap-3">
      {onChange && (
        <div className="flex flex-wrap items-center gap-x-5 gap-y-2">
          <Segmented
            label="Stages"
            value={String(sheet.stages)}
            options={[
              { value: "2", label: "Two stages" },
              { value: "3", label: "Three stages" },
            ]}
            onChange={(stages) => onChange({ ...sheet, stages: stages === "3" ? 3 : 2 })}
          />
          {hasSecond && (
            <Checkbox
              label="Second-stage gas measured"
              checked={sheet.secondStageMeasured}
              onChange={(event) =>
                onChange({ ...sheet, secondStageMeasured: event.target.checked })
              }
            />
          )}
          <Checkbox
            label="Stock-tank gas measured"
            checked={sheet.tankMeasured}
            onChange={(event) => onChange({ ...sheet, tankMeasured: event.target.checked })}
          />
        </div>
      )}
      <EntryGrid
        grid={grid}
        onFill={
          onChange && ((changes) => onChange({ ...sheet, fields: { ...sheet.fields, ...changes } }))
        }
      >
        <table className="ledger-table separator-sheet">
          <caption className="sr-only">Separator test</caption>
          <thead>
            <tr>
              <td />
              <th scope="col" className="right">
                {hasSecond ? "Separator 1" : "Separator"}
              </th>
              {hasSecond && (
                <th scope="col" className="right">
                  Separator 2
                </th>
              )}
              <th scope="col" className="right">
                Stock tank
              </th>
            </tr>
          </thead>
          <tbody>
            {stageRows.map(({ label, unit, cells: [first, second, tank] }) => (
              <tr key={label}>
                <th scope="row">
                  {label} <Unit>{unit}</Unit>
                </th>
                <td className="entry">{cell(first)}</td>
                {hasSecond && <td className="entry">{second && cell(second)}</td>}
                <td className="entry">{tank && cell(tank)}</td>
              </tr>
            ))}
            {singleRows.map(({ name, label, unit }) => (
              <tr key={name}>
                <th scope="row" colSpan={columns}>
                  {label} <Unit>{unit}</Unit>
                </th>
                <td className="entry">{cell(name)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </EntryGrid>
      <SheetProblems {...{ sheet, reading, problems, remarks }} />
    </div>
  );
}

function SheetCell({
  name,
  sheet,
  reading,
  problems,
  remarks = {},
  onChange,
}: SeparatorSheetProps & { name: SheetFieldName }) {
  if (!isShown(sheet, name)) {
    return <span className="block pr-2 text-right text-12 text-ink-soft">not measured</span>;
  }
  if (!onChange) {
    return <span className="block pr-2 text-right">{sheet.fields[name] || MISSING}</span>;
  }
  const own = reading.fields[name];
  return (
    <span data-place={name} className="block">
      <QuantityInput
        label={sheetFields[name].label}
        value={sheet.fields[name]}
        reading={{ ...own, problem: own.problem ?? problems[name] ?? null }}
        flagged={remarks[name] !== undefined}
        describedBy="sheet-problems"
        onChange={(text) => onChange({ ...sheet, fields: { ...sheet.fields, [name]: text } })}
      />
    </span>
  );
}

/** Reasons under the sheet, each naming its field. */
function SheetProblems({
  sheet,
  reading,
  problems,
  remarks = {},
}: Pick<SeparatorSheetProps, "sheet" | "reading" | "problems" | "remarks">) {
  const names = (Object.keys(sheetFields) as SheetFieldName[]).filter(
    (name) =>
      isShown(sheet, name) && (reading.fields[name].problem ?? problems[name] ?? remarks[name]),
  );
  const isWrong = (name: SheetFieldName) =>
    (reading.fields[name].problem ?? problems[name]) !== undefined &&
    (reading.fields[name].problem ?? problems[name]) !== null;
  return (
    <div id="sheet-problems" className="grid gap-1.5 empty:hidden">
      {names.map((name) => (
        <Notice
          key={name}
          tone={isWrong(name) ? "error" : "warning"}
          live={false}
          title={`${sheetFields[name].label}.`}
        >
          {remarks[name]} {reading.fields[name].problem ?? problems[name]}
        </Notice>
      ))}
    </div>
  );
}
