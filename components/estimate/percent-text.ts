/** Chances between 0 and 1 as people write them: in per cent, or as a percentile. */

/** A chance in per cent, every digit of it: 0.9 is "90". The point moves in the text, so that it reads back exactly. */
export function percentText(chance: number): string {
  const written = String(chance);
  const decimals = (written.includes("e") ? chance.toFixed(20) : written).split(".")[1] ?? "";
  const whole = decimals.slice(0, 2).padEnd(2, "0").replace(/^0/, "");
  const rest = decimals.slice(2).replace(/0+$/, "");
  return rest === "" ? whole : `${whole}.${rest}`;
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
  if (!/^[-−]?(\d+\.?\d*|\.\d+)$/.test(digits)) return `“${typed}” is not a number. ${words}`;
  const chance = Number(`${digits.replace("−", "-")}e-2`);
  if (chance <= 0 || chance >= 1) return `${typed} is not between 0 and 100. ${words}`;
  return chance;
}

/** "P90" of an exceedance of 0.9; "P05" of 0.05. */
export function percentileName(exceedance: number): string {
  const percent = percentText(exceedance);
  return `P${Number(percent) < 10 ? "0" : ""}${percent}`;
}
