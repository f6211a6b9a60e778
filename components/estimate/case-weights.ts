/** Chances of cases, which have to add up to 100 %. */
import type { CaseText, InputText } from "./input-text";
import { readPercent } from "./percent-text";

/** Sum in per cent; `null` while a chance is missing or is none. */
export function totalPercent(cases: readonly Pick<CaseText, "weight">[]): number | null {
  let sum = 0;
  for (const { weight } of cases) {
    const read = readPercent(weight, "");
    if (typeof read !== "number") return null;
    sum += read * 100;
  }
  return sum;
}

/** As the engine has it: sums that miss 100 % by no more were rounded. */
export const addsUp = (total: number) => Math.abs(total - 100) <= 1e-4;

/** Whether chances that can all be read miss 100 %. */
export function hasUnevenChances({ kind, cases }: InputText): boolean {
  const total = kind === "scenarios" && cases ? totalPercent(cases.cases) : null;
  return total !== null && !addsUp(total);
}

/** Digits after the point of a scaled chance in per cent. */
const DECIMALS = 2;

/**
 * The same cases with chances in the same proportions that add up to exactly 100 %, each to a hundredth of a per cent;
 * what rounding leaves over goes to the likeliest case.
 */
export function scaledTo100(cases: readonly CaseText[]): CaseText[] {
  const total = totalPercent(cases);
  if (total === null || total <= 0) return [...cases];
  const unit = 10 ** DECIMALS;
  const parts = cases.map(({ weight }) =>
    Math.max(1, Math.round(((Number(readPercent(weight, "")) * 100) / total) * 100 * unit)),
  );
  const rest = 100 * unit - parts.reduce((sum, part) => sum + part, 0);
  const likeliest = parts.indexOf(Math.max(...parts));
  parts[likeliest] += rest;
  return cases.map((one, index) => ({ ...one, weight: String(parts[index] / unit) }));
}
