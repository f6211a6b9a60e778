import type { Ledger } from "@/analytics/portfolio/ledger";
import { rankedClasses, type RankedClass, type RankedField } from "@/analytics/portfolio/ranking";
import { listEstimatesInForceOn } from "@/models/queries/portfolio";
import { now, today } from "../clock";
import { authorise, type Actor } from "../policy";
import { attentionOf } from "./attention";
import type { ChosenPrices, PortfolioBasis } from "./basis";
import { describeDependence } from "./dependence";
import { totalOf, withValues } from "./group-total";
import { engineOf, loadRanking, type RankedBook } from "./ranking";
import { chanceOf, interestOf, rollUpFields, type Book } from "./roll-ups";

/** Fields that a statement names one by one; the others are added up. */
const NAMED_FIELDS = 10;

/**
 * GET /api/v1/portfolio: what the whole book comes to on a basis, where it lies, what carries it, what moved it in a
 * year, and what somebody should look at.
 */
export async function getStatement(actor: Actor, basis: PortfolioBasis) {
  authorise(actor, "portfolio.read");
  const ranked = await loadRanking(basis);
  const { fields, ledger, prices, book } = ranked;
  const counted = fields.filter(({ ranges }) => ranges !== null);
  const certain =
    basis.risk === "yesNo" ? await rollUpFields(book, { ...basis, risk: "unrisked" }) : ledger;
  return {
    asOf: today(),
    prices,
    dependence: describeDependence(book.dependence),
    counted: counted.length,
    leftOut: fields
      .filter(({ ranges }) => ranges === null)
      .map(({ name, slug, open }) => ({ name, slug, open: open.length > 0 })),
    totals: ledger && (await totalsOf(ranked, basis, ledger, counted)),
    fields: counted.slice(0, NAMED_FIELDS),
    /** mean recoverable condensate of every counted field, largest first, for one bar of all */
    shares: counted.map(({ name, ranges }) => ({
      name,
      condensateMeanStb: ranges?.condensateRecoverableStb.mean ?? 0,
    })),
    others: await totalOf(ranked, basis, counted.slice(NAMED_FIELDS)),
    basins: ledger ? basinsOf(counted, ledger, prices) : [],
    attention: ledger && certain ? attentionOf(ranked, ledger, certain, basis, now()) : [],
    year: await yearOf(book, basis, prices),
    engine: engineOf(book),
  };
}

async function totalsOf(
  ranked: RankedBook,
  basis: PortfolioBasis,
  ledger: Ledger,
  counted: readonly RankedField[],
) {
  const total = await totalOf(ranked, basis, counted);
  return (
    total && {
      ...total,
      /** of the recoverable condensate, STB; times the price it is the curve of the liquid value */
      condensateExceedance: ledger.condensate.exceedance,
      chanceOfSummedP90: ledger.chanceOfSummedP90,
    }
  );
}

/** Basins by mean condensate, with the mean of each class in them: means add, so these need no trials. */
function basinsOf(counted: readonly RankedField[], ledger: Ledger, prices: ChosenPrices | null) {
  const basins = new Map(counted.map(({ basin }) => [basin.id, basin]));
  return [...basins.values()]
    .map((basin) => {
      const inBasin = counted.filter((field) => field.basin.id === basin.id);
      const { ranges, shareOfVariance } = ledger.basins[basin.id];
      return {
        ...basin,
        fields: inBasin.length,
        ranges: withValues(ranges, prices),
        /** of the portfolio's variance, by covariance with it: the shares add up to 1 however basins move together */
        shareOfVariance,
        condensateMeanStbByClass: Object.fromEntries(
          rankedClasses.map((name) => [name, meanOf(inBasin, name)]),
        ) as Record<RankedClass, number | null>,
      };
    })
    .sort(
      (a, b) => b.ranges.condensateRecoverableStb.mean - a.ranges.condensateRecoverableStb.mean,
    );
}

/** Null where the basin has no field of the class: nothing there is not zero there. */
function meanOf(fields: readonly RankedField[], name: RankedClass): number | null {
  const means = fields
    .filter(({ prmsClass }) => prmsClass === name)
    .map(({ ranges }) => ranges?.condensateRecoverableStb.mean ?? 0);
  return means.length === 0 ? null : means.reduce((sum, mean) => sum + mean, 0);
}

/**
 * What estimates did to the means in a year: the revisions in force then against those of now, at today's interests,
 * chances and prices. Means add, so the steps are exact.
 */
async function yearOf(book: Book, basis: PortfolioBasis, prices: ChosenPrices | null) {
  const from = new Date(now());
  from.setUTCFullYear(from.getUTCFullYear() - 1);
  const since = from.toISOString().slice(0, 10);
  const past = new Map((await listEstimatesInForceOn(since)).map((row) => [row.reservoirId, row]));
  if (past.size === 0) return null;

  const moves = book.fields.map((field) => {
    const factor = interestOf(field, basis) * chanceOf(field, basis);
    const reservoirs = book.reservoirs.filter(({ fieldId }) => fieldId === field.id);
    const before = reservoirs.flatMap(({ id }) => past.get(id) ?? []);
    const counted = book.counted.filter((member) => member.field.id === field.id);
    const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);
    return {
      slug: field.slug,
      name: field.name,
      isNew: before.length === 0 && counted.length > 0,
      beforeStb: factor * sum(before.map(({ condensateMeanStb }) => condensateMeanStb)),
      nowStb: factor * sum(counted.map(({ reservoir }) => reservoir.condensateMeanStb ?? 0)),
      beforeGasScf: factor * sum(before.map(({ salesGasMeanScf }) => salesGasMeanScf)),
    };
  });
  const beforeStb = moves.reduce((sum, move) => sum + move.beforeStb, 0);
  return {
    since,
    condensatePerStb: prices?.condensatePerStb ?? null,
    condensateMeanBeforeStb: beforeStb,
    salesGasMeanBeforeScf: moves.reduce((sum, move) => sum + move.beforeGasScf, 0),
    moves: moves
      .filter(({ beforeStb: before, nowStb }) => before !== nowStb)
      .map(({ slug, name, isNew, beforeStb: before, nowStb }) => ({
        slug,
        name,
        isNew,
        changeStb: nowStb - before,
      }))
      .sort((a, b) => Math.abs(b.changeStb) - Math.abs(a.changeStb)),
  };
}
