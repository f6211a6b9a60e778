import type { PlacedField } from "@/analytics/portfolio/factor-model";
import type { BasinView } from "@/app/api/v1/basins/schema";
import type { DependenceSetView } from "@/app/api/v1/dependence-sets/schema";
import { listWords } from "@/components/portfolio/reporting";
import { Section } from "@/components/ui/section";
import { LedgerTable } from "@/components/ui/table";
import { meaningWords, rankWords } from "./rank-words";

export interface SetReadingViewProps {
  set: DependenceSetView;
  basins: readonly BasinView[];
  fields: readonly PlacedField[];
}

/** A set for people who do not change it. */
export function SetReadingView({ set, basins, fields }: SetReadingViewProps) {
  const { portfolioRank, basinRanks, otherBasinsRank, sharedFactors } = set.dependence;
  const names = new Map(fields.map(({ id, name }) => [id, name]));
  const rows = [
    { what: "Any two reservoirs of the portfolio", rank: portfolioRank },
    ...basins
      .filter(({ id }) => id in basinRanks)
      .map(({ id, name }) => ({ what: `Two reservoirs of ${name}`, rank: basinRanks[id] })),
    { what: "Two reservoirs of one other basin", rank: otherBasinsRank },
  ];
  return (
    <Section title={`What “${set.name}” says`} note={set.note}>
      <LedgerTable
        caption={`Rank correlations of ${set.name}`}
        density="executive"
        framed
        className="stacking-table"
      >
        <thead>
          <tr>
            <th scope="col">What moves together</th>
            <th scope="col" className="right">
              Rank correlation
            </th>
            <th scope="col">What it means</th>
          </tr>
        </thead>
        <tbody>
          {rows.map(({ what, rank }) => (
            <tr key={what}>
              <th scope="row" className="wrap font-normal">
                {what}
              </th>
              <td className="right">{rankWords(rank)}</td>
              <td className="wrap soft">{meaningWords(rank)}</td>
            </tr>
          ))}
          {sharedFactors.map(({ name, note, rank, fieldIds }) => (
            <tr key={name}>
              <th scope="row" className="wrap font-normal">
                {name}: {listWords(fieldIds.map((id) => names.get(id) ?? "a field that is gone"))}
                {note && <small className="block text-ink-soft">{note}</small>}
              </th>
              <td className="right">+{rankWords(rank)}</td>
              <td className="wrap soft">On top of basin and portfolio</td>
            </tr>
          ))}
        </tbody>
      </LedgerTable>
    </Section>
  );
}
