/** Chances between 0 and 1 as people write them: in per cent, or as a percentile. */

/** The fewest digits of a chance in per cent that read back as exactly the same number: 0.9 is "90". */
export function percentText(chance: number): string {
  const percent = chance * 100;
  for (let digits = 1; digits < 17; digits += 1) {
    const rounded = Number(percent.toPrecision(digits));
    if (rounded / 100 === chance) return String(rounded);
  }
  return String(percent);
}

/**
 * Reads "90", "P90", "p 90" and "90 %" as 0.9.
 *
 * @returns the chance, strictly between 0 and 1; the reason in words when it is none; `null` for an empty text
 */
export function readPercent(text: string, words: string): number | string | null {
  const typed = text.trim();
  if (typed === "") return null;
  const digits = typed.replace(/^p\s*/i, "").replace(/\s*%$/, "").replace(",", ".");
  const percent = digits === "" ? NaN : Number(digits);
  if (!Number.isFinite(percent)) return `“${typed}” is not a number. ${words}`;
  if (percent <= 0 || percent >= 100) return `${typed} is not between 0 and 100. ${words}`;
  return percent / 100;
}

/** "P90" of an exceedance of 0.9; "P05" of 0.05. */
export function percentileName(exceedance: number): string {
  const percent = percentText(exceedance);
  return `P${Number(percent) < 10 ? "0" : ""}${percent}`;
}
