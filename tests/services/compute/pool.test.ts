import { execFileSync } from "node:child_process";
import { availableParallelism } from "node:os";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { DomainError } from "@/analytics/errors";
import { summariseField } from "@/analytics/portfolio/field-summary";
import { bytesOfFieldTrials, viewFieldTrials } from "@/analytics/portfolio/field-trials";
import { planField, rollUp } from "@/analytics/portfolio/roll-up";
import { explainChange } from "@/analytics/sensitivity/explain-change";
import { computeSensitivity } from "@/analytics/sensitivity/sensitivity";
import { vectorNames } from "@/analytics/volumetrics/results-schema";
import { simulate } from "@/analytics/volumetrics/simulate";
import { simulateUntilSettled, type SettleStep } from "@/analytics/volumetrics/until-settled";
import {
  closePool,
  MAXIMUM_QUEUE,
  runAlignment,
  runChange,
  runFieldSummary,
  runLedger,
  runSensitivity,
  runSimulation,
  runUntilSettled,
} from "@/services/compute/pool";
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

describe("runUntilSettled", () => {
  const options = {
    seed: 3,
    sampling: "latinHypercube",
    tolerance: 0.03,
    mostTrials: 16_384,
  } as const;

  it("tells every step in order and gives what the calling thread would have given", async () => {
    const inputs = buildInputs();
    const steps: SettleStep[] = [];
    const there = await runUntilSettled(inputs, options, { onStep: (step) => steps.push(step) });
    expect(there).toEqual(simulateUntilSettled(inputs, options));
    expect(steps).toEqual(there.steps);
    expect(steps.length).toBeGreaterThan(1);
  });

  it("gives up between steps when told to", async () => {
    const controller = new AbortController();
    const hopeless = { ...options, tolerance: 1e-6, mostTrials: 1_048_576 };
    const steps: SettleStep[] = [];
    const asked = runUntilSettled(buildInputs(), hopeless, {
      signal: controller.signal,
      onStep(step) {
        steps.push(step);
        if (steps.length === 3) controller.abort();
      },
    });
    await expect(asked).rejects.toThrow(/abort/i);
    expect(steps.at(-1)?.trials).toBeLessThan(1_048_576);
    await expect(
      runSimulation(buildInputs(), { trials: 100, seed: 1 }),
      "the pool goes on",
    ).resolves.toBeDefined();
  });

  it("brings an impossible tolerance back as the error it was", async () => {
    const failure = await runUntilSettled(buildInputs(), { ...options, tolerance: 0 }).catch(
      (error: unknown) => error,
    );
    expect(failure).toBeInstanceOf(DomainError);
  });
});

describe("runAlignment and runLedger", () => {
  it("put trials in order and add them up on a thread as the calling one would have", async () => {
    const trials = 300;
    const { vectors } = simulate(buildInputs(), { trials, seed: 1 });
    const fields = ["a", "b"].map((slug) => ({
      id: `field-${slug}`,
      slug,
      basinId: "basin",
      basinSlug: "basin",
      classId: "reserves",
      interest: 0.5,
      chance: 0.6,
      reservoirs: [{ id: `${slug}/sand`, vectors: structuredClone(vectors) }],
    }));
    const dependence = {
      portfolioRank: 0,
      basinRanks: {},
      otherBasinsRank: 0.3,
      sharedFactors: [],
    };
    const options = { trials, risk: "yesNo", withRanks: true } as const;
    const expected = rollUp(fields, { ...options, seed: 4, dependence });

    const pieces = fields.map((field) => ({
      slug: field.slug,
      chance: field.chance,
      buffer: new SharedArrayBuffer(bytesOfFieldTrials(trials)),
      isLast: true,
      ...planField(field, field.reservoirs, dependence),
    }));
    const figures = await runAlignment(pieces, { trials, seed: 4 });
    const aligned = fields.flatMap(({ reservoirs: _, ...field }, index) => {
      const own = figures[index];
      const { buffer } = pieces[index];
      return own ? [{ ...field, buffer, figures: own, sourceTrials: trials }] : [];
    });
    expect(await runLedger(aligned, options)).toEqual(expected);
  });
});

