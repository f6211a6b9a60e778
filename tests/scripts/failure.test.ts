import { describe, expect, it, vi } from "vitest";
import { failureText, seconds, task } from "@/scripts/lib/console-output.mjs";
import { Failure, failureFromOutput, saysDiskIsFull } from "@/scripts/lib/failure.mjs";

describe("failureFromOutput", () => {
  // What each program says when its disk is full, from its own sources or documentation.
  it.each([
    ["npm", "npm error code ENOSPC\nnpm error syscall write\nnpm error errno -28"],
    ["PostgreSQL", 'FATAL:  could not write to file "pg_wal/xlogtemp.31": No space left on device'],
    ["Node", "Error: ENOSPC: no space left on device, write"],
    ["a quota", "cp: error writing 'x': Disk quota exceeded"],
  ])("recognises a full disk in the words of %s", (_program, output) => {
    expect(saysDiskIsFull(output)).toBe(true);
    const failure = failureFromOutput("Installing packages", output);
    expect(failure.message).toBe("Installing packages stopped because the disk is full.");
    expect(failure.remedy).toContain("Nothing was lost");
  });

  it("shows the last lines of any other failure", () => {
    const output = Array.from({ length: 40 }, (_value, line) => `line ${line}`).join("\n");
    const failure = failureFromOutput("Building", output, "Correct it.");
    expect(failure.message).toBe("Building failed.");
    expect(failure.detail.split("\n")).toHaveLength(25);
    expect(failure.detail).toMatch(/line 39$/);
  });
});

describe("failureText", () => {
  it("says what is wrong, what to do, and the program's last words", () => {
    const text = failureText(new Failure("It failed.", "Do this.", "boom"));
    expect(text).toBe("It failed.\n\nDo this.\n\nIt said:\nboom");
  });

  it("leaves out what there is not", () => {
    expect(failureText(new Failure("It failed."))).toBe("It failed.");
  });

  it("shows the stack of a defect", () => {
    expect(failureText(new TypeError("x is undefined"))).toMatch(
      /Unexpected problem:\nTypeError: x is undefined\n\s+at /,
    );
  });
});

describe("seconds", () => {
  it.each([
    [412, "0.4 s"],
    [12_400, "12 s"],
    [125_000, "2 min 5 s"],
    [119_900, "2 min 0 s"],
  ])("writes %d ms as %s", (milliseconds, text) => {
    expect(seconds(milliseconds)).toBe(text);
  });
});

describe("task", () => {
  it("says when a step begins and ends, and keeps a step within it to its details", async () => {
    const output = vi.spyOn(process.stdout, "write").mockReturnValue(true);
    await task("Outer", () => task("Inner", async () => undefined));
    const said = output.mock.calls.map(([text]) => String(text)).join("");
    output.mockRestore();
    expect(said).toMatch(/Outer …/);
    expect(said).toMatch(/Outer: done in/);
    expect(said).not.toMatch(/Inner: done/);
  });

  it("passes a failure on", async () => {
    const output = vi.spyOn(process.stdout, "write").mockReturnValue(true);
    const failing = task("Outer", async () => {
      throw new Failure("It failed.");
    });
    await expect(failing).rejects.toThrow("It failed.");
    output.mockRestore();
  });
});
