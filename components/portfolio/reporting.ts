import type { ChosenPricesView } from "@/app/api/v1/fields/ranking-schema";
import { reportingUnits, type ReportingUnits } from "@/analytics/units/reporting-units";
import type { Range } from "@/analytics/volumetrics/results-schema";
import type { Basis } from "@/components/basis/basis";

/** One quantity as it is shown on a basis: value shown = canonical value x factor. */
export interface Shown {
  unit: string;
  factor: number;
}

/** How volumes and money are shown on a basis. */
export interface Reporting {
  units: ReportingUnits;
  gas: Shown;
  condensate: Shown;
  condensateYield: Shown;
  /** millions of the deck's currency */
  money: Shown;
  /** "$" for USD, the code where a currency has no sign of its own */
  currency: string;
  /** "net, unrisked" */
  words: string;
}

/** What the choice of risk is called behind a figure. */
export const riskWords: Record<Basis["risk"], string> = {
  unrisked: "unrisked",
  risked: "risked",
  yesNo: "yes or no per trial",
};

/** "$", "€", "NOK" */
export function currencySign(code: string): string {
  const parts = new Intl.NumberFormat("en", {
    style: "currency",
    currency: code,
    currencyDisplay: "narrowSymbol",
  }).formatToParts(0);
  return parts.find(({ type }) => type === "currency")?.value ?? code;
}

export function reportingOf(basis: Basis, prices: ChosenPricesView | null): Reporting {
  const units = reportingUnits(basis.units, basis.base);
  const currency = currencySign(prices?.currency ?? "USD");
  return {
    units,
    gas: units.gas,
    condensate: units.condensate,
    condensateYield: units.condensateYield,
    money: { unit: `${currency} million`, factor: 1e-6 },
    currency,
    words: `${basis.interest}, ${riskWords[basis.risk]}`,
  };
}

/** The range in the unit it is shown in. */
export function shownRange(range: Range, { factor }: Shown): Range {
  return {
    p90: range.p90 * factor,
    p50: range.p50 * factor,
    p10: range.p10 * factor,
    mean: range.mean * factor,
  };
}

const smallNumbers =
  "no one two three four five six seven eight nine ten eleven twelve thirteen fourteen fifteen sixteen seventeen eighteen nineteen twenty".split(
    " ",
  );

/** "five", "24": numbers up to twenty in words, for headings. */
export const numberWords = (count: number): string => smallNumbers[count] ?? String(count);

/** "Five" */
export const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

/** "one field", "five fields" */
export const countOf = (count: number, noun: string): string =>
  `${numberWords(count)} ${noun}${count === 1 ? "" : "s"}`;

/** "Askerdale and Hesper Reach", "A, B and C" */
export function listWords(names: readonly string[]): string {
  if (names.length < 2) return names.join("");
  return `${names.slice(0, -1).join(", ")} and ${names.at(-1)}`;
}

/** "$1.48 billion", "$330 million" */
export function moneyWords(amount: number, currency: string): string {
  const size = Math.abs(amount);
  const [scale, words] = size >= 1e9 ? [1e9, "billion"] : [1e6, "million"];
  const figure = (size / scale).toLocaleString("en-US", { maximumSignificantDigits: 3 });
  const space = currency.length > 1 ? "\u00a0" : "";
  return `${amount < 0 ? "\u2212" : ""}${currency}${space}${figure} ${words}`;
}
