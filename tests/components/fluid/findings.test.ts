import { describe, expect, it } from "vitest";
import type { SeparatorTest } from "@/analytics/fluid/separator-test-schema";
import type { DepletionResponse } from "@/app/api/v1/calculations/fluid-schema";
import { routeWords } from "@/components/fluid/available-curves";
import { dewPointOf } from "@/components/fluid/fluid-figures";
import { sampleFindings, type SampleEvidence } from "@/components/fluid/sample-findings";
import { screeningCurve } from "@/components/fluid/screening-curve";
import { equationOfState } from "./fixtures";

const nothing: SampleEvidence = {
  wellstream: null,
  composition: null,
  equationOfState: null,
  depletion: null,
  screeningWarnings: [],
  curve: null,
  tuning: null,
  dewPoints: { test: null, table: null },
  criticalBand: { low: 10, high: 20 },
  waterSaturation: null,
};
const curve = {
  route: "untunedEquationOfState" as const,
  ...routeWords.untunedEquationOfState,
  curve: equationOfState.curve!,
};
const titles = (evidence: Partial<SampleEvidence>) =>
  sampleFindings({ ...nothing, ...evidence }).map(({ title }) => title);

describe("screeningCurve", () => {
  const test: SeparatorTest = {
    basePressurePsia: 14.696,
    primarySeparator: {
      pressurePsia: 814.7,
      temperatureDegF: 80,
      gasOilRatioScfPerStb: 6_500,
      gasGravity: 0.69,
    },
    secondSeparator: null,
    stockTankGas: { gasOilRatioScfPerStb: 700, gasGravity: 1.1 },
    condensateApi: 60,
    condensateMolecularWeight: null,
    nitrogen: 0,
    carbonDioxide: 0,
    hydrogenSulphide: 0,
    dewPointPsia: 3500,
  };

  it("brings its warnings to the sample's findings", () => {
    const { curve: found, reason, warnings } = screeningCurve(test, 200, null);
    expect(found?.route).toBe("correlation");
    expect(reason).toBeNull();
    const texts = sampleFindings({ ...nothing, screeningWarnings: warnings }).map(
      ({ text }) => text,
    );
    expect(texts.join(" ")).toContain("comes from a correlation of surface figures");
  });

  it("says why there is no curve, and nothing while figures are missing", () => {
    const lean = {
      ...test,
      primarySeparator: { ...test.primarySeparator, gasOilRatioScfPerStb: 70_000 },
    };
    expect(screeningCurve(lean, 200, null).reason).toContain("too lean for it");
    expect(screeningCurve(null, 200, null)).toEqual({ curve: null, reason: null, warnings: [] });
  });
});

describe("sampleFindings(evidence)", () => {
  it("says nothing about what is not there", () => {
    expect(sampleFindings(nothing)).toEqual([]);
  });

  it("sets the computed dew point against the measured one", () => {
    const [finding] = sampleFindings({ ...nothing, equationOfState });
    expect(finding).toMatchObject({
      tone: "done",
      title: "Dew point of the untuned equation of state",
      text: "5,201 psia: 14.0 psi below the measured one.",
    });
  });

  it("flags two dew points that differ, and a fit to one that has changed since", () => {
    expect(titles({ dewPoints: { test: 5100, table: 5215 } })).toEqual(["Two dew points"]);
    expect(titles({ dewPoints: { test: 5214, table: 5215 } })).toEqual([]);
    const tuning = {
      measuredDewPointPsia: 5100,
      fittedDewPointPsia: 5101,
      averageLiquidErrorPoints: null,
      fittedTo: null,
    };
    expect(titles({ tuning, dewPoints: { test: null, table: 5215 } })).toEqual([
      "Tuned to another dew point",
    ]);
  });

  it("flags dropout that reaches the critical band, and that which passes it", () => {
    // The curve's liquid is 20 % at most.
    expect(titles({ curve })).toEqual(["Dropout reaches into the critical band"]);
    expect(titles({ curve, criticalBand: { low: 5, high: 15 } })).toEqual([
      "Dropout passes the critical saturation",
    ]);
    expect(titles({ curve, criticalBand: { low: 20, high: 30 } })).toEqual([]);
  });

  it("tells a check that fails in several rows once", () => {
    const check = (row: number) => ({
      code: "two_phase_z",
      severity: "warning" as const,
      title: "Two-phase z agrees with the moles",
      message: `Row ${row + 1} does not.`,
      row,
      column: "twoPhaseZ",
    });
    const depletion: DepletionResponse = {
      findings: [check(1), check(2), check(4)],
      rows: [],
      hoffmann: [],
      curve: null,
      method: "kValues",
      warnings: [],
    };
    expect(sampleFindings({ ...nothing, depletion })).toEqual([
      {
        tone: "warning",
        title: "Two-phase z agrees with the moles",
        text: "Row 2 does not. And 2 more of the kind.",
      },
    ]);
  });
});

describe("dewPointOf(sample)", () => {
  it("prefers what was measured, and names the source of what was not", () => {
    const sample = { composition: null, equationOfState, measuredDewPointPsia: 5215 };
    expect(dewPointOf(sample)).toEqual({ pressurePsia: 5215, source: "measured" });
    expect(dewPointOf({ ...sample, measuredDewPointPsia: null })).toEqual({
      pressurePsia: 5201,
      source: "untuned equation of state",
    });
    expect(
      dewPointOf({ composition: null, equationOfState: null, measuredDewPointPsia: null }),
    ).toBeNull();
  });
});
