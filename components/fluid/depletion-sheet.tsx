"use client";

import { useState } from "react";
import { Button, IconButton } from "@/components/ui/button";
import { Segmented, Select } from "@/components/ui/choice";
import { Checkbox, NumberField } from "@/components/ui/field";
import { Unit } from "@/components/ui/text";
import { componentName } from "./component-names";
import { ComponentSymbol } from "./component-label";
import {
  depletionColumnNames,
  depletionColumns,
  depletionGrid,
  gasPlaces,
  MOST_ROWS,
  withCells,
  withoutRow,
  type DepletionReading,
  type DepletionText,
} from "./depletion-text";
import { EntryCell, EntryGrid, EntryProblems, type EntryState } from "./entry-grid";

export interface DepletionSheetProps {
  text: DepletionText;
  reading: DepletionReading;
  state: Pick<EntryState, "problems" | "remarks">;
  /** cells that a check is about */
  flags: ReadonlySet<string>;
  /** absent: the table is read, not typed */
  onChange?: (text: DepletionText) => void;
}

const plusOptions = Array.from({ length: 30 }, (_, index) => ({
  value: String(index + 7),
  label: `C${index + 7}+`,
}));

/** A constant-volume depletion as the laboratory's table has it; figures and produced gas one after the other. */
export function DepletionSheet({ text, reading, state, flags, onChange }: DepletionSheetProps) {
  const [part, setPart] = useState<"figures" | "gas">("figures");
  const [isTurned, setTurned] = useState(false);
  const entry: EntryState = {
    ...state,
    flags,
    cells: text.cells,
    fields: reading.fields,
    onChange: onChange && ((changes) => onChange(withCells(text, changes))),
  };
  const scalars = [
    { place: "temperatureDegF", label: "Temperature of the study", unit: "°F" },
    { place: "dewPointPsia", label: "Dew point", unit: "psia" },
  ];
  return (
    <div className="grid grid-cols-1 gap-3">
      <div className="flex flex-wrap items-end gap-x-5 gap-y-2">
        {scalars.map(({ place, label, unit }) => (
          <NumberField
            key={place}
            className="w-44"
            label={label}
            unit={unit}
            value={text.cells[place] ?? ""}
            preview={reading.fields[place]?.preview}
            error={reading.fields[place]?.problem ?? state.problems[place]}
            flagged={state.remarks[place] !== undefined}
            hint={state.remarks[place]}
            readOnly={!onChange}
            onChange={(event) => entry.onChange?.({ [place]: event.target.value })}
          />
        ))}
        <Segmented
          label="Part of the table"
          value={part}
          options={[
            { value: "figures", label: "Figures" },
            { value: "gas", label: "Produced gas" },
          ]}
          onChange={setPart}
        />
        {onChange && part === "gas" && (
          <Select
            className="w-28"
            label="Plus fraction"
            value={String(text.plusFrom)}
            options={plusOptions}
            onChange={(from) => onChange({ ...text, plusFrom: Number(from) })}
          />
        )}
        {onChange && (
          <Checkbox
            label="Pasted tables have pressures across"
            checked={isTurned}
            onChange={(event) => setTurned(event.target.checked)}
          />
        )}
      </div>
      <EntryGrid grid={depletionGrid(text, part)} isTurned={isTurned} onFill={entry.onChange}>
        <div
          className="table-scroll"
          data-sticky-column=""
          role="region"
          aria-label="Depletion table"
          tabIndex={0}
        >
          <table className="ledger-table entry-table depletion-table" data-part={part}>
            <caption className="sr-only">
              Constant-volume depletion, {part === "figures" ? "figures" : "produced gas in mol %"}
            </caption>
            <DepletionHead text={text} part={part} hasTools={onChange !== undefined} />
            <tbody>
              {Array.from({ length: text.rowCount }, (_, row) => (
                <DepletionRow
                  key={row}
                  {...{ row, part, text, entry }}
                  onRemove={onChange && (() => onChange(withoutRow(text, row)))}
                />
              ))}
            </tbody>
          </table>
        </div>
      </EntryGrid>
      {onChange && (
        <div className="flex flex-wrap gap-2">
          <Button
            size="small"
            disabled={text.rowCount >= MOST_ROWS}
            onClick={() => onChange({ ...text, rowCount: text.rowCount + 1 })}
          >
            Add a step
          </Button>
        </div>
      )}
    </div>
  );
}

function DepletionHead({
  text,
  part,
  hasTools,
}: {
  text: DepletionText;
  part: "figures" | "gas";
  hasTools: boolean;
}) {
  const names =
    part === "figures"
      ? depletionColumnNames.slice(1).map((name) => ({ ...depletionColumns[name], symbol: null }))
      : gasPlaces(0, text.plusFrom).map(({ symbol }) => ({
          label: symbol === "M" || symbol === "SG" ? `C${text.plusFrom}+ ${symbol}` : symbol,
          unit: symbol === "M" ? "lb/lbmol" : symbol === "SG" ? "water = 1" : "mol %",
          symbol,
        }));
  return (
    <thead>
      <tr>
        <th scope="col" className="right">
          Pressure <Unit>psia</Unit>
        </th>
        {names.map(({ label, unit, symbol }) => (
          <th key={label} scope="col" className="right">
            {symbol ? <ComponentSymbol symbol={label} /> : label} {unit && <Unit>{unit}</Unit>}
          </th>
        ))}
        {hasTools && <td />}
      </tr>
    </thead>
  );
}

function DepletionRow({
  row,
  part,
  text,
  entry,
  onRemove,
}: {
  row: number;
  part: "figures" | "gas";
  text: DepletionText;
  entry: EntryState;
  onRemove?: () => void;
}) {
  const pressure = { place: `rows.${row}.pressurePsia`, label: `Step ${row + 1}, pressure` };
  const others =
    part === "figures"
      ? depletionColumnNames.slice(1).map((name) => ({
          place: `rows.${row}.${name}`,
          label: `Step ${row + 1}, ${depletionColumns[name].label.toLowerCase()}`,
        }))
      : gasPlaces(row, text.plusFrom).map(({ symbol, place }) => ({
          place,
          label: `Step ${row + 1}, produced gas, ${gasWords(symbol, text.plusFrom)}`,
        }));
  return (
    <>
      <tr>
        <th scope="row" className="entry">
          <EntryCell {...pressure} state={entry} />
        </th>
        {others.map((cell) => (
          <td key={cell.place} className="entry">
            <EntryCell {...cell} state={entry} />
          </td>
        ))}
        {onRemove && (
          <td>
            <IconButton icon="close" label={`Take step ${row + 1} out`} onClick={onRemove} />
          </td>
        )}
      </tr>
      <EntryProblems
        places={[pressure, ...others]}
        columns={others.length + (onRemove ? 2 : 1)}
        state={entry}
      />
    </>
  );
}

function gasWords(symbol: string, plusFrom: number): string {
  if (symbol === "M") return `C${plusFrom}+ molecular weight`;
  if (symbol === "SG") return `C${plusFrom}+ specific gravity`;
  return componentName(symbol) || symbol;
}
