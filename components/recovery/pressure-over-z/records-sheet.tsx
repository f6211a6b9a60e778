import { MOST_RECORDS } from "@/app/api/v1/calculations/material-balance-schema";
import {
  EntryCell,
  EntryGrid,
  EntryProblems,
  type EntryState,
} from "@/components/fluid/entry-grid";
import type { Cells } from "@/components/fluid/grid-paste";
import { Button, IconButton } from "@/components/ui/button";
import { Unit } from "@/components/ui/text";
import {
  placeOf,
  recordColumnNames,
  recordColumns,
  recordsGrid,
  withoutRecord,
  withRecordCells,
  type RecordsReading,
  type RecordsText,
} from "./records-text";

export interface RecordsSheetProps {
  text: RecordsText;
  reading: RecordsReading;
  /** what the server refuses, by place */
  problems: Cells;
  onChange: (text: RecordsText) => void;
}

/** Reservoir pressures with what had been produced by then; takes a block from a spreadsheet. */
export function RecordsSheet({ text, reading, problems, onChange }: RecordsSheetProps) {
  const entry: EntryState = {
    cells: text.cells,
    fields: reading.fields,
    problems,
    remarks: {},
    onChange: (changes) => onChange(withRecordCells(text, changes)),
  };
  return (
    <div className="grid grid-cols-1 content-start gap-3">
      <EntryGrid grid={recordsGrid} onFill={entry.onChange}>
        <table className="ledger-table entry-table">
          <caption className="sr-only">Reservoir pressures and production</caption>
          <thead>
            <tr>
              {recordColumnNames.map((column) => (
                <th key={column} scope="col" className="right">
                  {recordColumns[column].label} <Unit>{recordColumns[column].unit}</Unit>
                </th>
              ))}
              <td />
            </tr>
          </thead>
          <tbody>
            {Array.from({ length: text.rowCount }, (_, row) => (
              <RecordRow
                key={row}
                row={row}
                entry={entry}
                onRemove={() => onChange(withoutRecord(text, row))}
              />
            ))}
          </tbody>
        </table>
      </EntryGrid>
      <div>
        <Button
          size="small"
          disabled={text.rowCount >= MOST_RECORDS}
          onClick={() => onChange({ ...text, rowCount: text.rowCount + 1 })}
        >
          Add a pressure
        </Button>
      </div>
    </div>
  );
}

function RecordRow({
  row,
  entry,
  onRemove,
}: {
  row: number;
  entry: EntryState;
  onRemove: () => void;
}) {
  const cells = recordColumnNames.map((column) => ({
    place: placeOf(row, column),
    label: `Record ${row + 1}, ${recordColumns[column].label.toLowerCase()}`,
  }));
  return (
    <>
      <tr>
        {cells.map((cell) => (
          <td key={cell.place} className="entry">
            <EntryCell {...cell} state={entry} />
          </td>
        ))}
        <td>
          <IconButton icon="close" label={`Take record ${row + 1} out`} onClick={onRemove} />
        </td>
      </tr>
      <EntryProblems places={cells} columns={cells.length + 1} state={entry} />
    </>
  );
}
