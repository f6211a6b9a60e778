import { describe, expect, it } from "vitest";
import { describePhases } from "@/services/fluids/equation-of-state";
import { untunedCharacterisation } from "../support/fluids";

const stages = [
  { pressurePsia: 500, temperatureDegF: 80 },
  { pressurePsia: 14.696, temperatureDegF: 60 },
];

describe("describePhases(question)", () => {
  it("has no separator train for a gas that leaves nothing in the tank, and says so", () => {
    const phases = describePhases({
      sheet: {
        kind: "wellstream",
        stream: { light: { C1: 95, C2: 4, C3: 1 }, carbonNumbers: [], plus: null },
      },
      characterisation: untunedCharacterisation,
      temperatureDegF: 200,
      measuredDewPointPsia: null,
      stages,
      depletionPressuresPsia: null,
      tuning: null,
      table: null,
    });
    expect(phases).toMatchObject({ train: null, curve: null, saturation: { kind: "none" } });
    expect(phases.envelope.dew.length).toBeGreaterThan(2);
    expect(phases.warnings.map(({ code }) => code)).toEqual([
      "above_cricondentherm",
      "no_separation",
    ]);
  });
});
