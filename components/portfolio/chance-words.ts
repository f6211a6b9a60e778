import { formatPercent } from "@/components/ui/format";

/**
 * What the chance is that none of some fields comes, as a sentence.
 *
 * @param chance  0 to 1; null or 0 when one of them is certain to come
 */
export function nothingWords(chance: number | null): string {
  if (chance === null || chance === 0) {
    return "A field that is certain to come is among them, so the total is never nothing.";
  }
  if (chance < 1e-6) return "The chance that none of them comes is under one in a million.";
  const odds = 1 / chance;
  return chance >= 0.01
    ? `The chance that none of them comes is ${formatPercent(chance, { decimals: 1 })}.`
    : `The chance that none of them comes is one in ${Math.round(Number(odds.toPrecision(2))).toLocaleString("en-GB")}.`;
}
