import { describe, expect, it } from "vitest";
import { readStream } from "@/analytics/composition/read-sheet";
import { DomainError } from "@/analytics/errors";
import {
  dewPointEstimates,
  elsharkawy,
  nemethKennedy,
} from "@/analytics/fluid/dew-point-correlations";
import { studyReported, studyStream } from "../depletion/third-comparative-study";

/** laboratory dew point of that fluid at 200 degF, psia: Kenyon and Behie (1987), from memory */
const MEASURED = 3443;

/**
 * North Sea gas condensate NS-1 at 280 degF, laboratory dew point 6,764.7 psia: C. H. Whitson, S. B. Torp, J. Pet.
 * Technol. 35 (March 1983) 610-620, from memory; the sheet adds up to 100.00.
 */
const northSea = readStream({
  light: {
    CO2: 2.37,
    N2: 0.31,
    C1: 73.19,
    C2: 7.8,
    C3: 3.55,
    iC4: 0.71,
    nC4: 1.45,
    iC5: 0.64,
    nC5: 0.68,
    C6: 1.09,
  },
  carbonNumbers: [],
  plus: { carbonNumber: 7, molePercent: 8.21, molecularWeight: 184, specificGravity: 0.816 },
}).stream;

describe("nemethKennedy", () => {
  it("answers its example", () => {
    // Nemeth and Kennedy (1967): coefficients of the paper, value computed separately in Python
    expect(nemethKennedy(studyStream, 200).dewPointPsia).toBeCloseTo(3483.9, 0);
  });

  it("is within its stated average error of the laboratory", () => {
    const { dewPointPsia, statedErrorFraction, warnings } = nemethKennedy(studyStream, 200);
    expect(Math.abs(dewPointPsia / MEASURED - 1)).toBeLessThan(statedErrorFraction);
    expect(warnings).toEqual([]);
  });
});

describe("dew points of a second fluid", () => {
  it.each([
    ["Nemeth and Kennedy", nemethKennedy, 0.01],
    ["Elsharkawy", elsharkawy, 0.04],
  ] as const)("lie near the laboratory's by %s", (_, correlation, tolerance) => {
    expect(Math.abs(correlation(northSea, 280).dewPointPsia / 6764.7 - 1)).toBeLessThan(tolerance);
  });
});

describe("elsharkawy", () => {
  it("answers its example", () => {
    // Elsharkawy (2002): coefficients of the paper, value computed separately in Python
    expect(elsharkawy(studyStream, 200).dewPointPsia).toBeCloseTo(3773, 0);
  });

  it("is within twice its stated average error of the laboratory", () => {
    const { dewPointPsia, statedErrorFraction } = elsharkawy(studyStream, 200);
    expect(Math.abs(dewPointPsia / MEASURED - 1)).toBeLessThan(2 * statedErrorFraction);
  });

  it("refuses a sum below zero", () => {
    const rich = readStream(
      {
        light: { CO2: 60, C1: 10, C2: 10, C3: 19 },
        carbonNumbers: [],
        plus: { carbonNumber: 7, molePercent: 1, molecularWeight: 91, specificGravity: 0.94 },
      },
      "gas",
    ).stream;
    expect(() => elsharkawy(rich, 200)).toThrow(DomainError);
    expect(dewPointEstimates(rich, 200).map(({ method }) => method)).toEqual(["nemethKennedy"]);
  });
});

describe("dewPointEstimates", () => {
  it("gives both with their sources", () => {
    const estimates = dewPointEstimates(studyStream, 200);
    expect(estimates.map(({ method }) => method)).toEqual(["nemethKennedy", "elsharkawy"]);
    for (const { source, statedErrorFraction } of estimates) {
      expect(source).toMatch(/\d{4}/);
      expect(statedErrorFraction).toBeGreaterThan(0.05);
    }
  });

  it("warns outside the data", () => {
    for (const { warnings } of dewPointEstimates(studyStream, 350)) {
      expect(warnings).toMatchObject([
        { code: "dew_point_outside_range", input: "temperatureDegF" },
      ]);
    }
    const heavy = readStream({
      ...studyReported,
      plus: { ...studyReported.plus!, molecularWeight: 240, specificGravity: 0.83 },
    }).stream;
    expect(nemethKennedy(heavy, 200).warnings).toContainEqual(
      expect.objectContaining({ input: "stream.plus.molecularWeight" }),
    );
  });

  it("gives none for a gas without heptanes plus", () => {
    const dry = readStream({ light: { C1: 95, C2: 5 }, carbonNumbers: [], plus: null }).stream;
    expect(dewPointEstimates(dry, 200)).toEqual([]);
    expect(() => nemethKennedy(dry, 200)).toThrow(DomainError);
  });
});