describe("runSensitivity and runChange", () => {
  const how = { seed: 3, trials: 500, sampling: "latinHypercube" } as const;
  const question = { ...how, result: "salesGasScf", chosen: { from: 0.9, to: 1 } } as const;

  it("give what the calling thread would have given", { timeout: 60_000 }, async () => {
    const inputs = buildInputs();
    expect(await runSensitivity(inputs, question)).toEqual(computeSensitivity(inputs, question));
    const change = {
      from: { ...how, inputs },
      to: { ...how, inputs: buildInputs({ areaAcres: { kind: "constant", value: 2_000 } }) },
      result: "salesGasScf",
      percentile: "p50",
    } as const;
    expect(await runChange(change)).toEqual(explainChange(change));
  });

  it("bring an impossible input back as the error it was", async () => {
    const inputs = buildInputs({ porosity: { kind: "constant", value: 0.6 } });
    await expect(runSensitivity(inputs, question)).rejects.toThrow(DomainError);
  });
});

describe("long tasks", () => {
  const hopeless = {
    seed: 3,
    sampling: "latinHypercube",
    tolerance: 1e-6,
    mostTrials: 1_048_576,
  } as const;

  /** So many of them, more than there are threads, and the means to end them. */
  function occupy(count = availableParallelism() + 2) {
    const controllers = Array.from({ length: count }, () => new AbortController());
    const tasks = controllers.map(({ signal }) =>
      runUntilSettled(buildInputs(), hopeless, { signal }).catch((error: Error) => error),
    );
    return { controllers, tasks };
  }

  it("leave a thread to short ones, however many wait", { timeout: 60_000 }, async () => {
    const { controllers, tasks } = occupy();
    const ended = vi.fn();
    for (const task of tasks) void task.then(ended);
    await runSimulation(buildInputs(), { trials: 100, seed: 1 });
    expect(ended).not.toHaveBeenCalled();
    for (const controller of controllers) controller.abort();
    for (const outcome of await Promise.all(tasks)) expect(String(outcome)).toMatch(/abort/i);
  });

  it("leave the queue when given up, and let the next one in", { timeout: 60_000 }, async () => {
    const { controllers, tasks } = occupy();
    const [last] = controllers.slice(-1);
    last.abort();
    expect(String(await tasks[tasks.length - 1])).toMatch(/abort/i);
    for (const controller of controllers) controller.abort();
    await Promise.all(tasks);
    const question = { seed: 3, trials: 500, sampling: "latinHypercube" } as const;
    const inputs = buildInputs();
    await expect(
      runSensitivity(inputs, { ...question, result: "salesGasScf", chosen: { from: 0.9, to: 1 } }),
    ).resolves.toBeDefined();
  });

  it("refuse what would wait behind a full queue of their own", { timeout: 60_000 }, async () => {
    const { controllers, tasks } = occupy(MAXIMUM_QUEUE + availableParallelism() + 2);
    expect(await tasks[tasks.length - 1]).toBeInstanceOf(ServiceBusyError);
    await expect(runSimulation(buildInputs(), { trials: 100, seed: 1 })).resolves.toBeDefined();
    for (const controller of controllers) controller.abort();
    await Promise.all(tasks);
  });
});

describe("runFieldSummary", () => {
  it("sums up a field from trials that it shares", async () => {
    const trials = 200;
    const buffer = new SharedArrayBuffer(bytesOfFieldTrials(trials));
    const field = viewFieldTrials(buffer, trials);
    vectorNames.forEach((name, i) => field.volumes[name].forEach((_, t, all) => (all[t] = i + t)));
    expect(await runFieldSummary({ buffer, trials })).toEqual(summariseField(field));
  });
});
