import { describe, expect, it } from "vitest";
import { previewWarnings, waitingWords } from "@/components/estimate/checklist";
import { readEstimate } from "@/components/estimate/estimate-reading";
import { emptyText, textOfInputs } from "@/components/estimate/estimate-text";
import { textOfDistribution } from "@/components/estimate/input-text";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";

describe("waitingWords(reading)", () => {
  it("names the impossible input before those to fill in", () => {
    const text = emptyText(null, null);
    expect(waitingWords(readEstimate(text))).toBe("Results appear when every input is filled in.");
    text.inputs.porosity = textOfDistribution({ kind: "constant", value: 0.6 });
    expect(waitingWords(readEstimate(text))).toBe(
      "One input is impossible: porosity. Results appear when that is put right.",
    );
  });

  it("asks for the fluid when nothing else is missing", () => {
    const text = { ...textOfInputs(buildInputs()), fluid: null };
    expect(waitingWords(readEstimate(text))).toMatch(/fluid sample/);
  });
});

describe("previewWarnings(warnings)", () => {
  it("leaves out that a preview has few trials, and nothing else", () => {
    const warning = (code: string) => ({ code, severity: "warning" as const, message: "Why?" });
    const left = previewWarnings([warning("few_trials"), warning("very_wide_result")]);
    expect(left.map(({ code }) => code)).toEqual(["very_wide_result"]);
  });
});
