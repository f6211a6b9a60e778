import { describe, expect, it } from "vitest";
import { z } from "zod";
import { inputWords } from "@/services/input-words";

function wordsFor(schema: z.ZodType, value: unknown): string {
  const result = schema.safeParse(value, { error: inputWords });
  if (result.success) throw new Error("The value was accepted.");
  return result.error.issues[0].message;
}

describe("inputWords", () => {
  it.each<[z.ZodType, unknown, string]>([
    [z.number().max(90), 91, "must be at most 90"],
    [z.number().max(2_147_483_647), 3e9, "must be at most 2,147,483,647"],
    [z.number().positive(), 0, "must be more than 0"],
    [z.number().min(0.5), 0.1, "must be at least 0.5"],
    [z.number().lt(1), 1, "must be less than 1"],
    [z.number(), undefined, "is missing"],
    [z.number(), "2 %", "must be a number"],
    [z.coerce.number(), "two", "must be a number"],
    [z.number().int(), 1.5, "must be a whole number"],
    [z.string(), 3, "must be a text"],
    [z.string().min(12), "short", "must have at least 12 characters"],
    [z.string().trim().min(1), " ", "must not be empty"],
    [z.string().max(3), "four", "must have at most 3 characters"],
    [z.array(z.number()).min(2), [1], "must have at least 2 entries"],
    [z.enum(["net", "gross"]), "half", "must be one of net, gross"],
    [z.enum(["net", "gross"]), undefined, "is missing"],
    [z.literal(1), 2, "must be 1"],
    [
      z.discriminatedUnion("kind", [z.object({ kind: z.literal("a") })]),
      { kind: "b" },
      "must be a",
    ],
    [z.union([z.string(), z.number()]), true, "must be a text or a number"],
    [z.email(), "nobody", "must be an e-mail address"],
    [z.uuid(), "nobody", "must be an id"],
    [z.iso.date(), "13/10/2026", "must be a date such as 2026-10-13"],
    [z.string().regex(/^x/), "y", "is not written as it must be"],
    [z.object({}).strict(), { colour: "blue" }, "must not have “colour”"],
  ])("%# says in plain words what is wrong", (schema, value, words) => {
    expect(wordsFor(schema, value)).toBe(words);
  });

  it("leaves a message that the schema gives itself", () => {
    const schema = z.number().max(1, "is a fraction: enter 0.35 for 35 %");
    expect(wordsFor(schema, 35)).toBe("is a fraction: enter 0.35 for 35 %");
  });
});
