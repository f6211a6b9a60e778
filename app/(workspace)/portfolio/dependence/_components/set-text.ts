import type { Dependence } from "@/analytics/portfolio/dependence-schema";
import { checkDependence, type PlacedField } from "@/analytics/portfolio/factor-model";
import type { BasinView } from "@/app/api/v1/basins/schema";
import type {
  DependenceSetView,
  NewDependenceSetRequest,
} from "@/app/api/v1/dependence-sets/schema";

/** A shared factor as it stands in the fields. */
export interface FactorText {
  /** tells rows apart while they are edited */
  key: string;
  name: string;
  note: string;
  rank: string;
  fieldIds: string[];
}

/** A set as it stands in the fields. An empty rank of a basin follows that of the other basins. */
export interface SetText {
  name: string;
  note: string;
  portfolioRank: string;
  basinRanks: Record<string, string>;
  otherBasinsRank: string;
  sharedFactors: FactorText[];
}

export interface SetReading {
  body: NewDependenceSetRequest;
  /** by place: `name`, `portfolioRank`, `basinRanks.<id>`, `sharedFactors.0.fieldIds` */
  faults: Record<string, string>;
}

/** The most that a set takes: at 1 no trial of one reservoir could differ from another's. */
const MOST = 0.99;

const textOf = (rank: number | undefined) => (rank === undefined ? "" : String(rank));

export const newFactor = (): FactorText => ({
  key: crypto.randomUUID(),
  name: "",
  note: "",
  rank: "0.2",
  fieldIds: [],
});

export function setTextOf({
  name,
  note,
  dependence,
}: Pick<DependenceSetView, "name" | "note" | "dependence">): SetText {
  return {
    name,
    note,
    portfolioRank: textOf(dependence.portfolioRank),
    basinRanks: Object.fromEntries(
      Object.entries(dependence.basinRanks).map(([id, rank]) => [id, textOf(rank)]),
    ),
    otherBasinsRank: textOf(dependence.otherBasinsRank),
    sharedFactors: dependence.sharedFactors.map((factor, index) => ({
      ...factor,
      key: `${index} ${factor.name}`,
      rank: textOf(factor.rank),
    })),
  };
}

/** A rank correlation as people type it, or why it is none. */
export function readRank(text: string, least = 0): { rank: number } | { fault: string } {
  const plain = text.trim().replace(",", ".");
  if (!/^(\d+\.?\d*|\.\d+)$/.test(plain)) return { fault: "Give a number, such as 0.3." };
  const rank = Number(plain);
  if (rank > MOST) return { fault: `At most ${MOST}: at 1 no two could ever differ.` };
  if (rank < least) return { fault: `At least ${least}.` };
  return { rank };
}

/** What was typed, as a set, with everything that stands in its way at its place. */
export function readSetText(
  text: SetText,
  basins: readonly Pick<BasinView, "id">[],
  fields: readonly PlacedField[],
): SetReading {
  const faults: Record<string, string> = {};
  const read = (place: string, typed: string, least?: number): number => {
    const result = readRank(typed, least);
    if ("rank" in result) return result.rank;
    faults[place] = result.fault;
    return 0;
  };

  const name = text.name.trim();
  if (name === "") faults.name = "Name the set.";
  const dependence: Dependence = {
    portfolioRank: read("portfolioRank", text.portfolioRank),
    basinRanks: Object.fromEntries(
      basins.flatMap(({ id }) => {
        const typed = text.basinRanks[id] ?? "";
        return typed.trim() === "" ? [] : [[id, read(`basinRanks.${id}`, typed)]];
      }),
    ),
    otherBasinsRank: read("otherBasinsRank", text.otherBasinsRank),
    sharedFactors: text.sharedFactors.map((factor, index) => {
      const place = `sharedFactors.${index}`;
      if (factor.name.trim() === "") faults[`${place}.name`] = "Name what these fields share.";
      if (factor.fieldIds.length < 2) faults[`${place}.fieldIds`] = "Choose at least two fields.";
      return {
        name: factor.name.trim(),
        note: factor.note.trim(),
        rank: read(`${place}.rank`, factor.rank, 0.01),
        fieldIds: factor.fieldIds,
      };
    }),
  };
  if (Object.keys(faults).length === 0) {
    for (const { input, message } of checkDependence(dependence, fields)) faults[input] ??= message;
  }
  return { body: { name, note: text.note.trim(), dependence }, faults };
}
