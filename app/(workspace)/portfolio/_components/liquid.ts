import type { Statement } from "@/app/api/v1/portfolio/schema";
import type { RankingRow } from "@/app/api/v1/fields/ranking-schema";
import { shownRange, type Reporting, type Shown } from "@/components/portfolio/reporting";
import type { Range } from "@/analytics/volumetrics/results-schema";

/**
 * What a statement ranks and draws: the liquid's value, or its volume while there is no price for it. Both come from
 * stock-tank barrels by one factor.
 */
export interface Liquid extends Shown {
  /** "liquid value" */
  name: string;
  /** shown value = barrels x this */
  perStb: number;
  rangeOf: (ranges: NonNullable<RankingRow["ranges"]>) => Range;
  isMoney: boolean;
}

export function liquidOf({ prices }: Pick<Statement, "prices">, reporting: Reporting): Liquid {
  const price = prices?.condensatePerStb ?? null;
  if (price === null) {
    return {
      ...reporting.condensate,
      name: "condensate to the tank",
      perStb: reporting.condensate.factor,
      rangeOf: ({ condensateRecoverableStb }) =>
        shownRange(condensateRecoverableStb, reporting.condensate),
      isMoney: false,
    };
  }
  return {
    ...reporting.money,
    name: "liquid value",
    perStb: price * reporting.money.factor,
    rangeOf: ({ condensateRecoverableStb }) =>
      shownRange(condensateRecoverableStb, {
        unit: reporting.money.unit,
        factor: price * reporting.money.factor,
      }),
    isMoney: true,
  };
}
