import { describe, expect, it } from "vitest";
import { makePassword } from "@/app/(administration)/people/_components/new-password";

describe("makePassword", () => {
  it("has four groups of four unmistakable signs, and is another one each time", () => {
    const made = Array.from({ length: 200 }, makePassword);
    for (const password of made)
      expect(password).toMatch(/^([a-hjkmnp-z2-9]{4}-){3}[a-hjkmnp-z2-9]{4}$/);
    expect(new Set(made).size).toBe(200);
  });
});
