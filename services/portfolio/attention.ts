import { basinRankOf } from "@/analytics/portfolio/factor-model";
import type { Ledger } from "@/analytics/portfolio/ledger";
import type { RankedField } from "@/analytics/portfolio/ranking";
import { isUnmeasured } from "@/analytics/recovery/recovery-curve-schema";
import type { PortfolioFieldRow, PortfolioReservoirRow } from "@/models/queries/portfolio";
import type { PortfolioBasis } from "./basis";
import type { RankedBook } from "./ranking";
import { chanceOf, interestOf, type Book } from "./roll-ups";

/** A share of the portfolio's liquid from which one field is worth a remark. */
const MATERIAL_SHARE = 0.05;
/** P10 over P90 from which a range is called wide: more than a factor of five between low and high case. */
const WIDE_SPREAD = 5;
/** A returned revision that nobody has touched for so long has been forgotten. */
const FORGOTTEN_DAYS = 7;
const DAY_MS = 86_400_000;

interface At {
  name: string;
  fieldSlug: string;
}

/** Something that somebody should look at, as data; the screen has the words. */
export type Attention =
  | (At & {
      /** revisions of one field that wait for a reviewer, or were returned and forgotten */
      kind: "submitted" | "returned";
      revisions: { reservoirName: string; reservoirSlug: string; revision: number }[];
      /** of the one that waits longest */
      days: number;
      /** what approving them as they stand would do to the mean, STB on this basis; null without results */
      changeStb: number | null;
    })
  | (At & {
      /** a range that is wide where it matters, or a place where people can get hurt */
      kind: "field";
      /** P10 over P90 of the condensate when the field comes; null when it is not remarkable */
      spread: number | null;
      /** of the portfolio's mean recoverable condensate, 0 to 1 */
      share: number;
      samples: number;
      cautions: string[];
      hydrogenSulphide: number | null;
    })
  | {
      /** recoveries from a correlation or an untuned equation of state: nobody measured a depletion */
      kind: "unmeasured";
      fields: At[];
      /** of the portfolio's mean recoverable condensate, 0 to 1 */
      share: number;
    }
  | { kind: "no_estimate"; names: string[] }
  | {
      /** where most of the spread comes from, with the rank correlation its reservoirs have by the dependence set */
      kind: "basin";
      name: string;
      shareOfVariance: number;
      rankCorrelation: number;
    }
  | { kind: "price"; condensateMeanStb: number };

/**
 * What needs attention, most pressing first: decisions that wait, revisions that were forgotten, places where people
 * can get hurt, wide ranges that matter, fields without figures, and what the total hangs on.
 *
 * @param certain  the same book as if every field came: how wide a range is, a chance of nothing cannot say, because
 *                 with it P90 may be nothing
 */
