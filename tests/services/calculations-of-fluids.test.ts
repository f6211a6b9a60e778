import { execFileSync } from "node:child_process";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { simulateDepletion } from "@/analytics/depletion/simulate-depletion";
import { ConvergenceError } from "@/analytics/errors";
import { readComposition } from "@/analytics/composition/read-sheet";
import { characterise } from "@/analytics/equation-of-state/characterise";
import { calculateOnFluid } from "@/services/calculations-of-fluids";
import { closePool } from "@/services/compute/pool";
import { InvalidInputError } from "@/services/errors";
import { describeDepletion } from "@/services/fluids/depletion";
import { templateFluid, untunedCharacterisation } from "../support/fluids";

const { sheet, table, stages } = templateFluid();
const characterisation = untunedCharacterisation;

beforeAll(() => {
  execFileSync(process.execPath, [path.resolve("scripts/build-workers.mjs")]);
}, 60_000);

afterAll(closePool);

describe("calculateOnFluid(name, question)", { timeout: 60_000 }, () => {
  it("gives on a thread what the calling one would have given", async () => {
    const question = { sheet, table, stages, characterisation };
    expect(await calculateOnFluid("depletion", question)).toEqual(describeDepletion(question));
  });

  it("names the place of an impossible value in the question", async () => {
    const adjustments = { ...characterisation.adjustments, heavyCriticalPressureFactor: -1 };
    const failure = await calculateOnFluid("equationOfState", {
      sheet,
      stages,
      characterisation: { ...characterisation, adjustments },
      temperatureDegF: 220,
      measuredDewPointPsia: null,
      depletionPressuresPsia: null,
      tuning: null,
      table: null,
    }).catch((error: unknown) => error);
    expect(failure).toBeInstanceOf(InvalidInputError);
    expect((failure as InvalidInputError).problems[0].pointer).toBe(
      "#/characterisation/adjustments/heavyCriticalPressureFactor",
    );
  });

  it("says what was kept and what to try when nothing converges", async () => {
    // A table that the untouched equation of state made itself leaves nothing to come nearer to.
    const fluid = characterise(readComposition(sheet).stream, characterisation);
    const failure = await calculateOnFluid("tuning", {
      sheet,
      characterisation,
      table: simulateDepletion(fluid, 220, null),
      tunables: ["heavyAcentricFactorFactor"],
    }).catch((error: unknown) => error);
    expect(failure).toBeInstanceOf(ConvergenceError);
    expect((failure as ConvergenceError).message).toMatch(
      /\. Nothing that was entered is changed or lost\. Try other adjustments/,
    );
  });

  it("gives up when told to", async () => {
    const question = {
      sheet,
      table,
      characterisation,
      tunables: ["heavyCriticalTemperatureFactor" as const],
    };
    const signal = AbortSignal.timeout(1);
    await expect(calculateOnFluid("tuning", question, { signal })).rejects.toThrow(/abort/i);
  });
});
