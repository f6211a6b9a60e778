import type { ContributionView } from "@/app/api/v1/fields/ranking-schema";
import type { Basis } from "@/components/basis/basis";
import { nothingWords } from "@/components/portfolio/chance-words";
import { countOf } from "@/components/portfolio/reporting";
import { formatFigure, formatPercent } from "@/components/ui/format";

interface Ends {
  p90: number;
  p10: number;
}

/** "66 % above", "24 % below", or in what the total has where the sum has nothing to compare with. */
function apart(total: number, sum: number, unit: string): string {
  const difference = total - sum;
  const side = difference < 0 ? "below" : "above";
  return sum > 0
    ? `${formatPercent(Math.abs(difference) / sum)} ${side}`
    : `${formatFigure(Math.abs(difference))} ${unit} ${side}`;
}

/** The effect of adding up trial by trial, with its figures: the heading of the section on diversification. */
export function diversificationTitle(total: Ends, sum: Ends, fields: number, unit: string): string {
  if (fields < 2) return "One field: nothing is spread, and the total is the field";
  return `Spread over ${countOf(fields, "field")}, P90 is ${apart(total.p90, sum.p90, unit)} the sum of P90s and P10 ${apart(total.p10, sum.p10, unit)} the sum of P10s`;
}

/** The field whose part of the total differs most between the low and the high case. */
export function mostShifting(
  contributions: readonly ContributionView[],
  total: Ends,
): { name: string; atP90: number; atP10: number } | null {
  if (contributions.length < 2 || total.p90 <= 0 || total.p10 <= 0) return null;
  const shares = contributions.map(({ name, p90, p10 }) => ({
    name,
    atP90: p90 / total.p90,
    atP10: p10 / total.p10,
  }));
  return shares.reduce((most, field) =>
    Math.abs(field.atP10 - field.atP90) > Math.abs(most.atP10 - most.atP90) ? field : most,
  );
}

/** "At the portfolio’s P90, Hollin Deep carries 15 % of the condensate; at P10 26 %" */
export function contributionTitle(contributions: readonly ContributionView[], total: Ends): string {
  const field = mostShifting(contributions, total);
  if (!field) return "What each field brings to the total";
  return `At the portfolio’s P90, ${field.name} carries ${formatPercent(field.atP90)} of the condensate; at P10 ${formatPercent(field.atP10)}`;
}

/** What the basis' choice of risk does to totals, in words that are true for it. */
export function riskNote(
  risk: Basis["risk"],
  { classes, chanceOfNothing }: { classes: number; chanceOfNothing: number | null },
): string | null {
  switch (risk) {
    case "unrisked":
      return classes > 1
        ? "Unrisked totals add reserves and resources of other classes as if every field came; the other choices of risk weigh each by its chance of commerciality."
        : null;
    case "risked":
      return "Risked: every trial is multiplied by the field’s chance of commerciality, so means are exact and ranges leave out the chance of nothing.";
    case "yesNo":
      return `Yes or no: in every trial a field comes or does not, by its chance of commerciality, independently of the others, so ranges hold the chance of failure; means are those of risked totals beyond sampling. ${nothingWords(chanceOfNothing)} The P90 of a single field whose chance is under 90 % is nothing.`;
  }
}
