import type { PlacedField } from "@/analytics/portfolio/factor-model";
import type { BasinView } from "@/app/api/v1/basins/schema";
import type { DependenceSetView } from "@/app/api/v1/dependence-sets/schema";
import { listWords } from "@/components/portfolio/reporting";
import { setTextOf, type FactorText, type SetText } from "./set-text";

/** One place at which what is saved differs from what is typed. */
export interface SetDifference {
  /** "Both in Corrith" */
  what: string;
  theirs: string;
  mine: string;
}

type Named = Pick<PlacedField, "id" | "name">;

/** Where a set as somebody else saved it differs from what stands in the fields, in the order of the form. */
export function setDifferences(
  theirs: Pick<DependenceSetView, "name" | "note" | "dependence">,
  mine: SetText,
  basins: readonly Pick<BasinView, "id" | "name">[],
  fields: readonly Named[],
): SetDifference[] {
  const saved = setTextOf(theirs);
  const places: SetDifference[] = [
    { what: "Name", theirs: saved.name, mine: mine.name },
    { what: "Why", theirs: saved.note, mine: mine.note },
    { what: "Anywhere in the portfolio", theirs: saved.portfolioRank, mine: mine.portfolioRank },
    ...basins.map(({ id, name }) => ({
      what: `Both in ${name}`,
      theirs: saved.basinRanks[id] || "as other basins",
      mine: mine.basinRanks[id]?.trim() || "as other basins",
    })),
    { what: "Both in another basin", theirs: saved.otherBasinsRank, mine: mine.otherBasinsRank },
    ...factorPlaces(saved.sharedFactors, mine.sharedFactors, fields),
  ];
  return places
    .map(({ what, ...sides }) => ({
      what,
      theirs: sides.theirs.trim() || "nothing",
      mine: sides.mine.trim() || "nothing",
    }))
    .filter((place) => place.theirs !== place.mine);
}

/** Factors by their names: one that only one side has is nothing on the other. */
function factorPlaces(
  theirs: readonly FactorText[],
  mine: readonly FactorText[],
  fields: readonly Named[],
): SetDifference[] {
  const names = new Set([...theirs, ...mine].map(({ name }) => name.trim()));
  return [...names].map((name) => {
    const words = (factors: readonly FactorText[]) =>
      factors
        .filter((factor) => factor.name.trim() === name)
        .map((factor) => factorWords(factor, fields))
        .join("; ");
    return { what: name || "A factor without a name", theirs: words(theirs), mine: words(mine) };
  });
}

/** "adds 0.2 to A and B (One depth map.)" */
function factorWords({ rank, fieldIds, note }: FactorText, fields: readonly Named[]): string {
  const names = fieldIds
    .map((id) => fields.find((field) => field.id === id)?.name ?? "a field that is gone")
    .sort((a, b) => a.localeCompare(b, "en"));
  const reason = note.trim() === "" ? "" : ` (${note.trim()})`;
  return `adds ${rank.trim() || "nothing"} to ${listWords(names) || "no field"}${reason}`;
}
