import type { Ledger } from "@/analytics/portfolio/ledger";
import { spreadOf } from "@/analytics/portfolio/ranking-columns";
import type { RankedField } from "@/analytics/portfolio/ranking";
import type { PortfolioReservoirRow } from "@/models/queries/portfolio";
import type { PortfolioBasis } from "./basis";
import type { RankedBook } from "./ranking";
import { chanceOf, interestOf } from "./roll-ups";

/** A share of the portfolio's liquid from which one field is worth a remark. */
const MATERIAL_SHARE = 0.05;
/** P10 over P90 from which a range is called wide: more than a factor of five between low and high case. */
const WIDE_SPREAD = 5;
/** A returned revision that nobody has touched for so long has been forgotten. */
const FORGOTTEN_DAYS = 7;

interface At {
  name: string;
  fieldSlug: string;
}

/** Something that somebody should look at, as data; the screen has the words. */
export type Attention =
  | (At & {
      kind: "submitted" | "returned";
      reservoirName: string;
      reservoirSlug: string;
      revision: number;
      /** since it was submitted or returned */
      days: number;
      /** what approving it as it stands would do to the mean, STB on this basis; null without results */
      changeStb: number | null;
    })
  | (At & {
      kind: "caution";
      codes: string[];
      hydrogenSulphide: number | null;
      share: number;
    })
  | (At & { kind: "wide"; spread: number; share: number; rank: number; samples: number })
  | { kind: "no_estimate"; names: string[] }
  | { kind: "basin"; name: string; shareOfVariance: number; rankCorrelation: number }
  | { kind: "price"; condensateMeanStb: number };

/**
 * What needs attention, most pressing first: decisions that wait, revisions that were forgotten, places where people
 * can get hurt, wide ranges that matter, fields without figures, and what the total hangs on.
 */
export function attentionOf(
  { book, fields }: RankedBook,
  ledger: Ledger,
  basis: PortfolioBasis,
  at: Date,
): Attention[] {
  const total = ledger.total.ranges.condensateRecoverableStb.mean;
  const shareOf = ({ ranges }: RankedField) =>
    total > 0 ? (ranges?.condensateRecoverableStb.mean ?? 0) / total : 0;
  const byId = new Map(book.fields.map((field) => [field.id, field]));

  const waiting = book.reservoirs.flatMap((reservoir): Attention[] => {
    const field = byId.get(reservoir.fieldId);
    const since = sinceOf(reservoir);
    if (!field || since === null || reservoir.openRevision === null) return [];
    const kind = reservoir.openState === "submitted" ? "submitted" : "returned";
    const days = Math.floor((at.getTime() - since.getTime()) / 86_400_000);
    if (kind === "returned" && days < FORGOTTEN_DAYS) return [];
    const factor = interestOf(field, basis) * chanceOf(field, basis);
    const { openCondensateMeanStb, condensateMeanStb } = reservoir;
    return [
      {
        kind,
        name: field.name,
        fieldSlug: field.slug,
        reservoirName: reservoir.name,
        reservoirSlug: reservoir.slug,
        revision: reservoir.openRevision,
        days,
        changeStb:
          openCondensateMeanStb === null
            ? null
            : factor * (openCondensateMeanStb - (condensateMeanStb ?? 0)),
      },
    ];
  });

  const cautions = fields
    .filter(({ cautions: codes, ranges }) => codes.length > 0 && ranges !== null)
    .map((field): Attention => {
      const { name, slug, cautions: codes, hydrogenSulphide } = field;
      const share = shareOf(field);
      return { kind: "caution", name, fieldSlug: slug, codes, hydrogenSulphide, share };
    });

  const wide = fields.flatMap((field): Attention[] => {
    const spread = spreadOf(field);
    const share = shareOf(field);
    if (spread === null || field.rank === null) return [];
    if (spread < WIDE_SPREAD || share < MATERIAL_SHARE) return [];
    const { name, slug, rank } = field;
    const samples = book.reservoirs
      .filter(({ fieldId }) => fieldId === field.id)
      .reduce((sum, { sampleCount }) => sum + sampleCount, 0);
    return [{ kind: "wide", name, fieldSlug: slug, spread, share, rank, samples }];
  });

  const without = fields.filter(({ ranges }) => ranges === null).map(({ name }) => name);
  return [
    ...waiting.sort((a, b) => materialOf(b) - materialOf(a)),
    ...wide,
    ...cautions,
    ...(without.length > 0 ? [{ kind: "no_estimate" as const, names: without }] : []),
    ...largestBasin(ledger, book.fields),
    { kind: "price", condensateMeanStb: total },
  ];
}

const materialOf = (item: Attention) => ("changeStb" in item ? Math.abs(item.changeStb ?? 0) : 0);

/** Since when a revision waits: for its reviewer, or for somebody to take it up again. */
function sinceOf(reservoir: PortfolioReservoirRow): Date | null {
  if (reservoir.openState === "submitted") return reservoir.openSubmittedAt;
  if (reservoir.openState === "returned") return reservoir.openDecidedAt;
  return null;
}

/** The basin that most of the portfolio's spread comes from, when there are several. */
function largestBasin(
  ledger: Ledger,
  fields: readonly { basinId: string; basinName: string; basinRankCorrelation: number }[],
): Attention[] {
  const entries = Object.entries(ledger.basins);
  if (entries.length < 2 || ledger.total.condensateVariance === 0) return [];
  const [id, { condensateVariance }] = entries.reduce((largest, entry) =>
    entry[1].condensateVariance > largest[1].condensateVariance ? entry : largest,
  );
  const basin = fields.find(({ basinId }) => basinId === id);
  if (!basin) return [];
  return [
    {
      kind: "basin",
      name: basin.basinName,
      shareOfVariance: condensateVariance / ledger.total.condensateVariance,
      rankCorrelation: basin.basinRankCorrelation,
    },
  ];
}
