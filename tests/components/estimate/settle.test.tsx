import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, it } from "vitest";
import { SettleSteps } from "@/components/estimate/settle-steps";
import {
  secondsLeft,
  settleEnd,
  settleFraction,
  trialsNeeded,
  type SettleStepView,
} from "@/components/estimate/settle-words";

const plain = (text: string) => text.replace(/\s/g, " ");

const step = (trials: number, worst: number): SettleStepView => ({
  trials,
  worst,
  condensateRecoverableStb: { p90: 10e6, p50: 30e6, p10: 90e6, mean: 40e6 },
  standardErrors: { p90: 0.1e6, p50: 0.2e6, p10: 0.9e6, mean: 0.2e6 },
});
const wish = { tolerance: 0.01, mostTrials: 65_536 };
const outcome = {
  trials: 65_536,
  engineVersion: "2.0.0",
  before: null,
  after: { p90: 1, p50: 2, p10: 3, mean: 2 },
  standardErrors: { p90: 0, p50: 0, p10: 0, mean: 0 },
  movedShare: null,
  movedStandardErrors: null,
  settled: true,
};

describe("trialsNeeded", () => {
  it("follows the root of the trials to the next doubling", () => {
    expect(trialsNeeded(step(4_096, 0.02), 0.01)).toBe(16_384);
    expect(trialsNeeded(step(4_096, 0.03), 0.01)).toBe(65_536);
    expect(trialsNeeded(step(4_096, 0.009), 0.01)).toBe(4_096);
  });
});

describe("secondsLeft", () => {
  it("scales the time so far by the doublings to come, up to the cap", () => {
    expect(secondsLeft([step(4_096, 0.02)], wish, 2)).toBe(6);
    expect(secondsLeft([step(32_768, 0.5)], wish, 10)).toBe(10);
    expect(secondsLeft([], wish, 2)).toBeNull();
  });
});

describe("settleFraction", () => {
  it("is unknown before the first doubling, and never whole before the end", () => {
    expect(settleFraction([], wish)).toBeUndefined();
    expect(settleFraction([step(4_096, 0.02)], wish)).toBe(0.25);
    expect(settleFraction([step(65_536, 0.02)], wish)).toBe(0.98);
  });
});

describe("settleEnd", () => {
  const item = {
    state: "done" as const,
    reason: null,
    outcome,
    progress: [step(65_536, 0.0093)],
  };

  it("has nothing to say while it goes on", () => {
    expect(settleEnd({ state: "running" }, item, wish)).toBeNull();
    expect(settleEnd({ state: "finished" }, { ...item, state: "running" }, wish)).toBeNull();
  });

  it("gives the trials that settled it", () => {
    const end = settleEnd({ state: "finished" }, item, wish);
    expect(end).toMatchObject({ tone: "success", title: "Settled at 65,536 trials." });
    expect(plain(end?.detail ?? "")).toMatch(/within ±0\.9 %/);
  });

  it("says how many trials would do when the cap came first", () => {
    const end = settleEnd(
      { state: "finished" },
      { ...item, outcome: { ...outcome, settled: false }, progress: [step(65_536, 0.014)] },
      wish,
    );
    expect(end).toMatchObject({ tone: "warning" });
    expect(plain(end?.detail ?? "")).toMatch(/within ±1\.4 %\. About 131,072 trials would do/);
  });

  it("says which figures it replaced, settled or not", () => {
    const before = { p90: 1, p50: 2.5, p10: 3, mean: 2 };
    for (const settled of [true, false]) {
      const end = settleEnd(
        { state: "finished" },
        { ...item, outcome: { ...outcome, settled, before } },
        wish,
      );
      expect(plain(end?.detail ?? "")).toMatch(
        /replace those before it: .* moved by \u221220\.0 %\.$/,
      );
    }
  });

  it("says that results stand when it was cancelled, failed or passed over", () => {
    const none = { ...item, outcome: null };
    const ends = [
      settleEnd({ state: "cancelled" }, { ...none, state: "passedOver" }, wish),
      settleEnd({ state: "finished" }, { ...none, state: "failed", reason: "No memory." }, wish),
      settleEnd({ state: "finished" }, { ...none, state: "passedOver" }, wish),
    ];
    expect(ends.map((end) => end?.title)).toEqual([
      "Cancelled.",
      "The run failed.",
      "Passed over.",
    ]);
    for (const end of ends) expect(end?.detail).toMatch(/results above stand as they were\.$/);
  });
});

describe("SettleSteps", () => {
  it("has a line a doubling, in the unit of the page", () => {
    const html = renderToStaticMarkup(
      <SettleSteps
        steps={[step(1_024, 0.04), step(2_048, 0.009)]}
        tolerance={0.01}
        factor={1e-6}
        unit="MMSTB"
      />,
    );
    expect(html.match(/<tr>/g)).toHaveLength(3);
    expect(plain(html)).toContain("±4.0 %");
    expect(html).toContain("Condensate to the tank after 2,048 trials: P90 10.0, P50 30.0");
  });
});
