import { LedgerTable } from "@/components/ui/table";
import { formatFigure, MISSING } from "@/components/ui/format";
import { correlationChanges, pairName, type CorrelationChange } from "./correlation-words";
import type { Correlation } from "./estimate-text";

interface Side {
  pairs: readonly Correlation[];
  /** what it is called: "r4" */
  label: string;
}

/** What became of a pair's rank correlation. */
function kindOfChange({ before, after }: CorrelationChange): string {
  if (before === 0) return "added";
  if (after === 0) return "removed";
  return before * after < 0 ? "turned round" : "changed";
}

const rankText = (rank: number) => (rank === 0 ? MISSING : formatFigure(rank, { decimals: 2 }));

/** Rank correlations that differ, the largest change first; nothing where none does. */
export function CorrelationDifferences({ now, before }: { now: Side; before: Side }) {
  const changes = correlationChanges(before.pairs, now.pairs);
  if (changes.length === 0) return null;
  return (
    <div className="mt-6 grid gap-2">
      <h3>Correlations that differ</h3>
      <LedgerTable caption={`Rank correlations against ${before.label}`}>
        <thead>
          <tr>
            <th scope="col">Pair</th>
            <th scope="col" className="right">
              {before.label}
            </th>
            <th scope="col" className="right">
              {now.label}
            </th>
            <th scope="col">What happened</th>
          </tr>
        </thead>
        <tbody>
          {changes.map((change) => (
            <tr key={`${change.a} ${change.b}`}>
              <th scope="row" className="wrap">
                {pairName(change)}
              </th>
              <td className="right soft">{rankText(change.before)}</td>
              <td className="right strong">{rankText(change.after)}</td>
              <td>{kindOfChange(change)}</td>
            </tr>
          ))}
        </tbody>
      </LedgerTable>
    </div>
  );
}
