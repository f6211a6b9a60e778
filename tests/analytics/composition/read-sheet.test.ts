import "../../support/property-seed";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { watsonFactor } from "@/analytics/composition/check-sheet";
import { lightComponents, type ReportedStream } from "@/analytics/composition/composition-schema";
import { lumpFractions } from "@/analytics/composition/heptanes-plus";
import { readComposition, readStream } from "@/analytics/composition/read-sheet";
import { DomainError } from "@/analytics/errors";
import { studyReported } from "../depletion/third-comparative-study";

const refusal = (act: () => unknown): DomainError => {
  try {
    act();
  } catch (error) {
    if (error instanceof DomainError) return error;
    throw error;
  }
  throw new Error("nothing was refused");
};

const drySheet: ReportedStream = { light: { C1: 95, C2: 5 }, carbonNumbers: [], plus: null };
const withPlus = (change: Partial<NonNullable<ReportedStream["plus"]>>): ReportedStream => ({
  ...studyReported,
  plus: { ...studyReported.plus!, ...change },
});

describe("readStream", () => {
  it("answers its example", () => {
    const { normalised, stream } = readStream({ ...drySheet, light: { C1: 90, C2: 9 } });
    expect(normalised.factor).toBeCloseTo(1.010101, 6);
    expect(normalised.reportedTotalMolePercent).toBeCloseTo(99, 12);
    expect(stream.components[0].moleFraction).toBeCloseTo(90 / 99, 12);
  });

  it("leaves a sheet that adds up alone", () => {
    expect(readStream(studyReported).normalised.factor).toBe(1);
    expect(readStream(studyReported).warnings).toEqual([]);
  });

  it("finds the gravity of the third comparative solution project's fluid", () => {
    // sum of y M by hand with the molecular weights of GPA 2145, over 28.9647
    const { stream } = readStream(studyReported);
    expect(stream.molecularWeight).toBeCloseTo(32.613, 3);
    expect(stream.gravity).toBeCloseTo(1.12596, 4);
    expect(stream.heptanesPlus).toEqual({
      moleFraction: expect.closeTo(0.0659, 12),
      molecularWeight: expect.closeTo(140, 9),
      specificGravity: expect.closeTo(0.774, 12),
    });
  });

  it("warns from one per cent off and refuses from five", () => {
    const off = (C1: number) => ({ ...drySheet, light: { C1, C2: 5 } });
    expect(readStream(off(94.5)).warnings).toEqual([]);
    expect(readStream(off(93.5)).warnings[0]).toMatchObject({ code: "sum_not_100" });
    expect(readStream(off(97)).warnings[0].message).toContain("102 %");
    expect(refusal(() => readStream(off(89.9))).details).toMatchObject({ input: "stream" });
    expect(
      refusal(() => readStream({ ...drySheet, light: { C1: 99, C2: 6.1 } })).message,
    ).toContain("105.1 %");
    expect(() => readStream({ light: {}, carbonNumbers: [], plus: null })).toThrow(DomainError);
  });

  it("refuses negative figures and figures that are none", () => {
    const light = (C2: number) => ({ ...drySheet, light: { C1: 95, C2 } });
    expect(refusal(() => readStream(light(-1))).details).toEqual({
      input: "stream.light.C2",
      value: -1,
    });
    expect(() => readStream(light(Number.NaN))).toThrow(DomainError);
  });

  it("refuses a plus fraction without its properties", () => {
    for (const key of ["molecularWeight", "specificGravity"] as const) {
      const error = refusal(() => readStream(withPlus({ [key]: Number.NaN })));
      expect(error.details.input).toBe(`stream.plus.${key}`);
    }
  });

  it("refuses impossible properties of heptanes plus and warns of unusual ones", () => {
    expect(refusal(() => readStream(withPlus({ molecularWeight: 45 }))).details.input).toBe(
      "stream.plus.molecularWeight",
    );
    expect(refusal(() => readStream(withPlus({ specificGravity: 1.2 }))).details.input).toBe(
      "stream.plus.specificGravity",
    );
    const codes = (stream: ReportedStream) => readStream(stream).warnings.map(({ input }) => input);
    expect(codes(withPlus({ molecularWeight: 210, specificGravity: 0.825 }))).toEqual([
      "stream.plus.molecularWeight",
    ]);
    // a Watson factor that no petroleum fraction has gives away a typing error
    expect(codes(withPlus({ molecularWeight: 110, specificGravity: 0.829 }))).toEqual([
      "stream.plus.specificGravity",
    ]);
  });

  it("refuses an oil as a wellstream and reads it as a separator liquid", () => {
    const oil: ReportedStream = {
      light: { C1: 10, C3: 10, nC5: 30 },
      carbonNumbers: [],
      plus: { carbonNumber: 7, molePercent: 50, molecularWeight: 140, specificGravity: 0.774 },
    };
    const { message, details } = refusal(() => readStream(oil));
    expect(details.input).toBe("stream.plus.molePercent");
    expect(message).toMatch(/50 mol % heptanes plus this is an oil: .* 12\.5 % \(McCain 1990\)/);
    expect(readStream(oil, "liquid", "liquid").warnings).toEqual([]);
  });

  it("asks for heptanes plus where a wellstream ends at the hexanes", () => {
    const light = { C1: 95, C2: 4, C6: 1 };
    expect(readStream({ ...drySheet, light }).warnings).toMatchObject([
      { code: "heptanes_plus_missing", input: "stream.plus" },
    ]);
    expect(readStream({ ...drySheet, light }, "gas", "gas").warnings).toEqual([]);
  });

  it("cautions about hydrogen sulphide", () => {
    const { warnings } = readStream({ ...drySheet, light: { C1: 93, C2: 5, H2S: 2 } });
    expect(warnings).toMatchObject([{ code: "sour_gas", severity: "caution" }]);
    expect(warnings[0].message).toContain("20,000 ppm");
  });

  it("refuses gaps, doubles and a plus fraction that does not follow on", () => {
    const numbers = (carbonNumbers: number[], plus: number) =>
      readStream({
        light: { C1: 90 },
        carbonNumbers: carbonNumbers.map((carbonNumber) => ({ carbonNumber, molePercent: 1 })),
        plus: {
          carbonNumber: plus,
          molePercent: 10 - carbonNumbers.length,
          molecularWeight: 200,
          specificGravity: 0.82,
        },
      });
    expect(refusal(() => numbers([7, 9], 10)).message).toContain("C8 is missing");
    expect(refusal(() => numbers([7, 8, 8], 9)).message).toContain("twice");
    expect(refusal(() => numbers([7, 8], 10)).message).toContain("comes C9+");
    expect(refusal(() => numbers([], 9)).message).toContain("C7 to C8 are missing");
    expect(refusal(() => numbers([7, 8], 10)).details.input).toBe("stream.plus.carbonNumber");
  });

  it("lumps an extended analysis to heptanes plus with its moles, mass and volume", () => {
    // C7 to C9 of the generalised table and C10+, lumped by hand:
    // M = (1 x 96 + 2 x 107 + 1 x 121 + 2 x 190) / 6 = 135.1667
    // volume = 96/0.727 + 214/0.749 + 121/0.768 + 380/0.81 = 1044.452; g = 811 / 1044.452
    const { stream } = readStream({
      light: { C1: 94 },
      carbonNumbers: [
        { carbonNumber: 8, molePercent: 2 },
        { carbonNumber: 7, molePercent: 1 },
        { carbonNumber: 9, molePercent: 1 },
      ],
      plus: { carbonNumber: 10, molePercent: 2, molecularWeight: 190, specificGravity: 0.81 },
    });
    expect(stream.components.map(({ name }) => name)).toEqual(["C1", "C7", "C8", "C9", "C10+"]);
    expect(stream.heptanesPlus!.moleFraction).toBeCloseTo(0.06, 12);
    expect(stream.heptanesPlus!.molecularWeight).toBeCloseTo(135.1667, 4);
    expect(stream.heptanesPlus!.specificGravity).toBeCloseTo(0.776483, 5);
  });

  it("refuses an end lighter than the carbon number before it", () => {
    const error = refusal(() =>
      readStream({
        light: { C1: 97 },
        carbonNumbers: [{ carbonNumber: 7, molePercent: 1 }],
        plus: { carbonNumber: 8, molePercent: 2, molecularWeight: 95, specificGravity: 0.75 },
      }),
    );
    expect(error.details.input).toBe("stream.plus.molecularWeight");
  });

  const sheets = fc
    .record({
      light: fc.record(
        Object.fromEntries(
          lightComponents
            .filter((name) => name !== "C1")
            .map((name) => [name, fc.double({ min: 0, max: 3, noNaN: true })]),
        ),
      ),
      heavy: fc.array(fc.double({ min: 0, max: 0.5, noNaN: true }), { maxLength: 20 }),
      plus: fc.double({ min: 0.01, max: 4, noNaN: true }),
      total: fc.double({ min: 95.5, max: 104.5, noNaN: true }),
    })
    .map(({ light, heavy, plus, total }): ReportedStream => {
      const carbonNumbers = heavy.map((molePercent, index) => ({
        carbonNumber: 7 + index,
        molePercent,
      }));
      const rest = [...Object.values(light), ...heavy, plus].reduce((a, b) => a + b, 0);
      return {
        light: { ...light, C1: Math.min(100, total - rest) },
        carbonNumbers,
        plus: {
          carbonNumber: 7 + heavy.length,
          molePercent: plus,
          molecularWeight: 140 + 15 * heavy.length,
          specificGravity: 0.774 + 0.006 * heavy.length,
        },
      };
    });

  it("brings every sheet to a sum of one", () => {
    fc.assert(
      fc.property(sheets, (sheet) => {
        const { stream, normalised } = readStream(sheet);
        const sum = stream.components.reduce((total, row) => total + row.moleFraction, 0);
        expect(sum).toBeCloseTo(1, 12);
        expect(normalised.factor * normalised.reportedTotalMolePercent).toBeCloseTo(100, 9);
      }),
      { numRuns: 100 },
    );
  });

  it("does not care about the order of a sheet", () => {
    fc.assert(
      fc.property(sheets, (sheet) => {
        const turned: ReportedStream = {
          light: Object.fromEntries(Object.entries(sheet.light).reverse()),
          carbonNumbers: [...sheet.carbonNumbers].reverse(),
          plus: sheet.plus,
        };
        expect(readStream(turned)).toEqual(readStream(sheet));
      }),
      { numRuns: 100 },
    );
  });
});

