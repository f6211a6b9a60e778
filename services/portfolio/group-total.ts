import type { Contribution } from "@/analytics/portfolio/contributions";
import type { Ledger, VolumeRanges } from "@/analytics/portfolio/ledger";
import {
  scaleRange,
  sumRanges,
  type LedgerRanges,
  type RankedField,
} from "@/analytics/portfolio/ranking";
import { vectorNames, type Range } from "@/analytics/volumetrics/results-schema";
import type { ChosenPrices, PortfolioBasis } from "./basis";
import type { RankedBook } from "./ranking";
import { rollUpFields } from "./roll-ups";

type Percentiles = Pick<Range, "p90" | "p50" | "p10">;

/** Trial-by-trial total of some fields, with the arithmetic sum of their columns apart. */
export interface GroupTotal {
  /** fields that are in the figures */
  fields: number;
  trialByTrial: LedgerRanges;
  arithmeticSum: LedgerRanges;
  /**
   * What adding trial by trial does to each percentile: the total's less the sum of the column. Not everything comes
   * out low at once, so P90 gains and P10 loses, unless all fields move as one.
   */
  diversification: { condensateRecoverableStb: Percentiles; liquidValue: Percentiles | null };
  /** one standard error of the total's recoverable condensate [STB] */
  standardErrors: Range;
  /** chance that none of the fields comes, 0 to 1; null unless the basis draws yes or no */
  chanceOfNothing: number | null;
  /** of every field to the total's recoverable condensate [STB], the largest mean first; each column adds up */
  contributions: ({
    fieldId: string;
    slug: string;
    name: string;
    standardErrors: Range;
  } & Contribution)[];
}

/** Total of the fields among these that are in the figures, or null when none is. */
export async function totalOf(
  { book, prices }: Pick<RankedBook, "book" | "prices">,
  basis: PortfolioBasis,
  fields: readonly RankedField[],
): Promise<GroupTotal | null> {
  const ledger = await rollUpFields(book, basis, new Set(fields.map(({ id }) => id)));
  if (!ledger) return null;
  const members = Object.values(ledger.fields).map(({ ranges }) => ranges);
  const summed = Object.fromEntries(
    vectorNames.map((name) => [name, sumRanges(members.map((ranges) => ranges[name]))]),
  ) as VolumeRanges;
  const trialByTrial = withValues(ledger.total, prices);
  const arithmeticSum = withValues(summed, prices);
  return {
    fields: members.length,
    trialByTrial,
    arithmeticSum,
    diversification: {
      condensateRecoverableStb: difference(
        trialByTrial.condensateRecoverableStb,
        arithmeticSum.condensateRecoverableStb,
      ),
      liquidValue:
        trialByTrial.liquidValue &&
        arithmeticSum.liquidValue &&
        difference(trialByTrial.liquidValue, arithmeticSum.liquidValue),
    },
    standardErrors: ledger.condensate.standardErrors,
    chanceOfNothing: ledger.chanceOfNothing,
    contributions: contributionsOf(fields, ledger),
  };
}

const difference = (total: Range, sum: Range): Percentiles => ({
  p90: total.p90 - sum.p90,
  p50: total.p50 - sum.p50,
  p10: total.p10 - sum.p10,
});

function contributionsOf(
  fields: readonly RankedField[],
  ledger: Ledger,
): GroupTotal["contributions"] {
  return fields
    .flatMap(({ id, slug, name }) => {
      const entry = ledger.fields[id];
      if (!entry) return [];
      const { contribution, contributionErrors: standardErrors } = entry;
      return [{ fieldId: id, slug, name, ...contribution, standardErrors }];
    })
    .sort((a, b) => b.mean - a.mean || (a.slug < b.slug ? -1 : 1));
}

/**
 * Volumes with their values: recoverable condensate times the realised condensate price, sales gas times the realised
 * gas price, undiscounted. A value without a price is null, never 0.
 */
export function withValues(volumes: VolumeRanges, prices: ChosenPrices | null): LedgerRanges {
  const condensatePerStb = prices?.condensatePerStb ?? null;
  const gasPerMscf = prices?.gasPerMscf ?? null;
  return {
    ...volumes,
    liquidValue:
      condensatePerStb === null
        ? null
        : scaleRange(volumes.condensateRecoverableStb, condensatePerStb),
    gasValue: gasPerMscf === null ? null : scaleRange(volumes.salesGasScf, gasPerMscf / 1000),
  };
}
