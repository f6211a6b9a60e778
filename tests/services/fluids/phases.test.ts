import { describe, expect, it, vi } from "vitest";
import { ConvergenceError } from "@/analytics/errors";
import * as saturation from "@/analytics/equation-of-state/saturation";
import { describeNearWell } from "@/services/fluids/near-well";
import { describePhases } from "@/services/fluids/equation-of-state";
import { templateFluid, untunedCharacterisation } from "../../support/fluids";

const { saturationPressures } = saturation;
vi.mock("@/analytics/equation-of-state/saturation", { spy: true });

const { sheet, stages } = templateFluid();
const untuned = { tuning: null, table: null };

describe("describePhases", () => {
  const question = {
    sheet,
    stages,
    characterisation: untunedCharacterisation,
    temperatureDegF: 220,
    measuredDewPointPsia: null,
    depletionPressuresPsia: [3000, 2000, 1000],
    ...untuned,
  };

  it("keeps everything else when the lower dew point is not found, and says so", () => {
    const whole = describePhases(question);
    expect(whole.saturation.lowerDewPointPsia).toBeGreaterThan(0);
    // Once for the figures beside the diagram; the search of the depletion does not ask for the lower one.
    vi.mocked(saturationPressures).mockImplementationOnce(() => {
      throw new ConvergenceError("The saturation pressure did not converge");
    });
    const { saturation: found, curve, warnings } = describePhases(question);
    expect(found).toEqual({ ...whole.saturation, lowerDewPointPsia: null });
    expect(curve).toEqual(whole.curve);
    const [added] = warnings.filter(({ code }) => code === "lower_dew_point_not_found");
    expect(added.message).toContain("The saturation pressure did not converge. The other figures");
    expect(warnings.filter((warning) => warning !== added)).toEqual(whole.warnings);
  });
});

describe("describeNearWell", () => {
  it("says that an untouched equation of state stands behind it", () => {
    const question = {
      sheet,
      characterisation: untunedCharacterisation,
      temperatureDegF: 220,
      reservoirPressurePsia: 4200,
      flowingPressurePsia: 2000,
      relativePermeability: {
        gasExponent: 2.5,
        condensateExponent: 3,
        criticalCondensateSaturation: 0.15,
        residualGasSaturation: 0.2,
      },
      ...untuned,
    };
    expect(describeNearWell(question).warnings).toContainEqual(
      expect.objectContaining({
        code: "untuned_equation_of_state",
        input: "characterisation.adjustments",
      }),
    );
  });
});