describe("readComposition", () => {
  it("answers its example", () => {
    // (0.95 x 16.0425 + 0.05 x 30.069) / 28.9647
    const { stream } = readComposition({ kind: "wellstream", stream: drySheet });
    expect(stream.gravity).toBeCloseTo(0.578077, 6);
  });

  /** gas and liquid of one separator; figures invented, recombined by hand below */
  const separator = {
    kind: "separatorStreams" as const,
    gas: {
      light: { N2: 2, C1: 84, C2: 8, C3: 4, nC4: 1.5 },
      carbonNumbers: [],
      plus: { carbonNumber: 7, molePercent: 0.5, molecularWeight: 103, specificGravity: 0.72 },
    },
    liquid: {
      light: { C1: 20, C2: 8, C3: 10, nC4: 10, nC5: 12 },
      carbonNumbers: [],
      plus: { carbonNumber: 7, molePercent: 40, molecularWeight: 145, specificGravity: 0.778 },
    },
    gasLiquidRatioScfPerSeparatorBarrel: 5000,
    liquidDensityLbPerCubicFoot: 40,
    basePressurePsia: 14.65,
  };

  it("recombines moles of gas from its volume and moles of liquid from its density", () => {
    const { stream, normalised, reportedMolePercent } = readComposition(separator);
    // Vm at 14.65 psia = 10.731577 x 519.67 / 14.65 = 380.674; gas 5000/380.674 = 13.13457 lbmol
    // M liquid = 0.2 x 16.0425 + 0.08 x 30.069 + 0.1 x 44.0956 + 0.1 x 58.1222 + 0.12 x 72.1488 + 0.4 x 145 = 82.49366
    // liquid 5.6145833 x 40 / 82.49366 = 2.722431 lbmol; gas share 0.828311
    const share = 0.828311;
    const of = (name: string) => stream.components.find((row) => row.name === name)!.moleFraction;
    expect(of("C1")).toBeCloseTo(0.84 * share + 0.2 * (1 - share), 5);
    expect(of("N2")).toBeCloseTo(0.02 * share, 5);
    expect(of("C7+")).toBeCloseTo(0.005 * share + 0.4 * (1 - share), 5);
    // heptanes plus: moles 0.00414156 of 103 and 0.0686756 of 145
    expect(stream.heptanesPlus!.molecularWeight).toBeCloseTo(142.611, 2);
    expect(normalised.map((row) => row.stream)).toEqual(["gas", "liquid"]);
    expect(reportedMolePercent).toBeNull();
  });

  it("keeps moles and mass when a whole plus fraction meets a liquid reported number by number", () => {
    const extended = {
      ...separator,
      liquid: {
        ...separator.liquid,
        carbonNumbers: [
          { carbonNumber: 7, molePercent: 10 },
          { carbonNumber: 8, molePercent: 10 },
        ],
        plus: { carbonNumber: 9, molePercent: 20, molecularWeight: 180, specificGravity: 0.8 },
      },
    };
    const { stream, warnings } = readComposition(extended);
    expect(warnings).toMatchObject([{ code: "plus_fraction_joined", input: "gas.plus" }]);
    expect(stream.components.filter((row) => row.carbonNumber).map((row) => row.name)).toEqual([
      "C7",
      "C8",
      "C9+",
    ]);
    const [gas, liquid] = [readStream(extended.gas, "gas"), readStream(extended.liquid, "liquid")];
    const moles = [
      5000 / ((10.731577 * 519.67) / 14.65),
      (5.6145833 * 40) / liquid.stream.molecularWeight,
    ] as const;
    expect(stream.molecularWeight).toBeCloseTo(
      (moles[0] * gas.stream.molecularWeight + moles[1] * liquid.stream.molecularWeight) /
        (moles[0] + moles[1]),
      5,
    );
    expect(stream.heptanesPlus).toEqual({
      ...lumpFractions([
        {
          ...gas.stream.heptanesPlus!,
          moleFraction: (0.005 * moles[0]) / (moles[0] + moles[1]),
        },
        {
          ...liquid.stream.heptanesPlus!,
          moleFraction: (0.4 * moles[1]) / (moles[0] + moles[1]),
        },
      ]),
      moleFraction: expect.any(Number),
      molecularWeight: expect.any(Number),
      specificGravity: expect.any(Number),
    });
  });

  it("refuses a ratio or a density that no separator has", () => {
    expect(
      refusal(() => readComposition({ ...separator, gasLiquidRatioScfPerSeparatorBarrel: 20 }))
        .details.input,
    ).toBe("gasLiquidRatioScfPerSeparatorBarrel");
    expect(
      refusal(() => readComposition({ ...separator, liquidDensityLbPerCubicFoot: 80 })).details
        .input,
    ).toBe("liquidDensityLbPerCubicFoot");
    expect(() => readComposition({ ...separator, basePressurePsia: 500 })).toThrow(DomainError);
  });

  it("names the stream whose figure is impossible", () => {
    const liquid = { ...separator.liquid, light: { ...separator.liquid.light, C2: -3 } };
    expect(refusal(() => readComposition({ ...separator, liquid })).details.input).toBe(
      "liquid.light.C2",
    );
  });
});

describe("watsonFactor", () => {
  it("answers its example and that of n-heptane", () => {
    expect(watsonFactor(140, 0.774)).toBeCloseTo(11.9839, 3);
    // n-heptane boils at 668.9 degR with g 0.6882: Tb^(1/3)/g = 12.71; the correlation in M is within 2 %
    expect(Math.abs(watsonFactor(100.2, 0.6882) / 12.71 - 1)).toBeLessThan(0.02);
  });
});
