import { describe, expect, it } from "vitest";
import { cellRows } from "@/analytics/depletion/cell-rows";
import { hoffmannLines, placedStates } from "@/analytics/depletion/check-balance";
import { characterisationFactor, hoffmannLine } from "@/analytics/depletion/hoffmann";
import { balanceComponents } from "@/analytics/depletion/lumped-gas";
import { separateByKValues } from "@/analytics/depletion/separate-by-k-values";
import { standingKValues, standingKWarnings } from "@/analytics/depletion/standing-k-values";
import { DomainError } from "@/analytics/errors";
import { studyStages, studyStream, studyTable } from "./third-comparative-study";

describe("characterisationFactor", () => {
  it("answers its example", () => {
    const methane = { slopeDegR: 300, boilingPointDegR: 94 };
    expect(characterisationFactor(methane, 200)).toBeCloseTo(2.736717, 6);
  });

  it("refuses a temperature below absolute zero", () => {
    expect(() => characterisationFactor({ slopeDegR: 300, boilingPointDegR: 94 }, -460)).toThrow(
      DomainError,
    );
  });
});

describe("hoffmannLine", () => {
  const table = studyTable();
  const lines = hoffmannLines(200, placedStates(cellRows(table), studyStream));

  it.each([
    // slope, intercept and R2 through C1 to C6, fitted separately with NumPy polyfit
    [3014.7, 0.237985, 3.001489, 0.989985],
    [2414.7, 0.36021, 2.659414, 0.991627],
    [1814.7, 0.487362, 2.305773, 0.994718],
    [1214.7, 0.605303, 1.972296, 0.996458],
    [714.7, 0.69223, 1.713853, 0.999384],
  ])("fits the study's K values at %d psia", (pressure, slope, intercept, rSquared) => {
    const { line } = lines.find(({ line }) => Math.abs(line.pressurePsia - pressure) < 0.01)!;
    expect(line.slope).toBeCloseTo(slope, 5);
    expect(line.intercept).toBeCloseTo(intercept, 5);
    expect(line.rSquared).toBeCloseTo(rSquared, 5);
  });

  it("gives Standing's own K values a straight line, and no outlier", () => {
    // below 1,000 psia his correlation is log10(K p) = a + c F by construction
    const line = hoffmannLine(400, 100, Array.from(standingKValues(400, 100)))!;
    expect(line.rSquared).toBeCloseTo(1, 12);
    expect(line.slope).toBeCloseTo(0.89 - 1.7e-4 * 400 - 3.5e-8 * 400 ** 2, 10);
    expect(line.intercept).toBeCloseTo(1.2 + 4.5e-4 * 400 + 15e-10 * 400 ** 2, 10);
    expect(line.points.some(({ isOutlier }) => isOutlier)).toBe(false);
    expect(line.points).toHaveLength(balanceComponents.length - 1);
  });

  it("picks out the one that is off", () => {
    const kValues = Array.from(standingKValues(400, 100));
    kValues[balanceComponents.indexOf("nC4")] *= 2;
    const outliers = hoffmannLine(400, 100, kValues)!.points.filter(({ isOutlier }) => isOutlier);
    expect(outliers.map(({ name }) => name)).toEqual(["nC4"]);
  });

  it("draws no line through three hydrocarbons", () => {
    const kValues = Array.from(standingKValues(400, 100), (k, i) =>
      ["C1", "C2", "C3", "N2", "CO2"].includes(balanceComponents[i]) ? k : null,
    );
    expect(hoffmannLine(400, 100, kValues)).toBeNull();
  });
});

describe("standingKValues", () => {
  it("answers its example", () => {
    expect(standingKValues(814.7, 80)[balanceComponents.indexOf("C1")]).toBeCloseTo(3.7674, 4);
  });

  it("orders the hydrocarbons by how readily they boil", () => {
    const k = standingKValues(500, 80);
    const hydrocarbons = ["C1", "C2", "C3", "iC4", "nC4", "iC5", "nC5", "C6", "C7+"] as const;
    const inOrder = hydrocarbons.map((name) => k[balanceComponents.indexOf(name)]);
    expect(inOrder).toEqual([...inOrder].sort((a, b) => b - a));
  });

  it("refuses a pressure of nought and says where it is extrapolated", () => {
    expect(() => standingKValues(0, 80)).toThrow(DomainError);
    expect(standingKWarnings(814.7, 80)).toEqual([]);
    expect(standingKWarnings(1200, 80)[0].code).toBe("k_values_outside_range");
  });
});

describe("separateByKValues", () => {
  const products = separateByKValues(studyStream, studyStages(3442.7));

  it("agrees with a separate calculation of the same correlation to 0.1 %", () => {
    // 137.65 STB and 720.37 / 135.26 / 20.24 Mscf, computed independently with coefficients from memory
    expect(Math.abs(products.condensateStb / 137.65 - 1)).toBeLessThan(0.001);
    [720.37, 135.26, 20.24].forEach((expected, index) =>
      expect(Math.abs(products.stageGasMscf[index] / expected - 1)).toBeLessThan(0.001),
    );
  });

  it("is within 6 % of the study's own table", () => {
    // Kenyon and Behie (1987), from memory: 131.00 STB and 750.46 Mscf of first-separator gas
    expect(Math.abs(products.condensateStb / 131 - 1)).toBeLessThan(0.06);
    expect(Math.abs(products.stageGasMscf[0] / 750.46 - 1)).toBeLessThan(0.05);
  });

  it("keeps the moles: surface gas and the vapour of the condensate make the stream", () => {
    const products = separateByKValues(studyStream, studyStages(3442.7));
    // the condensate's own vapour: about 0.124 of 1 MMscf, as 1000 less the gas of all stages
    const condensateMscf = 1000 - products.surfaceGasMscf;
    expect(condensateMscf).toBeGreaterThan(100);
    // 137.65 STB of a 0.72 to 0.76 liquid with M between 95 and 125
    const molesPerStb = (condensateMscf * 1000) / 379.4828 / products.condensateStb;
    expect((350.162 * 0.74) / molesPerStb).toBeGreaterThan(95);
    expect((350.162 * 0.74) / molesPerStb).toBeLessThan(125);
  });

  it("brings no liquid from methane", () => {
    const methane = {
      ...studyStream,
      heptanesPlus: null,
      components: studyStream.components
        .filter(({ name }) => name === "C1")
        .map((component) => ({ ...component, moleFraction: 1 })),
    };
    const dry = separateByKValues(methane, studyStages(3442.7));
    expect(dry.condensateStb).toBe(0);
    expect(dry.surfaceGasMscf).toBeCloseTo(1000, 9);
  });
});
