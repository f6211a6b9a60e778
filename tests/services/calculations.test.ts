import { describe, expect, it } from "vitest";
import type { Warning } from "@/analytics/warnings";
import { calculateInPlace, calculateWellstream, calculateZFactor } from "@/services/calculations";
import { InvalidInputError } from "@/services/errors";
import { buildInputs } from "../analytics/volumetrics/estimate-inputs";

const separatorTest = { ...buildInputs().fluid, hydrogenSulphide: 0.02, carbonDioxide: 0.03 };
const gas = {
  gasGravity: 0.8,
  pressurePsia: 16_000,
  temperatureDegF: 340,
  nitrogen: 0,
  carbonDioxide: 0.03,
  hydrogenSulphide: 0.02,
};
const reservoir = { pressurePsia: 16_000, temperatureDegF: 340 };
const rock = {
  ...reservoir,
  areaAcres: 2500,
  netThicknessFt: 80,
  porosity: 0.15,
  waterSaturation: 0.25,
  separatorTest,
  zFactor: null,
  condensateYieldStbPerMmscf: null,
};

function dangers(warnings: Warning[]): [code: string, input: string | undefined][] {
  const codes = ["high_pressure_high_temperature", "sour_gas", "corrosive_gas"];
  const told = warnings.filter(({ code }) => codes.includes(code));
  // 2 % of 16,000 psia is 320 psia.
  expect(told.find(({ code }) => code === "sour_gas")?.message).toContain(
    "at reservoir pressure is 320 psia",
  );
  return told.map(({ code, input }) => [code, input]);
}

function refusedAt(calculate: () => unknown): string[] {
  try {
    calculate();
  } catch (error) {
    if (error instanceof InvalidInputError) return error.problems.map(({ pointer }) => pointer);
    throw error;
  }
  return [];
}

describe("calculateZFactor", () => {
  it("warns of the dangers at the pressure asked about, at the request's own fields", () => {
    const { warnings } = calculateZFactor(gas);
    expect(dangers(warnings)).toEqual([
      ["high_pressure_high_temperature", "pressurePsia"],
      ["sour_gas", "hydrogenSulphide"],
      ["corrosive_gas", "carbonDioxide"],
    ]);
    expect(warnings.every(({ input }) => input === undefined || input in gas)).toBe(true);
  });

  it("refuses the states that an estimate refuses, all at once", () => {
    expect(
      refusedAt(() => calculateZFactor({ ...gas, pressurePsia: 200_000, temperatureDegF: 900 })),
    ).toEqual(["#/pressurePsia", "#/temperatureDegF"]);
  });
});

describe("calculateWellstream", () => {
  it("warns of the dangers at reservoir pressure once that is known, and once only", () => {
    const answer = calculateWellstream({ separatorTest, reservoir, metered: null });
    expect(dangers(answer.warnings)).toEqual([
      ["high_pressure_high_temperature", "reservoir.pressurePsia"],
      ["sour_gas", "separatorTest.hydrogenSulphide"],
      ["corrosive_gas", "separatorTest.carbonDioxide"],
    ]);
  });

  it("keeps to the separator's pressure without a reservoir", () => {
    const { warnings } = calculateWellstream({ separatorTest, reservoir: null, metered: null });
    const sour = warnings.filter(({ code }) => code === "sour_gas");
    expect(sour).toHaveLength(1);
    expect(sour[0].message).toContain("at the first separator's pressure");
  });

  it("refuses a reservoir that an estimate refuses", () => {
    const impossible = { pressurePsia: 200_000, temperatureDegF: 260 };
    expect(
      refusedAt(() => calculateWellstream({ separatorTest, reservoir: impossible, metered: null })),
    ).toEqual(["#/reservoir/pressurePsia"]);
  });
});

describe("calculateInPlace", () => {
  it("warns of the dangers at reservoir pressure, at the request's own fields", () => {
    expect(dangers(calculateInPlace(rock).warnings)).toEqual([
      ["high_pressure_high_temperature", "pressurePsia"],
      ["sour_gas", "separatorTest.hydrogenSulphide"],
      ["corrosive_gas", "separatorTest.carbonDioxide"],
    ]);
  });

  it("refuses a yield above that of a gas condensate", () => {
    expect(refusedAt(() => calculateInPlace({ ...rock, condensateYieldStbPerMmscf: 401 }))).toEqual(
      ["#/condensateYieldStbPerMmscf"],
    );
  });
});