export function attentionOf(
  { book, fields }: RankedBook,
  ledger: Ledger,
  certain: Ledger,
  basis: PortfolioBasis,
  at: Date,
): Attention[] {
  const total = ledger.total.condensateRecoverableStb.mean;
  const shareOf = ({ ranges }: RankedField) =>
    total > 0 ? (ranges?.condensateRecoverableStb.mean ?? 0) / total : 0;
  const waiting = book.fields.flatMap((field) => {
    const factor = interestOf(field, basis) * chanceOf(field, basis);
    const reservoirs = book.reservoirs.filter(({ fieldId }) => fieldId === field.id);
    return (["submitted", "returned"] as const).flatMap((kind) =>
      waitingOf(kind, field, reservoirs, factor, at),
    );
  });

  const remarkable = fields.flatMap((field): Attention[] => {
    if (field.ranges === null) return [];
    const share = shareOf(field);
    const range = certain.fields[field.id]?.ranges.condensateRecoverableStb;
    const known = range && range.p90 > 0 ? range.p10 / range.p90 : null;
    const isWide = known !== null && known >= WIDE_SPREAD && share >= MATERIAL_SHARE;
    if (!isWide && field.cautions.length === 0) return [];
    const { name, slug, cautions, hydrogenSulphide } = field;
    const samples = book.reservoirs
      .filter(({ fieldId }) => fieldId === field.id)
      .reduce((sum, { sampleCount }) => sum + sampleCount, 0);
    return [
      {
        kind: "field",
        name,
        fieldSlug: slug,
        spread: isWide ? known : null,
        share,
        samples,
        cautions,
        hydrogenSulphide,
      },
    ];
  });

  const unmeasured = fields.filter(
    ({ ranges, recoveryRoute }) => ranges !== null && isUnmeasured(recoveryRoute),
  );
  const without = fields.filter(({ ranges }) => ranges === null).map(({ name }) => name);
  return [
    ...waiting.sort((a, b) => materialOf(b) - materialOf(a)),
    ...remarkable,
    ...(unmeasured.length > 0
      ? [
          {
            kind: "unmeasured" as const,
            fields: unmeasured.map(({ name, slug }) => ({ name, fieldSlug: slug })),
            share: unmeasured.reduce((sum, field) => sum + shareOf(field), 0),
          },
        ]
      : []),
    ...(without.length > 0 ? [{ kind: "no_estimate" as const, names: without }] : []),
    ...largestBasin(ledger, book),
    { kind: "price", condensateMeanStb: total },
  ];
}

const materialOf = (item: Attention) => ("changeStb" in item ? Math.abs(item.changeStb ?? 0) : 0);

/** The revisions of a field that wait in one way, as one item, or nothing. */
function waitingOf(
  kind: "submitted" | "returned",
  { name, slug }: PortfolioFieldRow,
  reservoirs: readonly PortfolioReservoirRow[],
  factor: number,
  at: Date,
): Attention[] {
  const revisions: (Attention & { kind: "submitted" })["revisions"] = [];
  let days = 0;
  let changeStb: number | null = 0;
  for (const reservoir of reservoirs) {
    const since = reservoir.openState === kind ? sinceOf(reservoir) : null;
    if (since === null || reservoir.openRevision === null) continue;
    const waited = Math.floor((at.getTime() - since.getTime()) / DAY_MS);
    if (kind === "returned" && waited < FORGOTTEN_DAYS) continue;
    const { name: reservoirName, slug: reservoirSlug, openRevision: revision } = reservoir;
    revisions.push({ reservoirName, reservoirSlug, revision });
    days = Math.max(days, waited);
    const { openCondensateMeanStb: after, condensateMeanStb: before } = reservoir;
    changeStb =
      changeStb === null || after === null ? null : changeStb + factor * (after - (before ?? 0));
  }
  return revisions.length === 0
    ? []
    : [{ kind, name, fieldSlug: slug, revisions, days, changeStb }];
}

/** Since when a revision waits: for its reviewer, or for somebody to take it up again. */
function sinceOf(reservoir: PortfolioReservoirRow): Date | null {
  if (reservoir.openState === "submitted") return reservoir.openSubmittedAt;
  if (reservoir.openState === "returned") return reservoir.openDecidedAt;
  return null;
}

/** The basin that most of the portfolio's spread comes from, when there are several. */
function largestBasin(ledger: Ledger, { fields, dependence: { dependence } }: Book): Attention[] {
  const entries = Object.entries(ledger.basins);
  if (entries.length < 2 || ledger.condensate.standardDeviation === 0) return [];
  const [id, { shareOfVariance }] = entries.reduce((largest, entry) =>
    entry[1].shareOfVariance > largest[1].shareOfVariance ? entry : largest,
  );
  const basin = fields.find(({ basinId }) => basinId === id);
  if (!basin) return [];
  return [
    {
      kind: "basin",
      name: basin.basinName,
      shareOfVariance,
      rankCorrelation: basinRankOf(dependence, id),
    },
  ];
}
