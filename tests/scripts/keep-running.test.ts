import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { keepRunning, waitBeforeRestart } from "@/scripts/lib/keep-running.mjs";
import { identify, isSameProcess } from "@/scripts/lib/process-identity.mjs";
import { ProcessGroup } from "@/scripts/lib/processes.mjs";

const stays = `process.send("ready"); setInterval(() => {}, 1000);`;
const neverReady = `console.error("no such setting"); process.exit(2);`;

const quick = { firstWait: 10, longestWait: 40, steadyAfter: 60_000, troubleAfter: 5 };

let folder: string;
let group: ProcessGroup;
let told: string[];

beforeEach(() => {
  folder = fs.mkdtempSync(path.join(os.tmpdir(), "dewledger-keep-"));
  told = [];
  group = new ProcessGroup({
    recordFile: recordFile(),
    logFolder: path.join(folder, "logs"),
    command: "npm start",
    address: "http://127.0.0.1:3000",
  });
});

afterEach(async () => {
  await group.stop();
  group.forget();
  fs.rmSync(folder, { recursive: true });
});

const recordFile = () => path.join(folder, "processes.json");

type Recorded = ReturnType<typeof identify> & { name: string };

function recorded(): Recorded[] {
  return (JSON.parse(fs.readFileSync(recordFile(), "utf8")) as { children: Recorded[] }).children;
}

function pidOf(name: string) {
  const found = recorded().filter((child) => child.name === name);
  expect(found).toHaveLength(1);
  return (found[0] as Recorded).pid;
}

function keep(name: string, program: string, pace = quick) {
  const onNeverReady = vi.fn();
  const { ready } = keepRunning(group, name, ["-e", program], {
    env: process.env,
    onNeverReady,
    tell: (line: string) => told.push(line),
    pace,
  });
  return { ready, onNeverReady };
}

/** A worker that was well once, was killed, and from then on ends at once with exit code 3. */
async function keepEnding(pace = quick) {
  const broken = path.join(folder, "broken");
  await keep(
    "worker",
    `if (fs.existsSync(${JSON.stringify(broken)})) process.exit(3); ${stays}`,
    pace,
  ).ready;
  fs.writeFileSync(broken, "");
  process.kill(pidOf("worker"), "SIGKILL");
}

const ends = () => told.filter((line) => line.includes("ended unexpectedly"));

const eventually = (check: () => void) => vi.waitFor(check, { timeout: 20_000, interval: 10 });

describe("waitBeforeRestart", () => {
  it("doubles from one second and is half a minute from the fifth short life on", () => {
    const waits = [1, 2, 3, 4, 5, 6, 60].map((lives) => waitBeforeRestart(lives));
    expect(waits).toEqual([1_000, 2_000, 4_000, 8_000, 30_000, 30_000, 30_000]);
  });
});

// Each life is a Node process, which takes its time on a busy machine.
describe("keepRunning", { timeout: 30_000 }, () => {
  it("starts a killed worker again, says so, and records the new process in place of the old", async () => {
    const { ready, onNeverReady } = keep("worker", stays);
    await ready;
    const first = pidOf("worker");
    process.kill(first, "SIGKILL");
    await eventually(() => expect(told.at(-1)).toBe("The worker process runs again."));
    expect(told).toEqual([
      "The worker process ended unexpectedly (killed by SIGKILL); it starts again in 0.01 s.",
      "The worker process runs again.",
    ]);
    const [second] = recorded();
    expect(second?.pid).not.toBe(first);
    expect(isSameProcess(second)).toBe(true);
    expect(recorded()).toHaveLength(1);
    expect(onNeverReady).not.toHaveBeenCalled();
  });

  it("leaves the other processes alone", async () => {
    await Promise.all([keep("worker", stays).ready, keep("worker-2", stays).ready]);
    const other = pidOf("worker");
    process.kill(pidOf("worker-2"), "SIGKILL");
    await eventually(() => expect(told.at(-1)).toBe("The worker-2 process runs again."));
    expect(pidOf("worker")).toBe(other);
    expect(isSameProcess(recorded().find(({ name }) => name === "worker"))).toBe(true);
  });

  it("says once that queued work does not run after five short lives, and goes on trying", async () => {
    await keepEnding();
    await eventually(() => expect(ends().length).toBeGreaterThan(5));
    const trouble = told.filter((line) => line.includes("queued work"));
    expect(trouble).toHaveLength(1);
    expect(trouble[0]).toContain("does not run");
    expect(told.indexOf(trouble[0] as string)).toBeGreaterThan(told.indexOf(ends()[4] as string));
    expect(ends().slice(0, 6)).toEqual(
      ["killed by SIGKILL", ...Array.from({ length: 5 }, () => "exit code 3")].map(
        (how, end) =>
          `The worker process ended unexpectedly (${how}); it starts again in ${[0.01, 0.02, 0.04, 0.04, 0.04, 0.04][end]} s.`,
      ),
    );
    expect(told.join("\n")).toContain("logs/worker.log says why");
    expect(told.join("\n")).toContain("tried again every 0.04 s");
  });

  it("counts from the start again after a life that was long enough", async () => {
    await keepEnding({ ...quick, steadyAfter: 0 });
    await eventually(() => expect(ends().length).toBeGreaterThan(5));
    expect(told.every((line) => line.endsWith("it starts again in 0.01 s."))).toBe(true);
  });

  it("does not start a worker that waits for its restart once the group stops", async () => {
    await keep("worker", stays, { ...quick, firstWait: 500, longestWait: 500 }).ready;
    process.kill(pidOf("worker"), "SIGKILL");
    await eventually(() => expect(told).toHaveLength(1));
    expect(recorded()).toEqual([]);
    await group.stop();
    await new Promise((resolve) => setTimeout(resolve, 700));
    expect(recorded()).toEqual([]);
    expect(told).toHaveLength(1);
  });

  it("does not take the end of a worker that the group stops for unexpected", async () => {
    await keep("worker", stays).ready;
    const child = identify(pidOf("worker"));
    await group.stop();
    await eventually(() => expect(recorded()).toEqual([]));
    expect(isSameProcess(child)).toBe(false);
    expect(told).toEqual([]);
  });

  it("tries again when a start itself is impossible for a while", async () => {
    await keep("worker", stays).ready;
    // As when somebody has removed the folder of logs.
    fs.renameSync(path.join(folder, "logs"), path.join(folder, "away"));
    process.kill(pidOf("worker"), "SIGKILL");
    await eventually(() => expect(told.join("\n")).toContain("(ENOENT"));
    fs.renameSync(path.join(folder, "away"), path.join(folder, "logs"));
    await eventually(() => expect(told.at(-1)).toBe("The worker process runs again."));
    expect(isSameProcess(recorded()[0])).toBe(true);
  });

  it("leaves a worker that was never ready to the caller, with its last words", async () => {
    const { ready, onNeverReady } = keep("worker", neverReady);
    await expect(ready).rejects.toMatchObject({ detail: "no such setting" });
    expect(onNeverReady).toHaveBeenCalledExactlyOnceWith("worker");
    expect(told).toEqual([]);
    expect(recorded()).toEqual([]);
  });
});

describe("ProcessGroup", { timeout: 30_000 }, () => {
  it("does not write its record again once it was forgotten", async () => {
    await keep("worker", stays).ready;
    const child = identify(pidOf("worker"));
    const stopped = group.stop();
    group.forget();
    await stopped;
    await eventually(() => expect(isSameProcess(child)).toBe(false));
    await new Promise((resolve) => setTimeout(resolve, 100));
    expect(fs.existsSync(recordFile())).toBe(false);
  });
});
