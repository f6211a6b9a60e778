/** What a chart or a table shows, in a sentence with the figures in it. Nothing here is said that was not computed. */
import { inputNames, type EstimateInputs } from "@/analytics/volumetrics/inputs-schema";
import type { Driver, DriverName, Range } from "@/analytics/volumetrics/results-schema";
import { listWords } from "@/components/portfolio/reporting";
import { formatFigure, formatPercent, lowerFirst } from "@/components/ui/format";
import { driverCatalogue } from "./input-catalogue";

const named = (name: DriverName) => driverCatalogue[name].label;

/** "Net thickness and area make 92 % of the spread", or one input alone when it makes most of it. */
export function driverFinding(drivers: readonly Driver[]): string {
  const [first, second] = drivers.filter((driver) => driver.shareOfSpread > 0);
  if (!first) return "Nothing spreads: every input is a constant";
  if (!second || first.shareOfSpread >= 0.6) {
    return `${named(first.input)} makes ${formatPercent(first.shareOfSpread)} of the spread`;
  }
  const both = first.shareOfSpread + second.shareOfSpread;
  return `${named(first.input)} and ${lowerFirst(named(second.input))} make ${formatPercent(both)} of the spread`;
}

/** "Net thickness alone swings it furthest: from 12.1 to 40.3 MMSTB"; drivers with the widest swing first. */
export function swingFinding([first]: readonly Driver[], factor: number, unit: string): string {
  if (!first) return "Nothing swings: every input is a constant";
  const [low, high] = [first.swing.atP90, first.swing.atP10].sort((a, b) => a - b);
  return `${named(first.input)} alone swings it furthest: from ${formatFigure(low * factor)} to ${formatFigure(high * factor)} ${unit}`;
}

/** Which inputs take the same case in every trial, so that none of them swings alone there; `null` without any. */
export function caseSetWords({ uncertain }: Pick<EstimateInputs, "uncertain">): string | null {
  const sets = new Map<string, string[]>();
  for (const name of inputNames) {
    const { distribution } = uncertain[name];
    if (distribution.kind !== "scenarios" || distribution.caseSet === undefined) continue;
    sets.set(distribution.caseSet, [...(sets.get(distribution.caseSet) ?? []), named(name)]);
  }
  const sentences = [...sets.values()]
    .filter((names) => names.length > 1)
    .map(
      ([first, ...others]) =>
        `${listWords([first, ...others.map(lowerFirst)])} take the same case in every trial and move together there; here each moves alone.`,
    );
  return sentences.length === 0 ? null : sentences.join(" ");
}

/** Below this a change of a percentile is of the size of the sampling error: it "barely moved". */
const BARELY = 0.02;

function movement(before: number, now: number): "rose" | "fell" | "barely moved" {
  if (Math.abs(now / before - 1) < BARELY) return "barely moved";
  return now > before ? "rose" : "fell";
}

/** How the ends of a range moved against what they were: "The low case fell from 11.3 to 6.4 MMSTB; …". */
export function changeFinding(now: Range, before: Range, unit: string): string {
  const low = movement(before.p90, now.p90);
  const high = movement(before.p10, now.p10);
  if (low === "barely moved" && high === "barely moved") {
    return `The range stands where it stood: ${formatFigure(now.p90)} to ${formatFigure(now.p10)} ${unit}`;
  }
  const moved = (name: string, word: string, from: number, to: number) =>
    `${name} ${word} from ${formatFigure(from)} to ${formatFigure(to)} ${unit}`;
  if (low === "barely moved") {
    return `${moved("The high case", high, before.p10, now.p10)}; the low case barely moved`;
  }
  const first = moved("The low case", low, before.p90, now.p90);
  if (high === "barely moved") return `${first}; the high case barely moved`;
  return `${first}, the high case from ${formatFigure(before.p10)} to ${formatFigure(now.p10)}`;
}

/** "9 in 10 that at least 6.4 MMSTB reaches the tank" for a range that has nothing to compare with. */
export function rangeFinding(now: Range, unit: string): string {
  return `Nine chances in ten of at least ${formatFigure(now.p90)} ${unit}, one in ten of ${formatFigure(now.p10)} or more`;
}

/** "Three of ten inputs differ from r4" */
export function differenceFinding(changed: number, total: number, revision: number): string {
  const words = [
    "No",
    "One",
    "Two",
    "Three",
    "Four",
    "Five",
    "Six",
    "Seven",
    "Eight",
    "Nine",
    "Ten",
    "Eleven",
    "Twelve",
  ];
  if (changed === total) return `All inputs differ from r${revision}`;
  return `${words[changed] ?? changed} of ${(words[total] ?? String(total)).toLowerCase()} inputs ${changed === 1 ? "differs" : "differ"} from r${revision}`;
}
