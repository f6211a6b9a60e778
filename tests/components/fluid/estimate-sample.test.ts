import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import { isSameFluid } from "@/components/estimate/differences";
import { readSheet, textOfTest } from "@/components/estimate/sheet-text";
import { sampleOfEstimate } from "@/components/fluid/estimate-sample";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";
import "../../support/property-seed";

const { fluid } = buildInputs();
const changed: SeparatorTest = { ...fluid, condensateApi: fluid.condensateApi + 1 };
const samples = [
  { id: "other", separatorTest: changed },
  { id: "mine", separatorTest: fluid },
];

describe("readSheet(textOfTest(test))", () => {
  it("gives shares back to the last digit, whatever per cent they are typed in", () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 90_000 }), (share) => {
        const test = { ...fluid, nitrogen: 0, carbonDioxide: share / 100_000 };
        expect(readSheet(textOfTest(test)).test).toEqual(test);
      }),
      { numRuns: 100 },
    );
  });
});

describe("isSameFluid(a, b)", () => {
  it("passes over the last binary digit, the order of keys and keys without a value", () => {
    const again = Object.fromEntries(Object.entries(fluid).reverse()) as SeparatorTest;
    expect(isSameFluid({ ...again, carbonDioxide: fluid.carbonDioxide * (1 + 2e-16) }, fluid)).toBe(
      true,
    );
    expect(isSameFluid({ ...fluid, nitrogen: 0 }, { ...fluid, nitrogen: -0 })).toBe(true);
    expect(
      isSameFluid({ ...fluid, dewPointPsia: null }, { ...fluid, dewPointPsia: undefined! }),
    ).toBe(true);
  });

  it("sees another figure, and a stage that is there on one side only", () => {
    expect(isSameFluid(fluid, changed)).toBe(false);
    expect(
      isSameFluid(fluid, {
        ...fluid,
        primarySeparator: { ...fluid.primarySeparator, gasGravity: 0.7301 },
      }),
    ).toBe(false);
    expect(isSameFluid(fluid, null)).toBe(false);
    expect(isSameFluid(null, null)).toBe(true);
  });
});

describe("sampleOfEstimate(samples, stored, fluid)", () => {
  it("takes the sample that the estimate names, even after its sheet has changed", () => {
    const stored = { fluidSampleId: "other", inputs: { fluid } };
    expect(sampleOfEstimate(samples, stored, fluid)).toEqual({ sample: samples[0], isNewer: true });
  });

  it("goes by the figures where none is named, or another sheet was put into the fields", () => {
    const unnamed = { fluidSampleId: null, inputs: { fluid } };
    expect(sampleOfEstimate(samples, unnamed, fluid)?.sample.id).toBe("mine");
    expect(sampleOfEstimate(samples, null, fluid)).toEqual({ sample: samples[1], isNewer: false });
    const named = { fluidSampleId: "mine", inputs: { fluid } };
    expect(sampleOfEstimate(samples, named, changed)?.sample.id).toBe("other");
  });

  it("finds none for a sheet typed by hand, and none without a sheet", () => {
    const typed = { ...fluid, condensateApi: 40 };
    expect(sampleOfEstimate(samples, null, typed)).toBeNull();
    expect(
      sampleOfEstimate(samples, { fluidSampleId: "gone", inputs: { fluid: typed } }, typed),
    ).toBeNull();
    expect(sampleOfEstimate(samples, null, null)).toBeNull();
  });
});
