import { LedgerTable } from "@/components/ui/table";
import type { FieldRow } from "./describe-schema";

/** Where on the page a shared shape is described. */
export const shapeAnchor = (shape: string): string => `shape-${shape.toLowerCase()}`;

/** Fields of a request or an answer. */
export function ShapeTable({
  caption,
  rows,
  isRequest,
}: {
  caption: string;
  rows: readonly FieldRow[];
  isRequest: boolean;
}) {
  return (
    <LedgerTable caption={caption} captionShown maxHeight="28rem">
      <thead>
        <tr>
          <th scope="col">Field</th>
          <th scope="col">Holds</th>
          {isRequest && <th scope="col">Needed</th>}
          <th scope="col">Note</th>
        </tr>
      </thead>
      <tbody>
        {rows.map(({ path, type, needed, note, shape }, index) => (
          <tr key={`${path} ${index}`}>
            <th scope="row" className="wrap break-all">
              {path}
            </th>
            <td className="wrap min-w-32">
              {shape ? <a href={`#${shapeAnchor(shape)}`}>{type}</a> : type}
            </td>
            {isRequest && <td>{needed ? "yes" : "no"}</td>}
            <td className="wrap soft min-w-32">{note}</td>
          </tr>
        ))}
      </tbody>
    </LedgerTable>
  );
}
