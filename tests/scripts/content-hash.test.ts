import fs from "node:fs";
import os from "node:os";
import path from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { contentHash } from "@/scripts/lib/content-hash.mjs";

describe("contentHash", () => {
  let folder: string;

  beforeEach(() => {
    folder = fs.mkdtempSync(path.join(os.tmpdir(), "dewledger-hash-"));
    fs.mkdirSync(path.join(folder, "app"));
    fs.writeFileSync(path.join(folder, "app", "page.tsx"), "one");
  });

  afterEach(() => fs.rmSync(folder, { recursive: true }));

  const hash = (salt: string[] = []) => contentHash(folder, ["app", "missing.json"], salt);

  it("stays the same when only times change", () => {
    const before = hash();
    fs.utimesSync(path.join(folder, "app", "page.tsx"), 1, 1);
    expect(hash()).toBe(before);
  });

  it("changes with a file's content", () => {
    const before = hash();
    fs.writeFileSync(path.join(folder, "app", "page.tsx"), "two");
    expect(hash()).not.toBe(before);
  });

  it("changes with a file's name", () => {
    const before = hash();
    fs.renameSync(path.join(folder, "app", "page.tsx"), path.join(folder, "app", "layout.tsx"));
    expect(hash()).not.toBe(before);
  });

  it("changes when a missing file appears", () => {
    const before = hash();
    fs.writeFileSync(path.join(folder, "missing.json"), "{}");
    expect(hash()).not.toBe(before);
  });

  it("changes with the salt", () => {
    expect(hash(["115"])).not.toBe(hash(["127"]));
  });
});
