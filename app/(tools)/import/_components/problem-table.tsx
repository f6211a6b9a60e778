import type { ImportDetail } from "@/app/api/v1/imports/schema";
import { LedgerTable } from "@/components/ui/table";

type Problem = ImportDetail["problems"][number];

/** Line, column, value, reason: what to repair, and where. */
export function ProblemTable({
  problems,
  caption = "What to repair",
}: {
  problems: readonly Problem[];
  caption?: string;
}) {
  return (
    <LedgerTable caption={caption}>
      <thead>
        <tr>
          <th scope="col" className="right">
            Line
          </th>
          <th scope="col">Column</th>
          <th scope="col">Value</th>
          <th scope="col">Reason</th>
        </tr>
      </thead>
      <tbody>
        {problems.map((problem, index) => (
          <tr key={index}>
            <td className="right">{problem.line ?? "–"}</td>
            <th scope="row">{problem.column ?? "–"}</th>
            <td className="wrap break-words">{problem.value ?? "–"}</td>
            <td className="wrap min-w-56">{problem.reason}</td>
          </tr>
        ))}
      </tbody>
    </LedgerTable>
  );
}
