import { Disclosure } from "@/components/ui/dialog";
import { LedgerTable } from "@/components/ui/table";
import { columns, shapeMeanings, shapes, type Column } from "@/services/imports/columns";

const neededWords: Record<Column["needed"], string> = {
  always: "Yes",
  "new field": "When the field is new",
  optional: "No",
};

const takes = ({ kind, units, choices }: Column): string => {
  if (choices) return choices.join(", ");
  if (kind === "date") return "date";
  return kind === "number" ? units.join(", ") : "text";
};

/** Every column of the sheet, from the same list that the reader and the template use. */
export function ColumnGuide() {
  return (
    <div className="grid grid-cols-1 gap-3">
      <Disclosure label="Shapes of ranges">
        <div className="mt-2">
          <LedgerTable caption="Shapes of ranges">
            <thead>
              <tr>
                <th scope="col">Shape</th>
                <th scope="col">What low, best and high mean</th>
              </tr>
            </thead>
            <tbody>
              {shapes.map((shape) => (
                <tr key={shape}>
                  <th scope="row">{shape}</th>
                  <td className="wrap">{shapeMeanings[shape]}</td>
                </tr>
              ))}
            </tbody>
          </LedgerTable>
        </div>
      </Disclosure>
      <Disclosure label={`All ${columns.length} columns, and the units each takes`}>
        <div className="mt-2">
          <LedgerTable caption="Columns of the sheet" maxHeight="60vh">
            <thead>
              <tr>
                <th scope="col">Column</th>
                <th scope="col">Meaning</th>
                <th scope="col">Needed</th>
                <th scope="col">Units of row 2, or words</th>
              </tr>
            </thead>
            <tbody>
              {columns.map((column) => (
                <tr key={column.name}>
                  <th scope="row">{column.name}</th>
                  <td className="wrap min-w-48">{column.meaning}</td>
                  <td>{neededWords[column.needed]}</td>
                  <td className="wrap soft min-w-48">{takes(column)}</td>
                </tr>
              ))}
            </tbody>
          </LedgerTable>
        </div>
      </Disclosure>
    </div>
  );
}
