import { describe, expect, it } from "vitest";
import { methodGroups } from "@/app/(tools)/methods/_components/catalogue";
import { evidenceKinds } from "@/app/(tools)/methods/_components/method";

describe("methodGroups", () => {
  const methods = methodGroups.flatMap((group) => group.methods);

  it("has an address for every group and a name for every method, each once", () => {
    for (const names of [methodGroups.map(({ id }) => id), methods.map(({ name }) => name)]) {
      expect(new Set(names).size).toBe(names.length);
    }
    for (const { id } of methodGroups) expect(id).toMatch(/^[a-z-]+$/);
  });

  it("says of each method what it gives, whence, where it holds, how good it is and where it is used", () => {
    for (const { name, gives, source, range, error, usedIn } of methods) {
      for (const text of [name, gives, source, range, error.text, usedIn]) {
        expect(text.trim(), name).toBe(text);
        expect(text.length, name).toBeGreaterThan(3);
      }
      expect(evidenceKinds).toContain(error.kind);
      expect(gives, name).toMatch(/\.$/);
      expect(error.text, name).toMatch(/\.$/);
    }
  });

  it("gives figures wherever it claims a measurement or an author's word", () => {
    const claimed = methods.filter(({ error }) => error.kind === "measured");
    expect(claimed.length).toBeGreaterThan(5);
    for (const { name, error } of claimed) expect(error.text, name).toMatch(/\d|closed form/);
  });
});
