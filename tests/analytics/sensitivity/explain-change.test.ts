import { describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import type { EstimateRun } from "@/analytics/sensitivity/estimate-changes";
import { explainChange } from "@/analytics/sensitivity/explain-change";
import { changeExplanationSchema, type Change } from "@/analytics/sensitivity/sensitivity-schema";
import type { Distribution } from "@/analytics/uncertainty/distribution-schema";
import type { EstimateInputs, InputName } from "@/analytics/volumetrics/inputs-schema";
import { simulate } from "@/analytics/volumetrics/simulate";
import { buildPlan } from "../recovery/published-curve";
import { buildInputs, withoutSpread } from "../volumetrics/estimate-inputs";

const run = (inputs: EstimateInputs, changes: Partial<EstimateRun> = {}): EstimateRun => ({
  inputs,
  seed: 5,
  trials: 4_000,
  sampling: "latinHypercube",
  ...changes,
});

function explain(from: EstimateRun, to: EstimateRun) {
  const explanation = explainChange({
    from,
    to,
    result: "condensateRecoverableStb",
    percentile: "p50",
  });
  const sum = explanation.changes.reduce((total, { effect }) => total + effect, 0);
  expect(sum).toBeCloseTo(explanation.to - explanation.from, 3);
  return changeExplanationSchema.parse(explanation);
}

const nameOf = (change: Change): string =>
  change.kind === "input"
    ? change.input
    : change.kind === "together"
      ? change.changes.map(nameOf).join(" + ")
      : change.kind;
const namesOf = ({ changes }: { changes: { change: Change }[] }) =>
  changes.map(({ change }) => nameOf(change)).sort();

const lognormal = (median: number, ratio: number): Distribution => ({
  kind: "lognormalP90P10",
  p90: median / ratio,
  p10: median * ratio,
});
const product = (areaMedian: number, thicknessMedian: number, more = {}) =>
  run(
    buildInputs(
      {
        ...withoutSpread,
        areaAcres: lognormal(areaMedian, 1.7),
        netThicknessFt: lognormal(thicknessMedian, 1.4),
        ...more,
      },
      { correlations: [] },
    ),
  );

describe("explainChange", () => {
  it("shares a product's move as the closed form does", () => {
    // P50 of a product of lognormals is k A h; averaged over both orders, area explains k (A' - A)(h + h') / 2.
    const explanation = explain(product(2000, 80), product(2600, 60));
    const k = explanation.from / (2000 * 80);
    const effectOf = (name: string) =>
      explanation.changes.find(({ change }) => nameOf(change) === name)?.effect ?? NaN;
    expect(effectOf("areaAcres") / ((k * 600 * 140) / 2)).toBeCloseTo(1, 2);
    expect(effectOf("netThicknessFt") / ((k * -20 * 4600) / 2)).toBeCloseTo(1, 2);
    expect(explanation.orders).toBe("all");
    expect(explanation.changes.every(({ standardError }) => standardError === null)).toBe(true);
  });

  it("begins and ends at what the two estimates say", () => {
    const [from, to] = [product(2000, 80), product(2600, 60)];
    const p50 = ({ inputs, seed, trials }: EstimateRun) =>
      simulate(inputs, { seed, trials }).summary.results.condensateRecoverableStb.p50;
    const explanation = explain(from, to);
    expect(explanation).toMatchObject({ from: p50(from), to: p50(to), trials: 4_000 });
    expect(explanation.own).toEqual({ from: explanation.from, to: explanation.to });
  });

  it(
    "gives beside them what the two say on all their trials, when effects are of fewer",
    { timeout: 60_000 },
    () => {
      const shifted = Object.fromEntries(
        Object.entries(withoutSpread).map(([name, distribution]) => [
          name,
          { kind: "constant", value: (distribution as { value: number }).value * 1.02 },
        ]),
      ) as Record<InputName, Distribution>;
      const many = { trials: 16_384, sampling: "sobol" } as const;
      const from = { ...product(2000, 80), ...many };
      const shiftedArea = { ...shifted, areaAcres: lognormal(2600, 1.7) };
      const to = run(buildInputs(shiftedArea, { correlations: [] }), many);
      const explanation = explain(from, to);
      expect(explanation.trials).toBe(8_192);
      const p50 = ({ inputs, ...how }: EstimateRun) =>
        simulate(inputs, how).summary.results.condensateRecoverableStb.p50;
      expect(explanation.own).toEqual({ from: p50(from), to: p50(to) });
      expect(explanation.own.from).not.toBe(explanation.from);
      expect(explanation.from / explanation.own.from).toBeCloseTo(1, 2);
    },
  );

  it("takes an estimate between the two for what its own simulation says", () => {
    const [from, to] = [product(2000, 80), product(2600, 60)];
    const p50 = ({ inputs, seed, trials }: EstimateRun) =>
      simulate(inputs, { seed, trials }).summary.results.condensateRecoverableStb.p50;
    const { areaAcres } = to.inputs.uncertain;
    const onlyArea = run({
      ...from.inputs,
      uncertain: { ...from.inputs.uncertain, areaAcres },
    });
    const { netThicknessFt } = to.inputs.uncertain;
    const onlyThickness = run({
      ...from.inputs,
      uncertain: { ...from.inputs.uncertain, netThicknessFt },
    });
    const expected = (p50(onlyArea) - p50(from) + p50(to) - p50(onlyThickness)) / 2;
    const found = explain(from, to).changes.find(({ change }) => nameOf(change) === "areaAcres");
    expect(found?.effect).toBeCloseTo(expected, 6);
  });

  it("gives no effect to a change that the result does not feel", () => {
    const explanation = explain(
      product(2000, 80),
      product(2500, 80, { gasRecovery: { kind: "constant", value: 0.8 } }),
    );
    expect(explanation.changes.find(({ change }) => nameOf(change) === "gasRecovery")?.effect).toBe(
      0,
    );
  });

  it("finds no change in a reworded source, a reason or another order of properties", () => {
    const from = product(2000, 80);
    const to = structuredClone(from);
    to.inputs.uncertain.areaAcres.source = "Map of the top";
    to.inputs.uncertain.porosity.reason = "Two cored wells";
    to.inputs.uncertain.areaAcres.distribution = Object.fromEntries(
      Object.entries(to.inputs.uncertain.areaAcres.distribution).reverse(),
    ) as Distribution;
    expect(explain(from, to)).toMatchObject({ changes: [], orders: "all" });
  });

  it("names correlations, fluid and sampling as changes of their own", () => {
    const from = run(buildInputs());
    const to = run(
      buildInputs({}, { correlations: [{ a: "porosity", b: "waterSaturation", rank: -0.2 }] }),
      { seed: 6 },
    );
    to.inputs.fluid = { ...to.inputs.fluid, condensateApi: 54 };
    expect(namesOf(explain(from, to))).toEqual(["correlations", "fluid", "sampling"]);
  });

  it("averages over drawn orders, with standard errors, when much has changed", () => {
    const shifted = Object.fromEntries(
      Object.entries(withoutSpread).map(([name, distribution]) => [
        name,
        { kind: "constant", value: (distribution as { value: number }).value * 1.02 },
      ]),
    ) as Record<InputName, Distribution>;
    const explanation = explain(
      run(buildInputs(withoutSpread, { correlations: [] }), { trials: 200 }),
      run(buildInputs(shifted, { correlations: [] }), { trials: 200 }),
    );
    expect(explanation.orders).toBe(64);
    expect(explanation.changes).toHaveLength(10);
    expect(explanation.changes.every(({ standardError }) => standardError !== null)).toBe(true);
    // Area and thickness are factors alike, each raised by 2 %.
    const [area, thickness] = ["areaAcres", "netThicknessFt"].map((name) =>
      explanation.changes.find(({ change }) => nameOf(change) === name),
    );
    const error = Math.hypot(area?.standardError ?? 0, thickness?.standardError ?? 0);
    expect(Math.abs((area?.effect ?? 0) - (thickness?.effect ?? 0))).toBeLessThan(4 * error + 1e-6);
  });

  it("keeps inputs of a set of cases together when its cases change", () => {
    const contact = (weight: number, low: number, high: number): Distribution => ({
      kind: "scenarios",
      caseSet: "contact",
      scenarios: [
        { name: "shallow", weight, distribution: { kind: "constant", value: low } },
        { name: "deep", weight: 1 - weight, distribution: { kind: "constant", value: high } },
      ],
    });
    const of = (weight: number) =>
      product(2000, 80, {
        areaAcres: contact(weight, 1500, 3000),
        netThicknessFt: contact(weight, 60, 90),
        porosity: { kind: "constant", value: 0.15 + weight / 100 },
      });
    expect(namesOf(explain(of(0.4), of(0.7)))).toEqual(["areaAcres + netThicknessFt", "porosity"]);
  });

  it("keeps a new set of cases together with the correlation that it rules out", () => {
    const cases: Distribution = {
      kind: "scenarios",
      caseSet: "facies",
      scenarios: [
        { name: "clean", weight: 0.5, distribution: { kind: "constant", value: 0.18 } },
        { name: "shaly", weight: 0.5, distribution: { kind: "constant", value: 0.12 } },
      ],
    };
    const explanation = explain(
      run(buildInputs()),
      run(buildInputs({ porosity: cases }, { correlations: [] })),
    );
    expect(namesOf(explanation)).toEqual(["porosity + correlations"]);
  });

  const state = {
    pressurePsia: { kind: "normal", mean: 4500, standardDeviation: 100 },
    temperatureDegF: { kind: "normal", mean: 200, standardDeviation: 3 },
    condensateYieldStbPerMmscf: { kind: "uniform", low: 130, high: 165 },
  } satisfies Partial<Record<InputName, Distribution>>;

  it("takes a recovery plan and the recoveries it replaces for one change", () => {
    const explanation = explain(
      run(buildInputs(state, { depthFt: null })),
      run(
        buildInputs(
          { ...state, condensateRecovery: { kind: "constant", value: 0.4 } },
          { depthFt: null, recoveryPlan: buildPlan() },
        ),
      ),
    );
    expect(namesOf(explanation)).toEqual(["recoveryPlan"]);
  });

  it("tells the inputs of two plans of one concept apart", () => {
    const withFactor = (value: number) =>
      run(
        buildInputs(state, {
          depthFt: null,
          recoveryPlan: buildPlan({
            condensateCurveFactor: { distribution: { kind: "constant", value }, source: "" },
          }),
        }),
      );
    expect(namesOf(explain(withFactor(0.9), withFactor(1.05)))).toEqual(["condensateCurveFactor"]);
  });

  it("joins fluid, plan and state when a mixture of them makes no estimate", () => {
    // At 900 psia the reservoir is below the pressure at which the plan abandons it.
    const depleted: Distribution = { kind: "constant", value: 900 };
    const before = run(buildInputs({ ...state, pressurePsia: depleted }, { depthFt: null }));
    const after = run(
      buildInputs(
        { ...state, areaAcres: lognormal(1500, 1.5) },
        {
          depthFt: null,
          recoveryPlan: buildPlan({
            abandonmentPressurePsia: {
              distribution: { kind: "constant", value: 1200 },
              source: "",
            },
          }),
        },
      ),
    );
    expect(namesOf(explain(before, after))).toEqual(["areaAcres", "pressurePsia + recoveryPlan"]);
  });

  it("refuses an estimate that is impossible, with its reason", () => {
    const impossible = product(2000, 80, { porosity: { kind: "constant", value: 0.6 } });
    expect(() => explain(product(2000, 80), impossible)).toThrow(DomainError);
  });
});
