import { spawn } from "node:child_process";
import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { withLock } from "@/scripts/lib/lock.mjs";
import { identify, isSameProcess } from "@/scripts/lib/process-identity.mjs";
import { recordedRun, stopLeftBehind } from "@/scripts/lib/processes.mjs";

let folder: string;

beforeEach(() => {
  folder = fs.mkdtempSync(path.join(os.tmpdir(), "dewledger-run-"));
});

afterEach(() => fs.rmSync(folder, { recursive: true }));

function sleeper() {
  const child = spawn(process.execPath, ["-e", "setInterval(() => {}, 1000)"], { detached: true });
  const ended = new Promise<NodeJS.Signals | null>((resolve) => {
    child.on("exit", (_code, signal) => resolve(signal));
  });
  return { pid: child.pid as number, ended };
}

type Identity = ReturnType<typeof identify>;

function recordOf(children: (Identity & { name: string })[], supervisor: Identity) {
  return {
    command: "npm start",
    address: "http://127.0.0.1:3000",
    ownsCluster: false,
    supervisor,
    children,
  };
}

const nobody = { pid: 4_194_303, startTime: "boot:1" };

describe("isSameProcess", () => {
  it("knows a process again", () => {
    expect(isSameProcess(identify(process.pid))).toBe(true);
  });

  it("is not deceived by a process id that was given to another process", () => {
    expect(isSameProcess({ pid: process.pid, startTime: "another-boot:1" })).toBe(false);
  });

  it("says no for a process that is gone", () => {
    expect(isSameProcess(nobody)).toBe(false);
  });
});

describe("recordedRun", () => {
  const file = () => path.join(folder, "processes.json");

  it("finds nothing without a record, or with one that was cut short", () => {
    expect(recordedRun(file()).state).toBe("none");
    fs.writeFileSync(file(), '{"supervisor": {');
    expect(recordedRun(file()).state).toBe("none");
  });

  it("tells a run that goes on from one that was killed", () => {
    fs.writeFileSync(file(), JSON.stringify(recordOf([], identify(process.pid))));
    expect(recordedRun(file()).state).toBe("running");
    fs.writeFileSync(file(), JSON.stringify(recordOf([], nobody)));
    expect(recordedRun(file()).state).toBe("left-behind");
  });
});

describe("stopLeftBehind", () => {
  it("stops the recorded process and no other", async () => {
    const ours = sleeper();
    const stranger = sleeper();
    const children = [
      { name: "web", ...identify(ours.pid) },
      // The id of a worker that ended long ago, which now belongs to somebody else.
      { name: "worker", pid: stranger.pid, startTime: "another-boot:1" },
    ];
    const file = path.join(folder, "processes.json");
    fs.writeFileSync(file, JSON.stringify(recordOf(children, nobody)));
    expect(await stopLeftBehind(recordOf(children, nobody), file)).toEqual(["web"]);
    expect(await ours.ended).not.toBeNull();
    expect(identify(stranger.pid).startTime).not.toBeNull();
    expect(fs.existsSync(file)).toBe(false);
    process.kill(stranger.pid);
    await stranger.ended;
  });
});

describe("withLock", () => {
  it("lets one through at a time", async () => {
    const file = path.join(folder, "lock");
    const order: string[] = [];
    const enter = (name: string) =>
      withLock(file, "The lock", async () => {
        order.push(`${name} in`);
        await new Promise((resolve) => setTimeout(resolve, 50));
        order.push(`${name} out`);
      });
    await Promise.all([enter("a"), enter("b")]);
    expect(order).toEqual(["a in", "a out", "b in", "b out"]);
  });

  it("takes over from a holder that was killed", async () => {
    const file = path.join(folder, "lock");
    fs.writeFileSync(file, JSON.stringify(nobody));
    expect(await withLock(file, "The lock", async () => "through", 5_000)).toBe("through");
  });

  it("gives up with a message when the holder does not end", async () => {
    const file = path.join(folder, "lock");
    fs.writeFileSync(file, JSON.stringify(identify(process.pid)));
    await expect(withLock(file, "The build", async () => "through", 100)).rejects.toThrow(
      "The build is held by another command",
    );
  });
});
