import { execFileSync } from "node:child_process";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { DomainError } from "@/analytics/errors";
import { computeLedger, type LedgerMember } from "@/analytics/portfolio/ledger";
import { simulate } from "@/analytics/volumetrics/simulate";
import { closePool, MAXIMUM_QUEUE, runLedger, runSimulation } from "@/services/compute/pool";
import { ServiceBusyError } from "@/services/errors";
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

  it("refuses what would wait behind a full queue, and goes on with the rest", async () => {
    const inputs = buildInputs();
    const asked = Array.from({ length: MAXIMUM_QUEUE + 40 }, () =>
      runSimulation(inputs, { trials: 100, seed: 1 }),
    );
    const outcomes = await Promise.allSettled(asked);
    const refused = outcomes.filter((outcome) => outcome.status === "rejected");
    expect(refused.length).toBeGreaterThan(0);
    expect(refused.every(({ reason }) => reason instanceof ServiceBusyError)).toBe(true);
    expect(outcomes.length - refused.length).toBeGreaterThanOrEqual(MAXIMUM_QUEUE);
    await expect(runSimulation(inputs, { trials: 100, seed: 1 })).resolves.toBeDefined();
  });
});

describe("runLedger", () => {
  it("adds up on a thread as the calling one would have", async () => {
    const { vectors } = simulate(buildInputs(), { trials: 300, seed: 1 });
    const buildMembers = (): LedgerMember[] =>
      ["a", "b"].map((id) => ({
        id,
        fieldId: `field-${id}`,
        basinId: "basin",
        basinSlug: "basin",
        classId: "reserves",
        interest: 0.5,
        chance: 1,
        vectors: structuredClone(vectors),
      }));
    const options = { seed: 4, basinRankCorrelations: { basin: 0.3 } };
    const expected = computeLedger(buildMembers(), options);
    expect(await runLedger(buildMembers(), options)).toEqual(expected);
  });
});
