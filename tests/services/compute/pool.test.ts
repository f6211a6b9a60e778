import { execFileSync } from "node:child_process";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { rollUp, type RollUpMember } from "@/analytics/portfolio/roll-up";
import { simulate } from "@/analytics/volumetrics/simulate";
import { closePool, runRollUp, runSimulation } from "@/services/compute/pool";
import { buildInputs } from "../../analytics/volumetrics/estimate-inputs";

beforeAll(() => {
  execFileSync(process.execPath, [path.resolve("scripts/build-workers.mjs")]);
}, 60_000);

afterAll(closePool);

describe("runSimulation", () => {
  it(
    "gives the bytes that the calling thread would have given, run after run",
    { timeout: 60_000 },
    async () => {
      const inputs = buildInputs();
      for (const trials of [500, 800, 500]) {
        const there = await runSimulation(inputs, { trials, seed: 3 });
        expect(there).toEqual(simulate(inputs, { trials, seed: 3 }));
      }
    },
  );

  it("brings an impossible input back as the error it was", async () => {
    const inputs = buildInputs({ porosity: { kind: "constant", value: 0.6 } });
    const failure = await runSimulation(inputs, { seed: 3 }).catch((error: unknown) => error);
    expect(failure).toBeInstanceOf(DomainError);
    expect((failure as DomainError).details.input).toBe("uncertain.porosity.value");
  });

  it("gives up when told to", async () => {
    const signal = AbortSignal.timeout(1);
    await expect(
      runSimulation(buildInputs(), { trials: 400_000, seed: 1 }, { signal }),
    ).rejects.toThrow(/abort/i);
  });
});

describe("runRollUp", () => {
  it("adds up on a thread and leaves the caller's arrays in place", async () => {
    const { vectors } = simulate(buildInputs(), { trials: 300, seed: 1 });
    const members: RollUpMember[] = ["a", "b"].map((id) => ({
      id,
      group: "basin",
      vectors: { ...vectors },
      factors: { condensate: 0.5 },
      tags: { class: id },
    }));
    const options = {
      quantities: { condensate: "condensateRecoverableStb" },
      seed: 4,
      dependence: 0.3,
      groupBy: ["class"],
    };
    expect(await runRollUp(members, options)).toEqual(rollUp(members, options));
    expect(vectors.condensateRecoverableStb).toHaveLength(300);
  });
});
