import { describe, expect, it, vi } from "vitest";
import { Checks } from "@/scripts/lib/checks.mjs";
import { isSupported } from "@/scripts/lib/node-version.mjs";
import { needsBrowser, needsProduct, selectsByName } from "@/scripts/lib/test-needs.mjs";

describe("Checks", () => {
  const silently = () => vi.spyOn(process.stdout, "write").mockReturnValue(true);

  it("adds checks and tests up to one closing line", async () => {
    const output = silently();
    const checks = new Checks();
    await checks.check("Formatting", async () => undefined);
    await checks.check("Lint", async () => {
      throw new Error("unused variable");
    });
    checks.addTests("Unit tests", 1, { passed: 7, failed: 2, skipped: 0 }, 1_000);
    output.mockRestore();
    expect(checks.closingLine()).toBe("8 passed, 3 failed");
  });

  it.each([
    ["a skipped test", 0, { passed: 3, failed: 0, skipped: 1 }],
    ["a run that failed without a failed test", 1, { passed: 3, failed: 0, skipped: 0 }],
    ["a run that reported nothing", 1, null],
    ["a project without a test", 0, { passed: 0, failed: 0, skipped: 0 }],
  ])("counts %s as failed", (_case, exitCode, summary) => {
    const output = silently();
    const checks = new Checks();
    checks.addTests("Unit tests", exitCode, summary, 0);
    output.mockRestore();
    expect(checks.failed).toBe(1);
  });
});

describe("needsProduct", () => {
  it.each([
    [[], true],
    [["--project", "unit"], false],
    [["--project", "services"], false],
    [["--project=api"], true],
    [["tests/analytics/gas/z-factor.test.ts"], false],
    [["tests/api/fields.test.ts", "-t", "answers 403"], true],
    [["tests/analytics/a.test.ts", "tests/api/b.test.ts"], true],
  ])("for %j is %j", (args, needed) => {
    expect(needsProduct(args)).toBe(needed);
  });
});

describe("needsBrowser", () => {
  it.each([
    [[], true],
    [["tests/api/fields.test.ts"], false],
    [["tests/e2e/sign-in.test.ts"], true],
    [["--project", "e2e"], true],
  ])("for %j is %j", (args, needed) => {
    expect(needsBrowser(args)).toBe(needed);
  });
});

describe("selectsByName", () => {
  it.each([
    [["-t", "answers 403"], true],
    [["--testNamePattern=answers"], true],
    [["tests/api/fields.test.ts"], false],
  ])("for %j is %j", (args, selects) => {
    expect(selectsByName(args)).toBe(selects);
  });
});

describe("isSupported", () => {
  it.each([
    ["18.20.4", false],
    ["20.8.1", false],
    ["20.9.0", true],
    ["22.1.0", true],
  ])("for Node %s is %j", (version, supported) => {
    expect(isSupported(version)).toBe(supported);
  });
});
