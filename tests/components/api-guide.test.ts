import { describe, expect, it } from "vitest";
import { describeSchema, sharedShapes } from "@/app/(tools)/api-guide/_components/describe-schema";
import { calculations } from "@/app/(tools)/api-guide/_components/examples";
import { fluidCalculations } from "@/app/(tools)/api-guide/_components/fluid-examples";

describe("examples of the API guide", () => {
  it.each(
    [...calculations, ...fluidCalculations].map(({ name, request, example }) => ({
      name,
      request,
      example,
    })),
  )("$name is a request that the route takes", ({ request, example }) => {
    expect(request.safeParse(example).error).toBeUndefined();
  });
});

describe("describeSchema(schema, io)", () => {
  const request = (name: string) => {
    const found = calculations.find((calculation) => calculation.name === name);
    if (!found) throw new RangeError(`no calculation ${name}`);
    return describeSchema(found.request, "input");
  };

  it("says what a field holds, its limits, and what leaving it out means", () => {
    expect(request("z-factor").find(({ path }) => path === "carbonDioxide")).toEqual({
      path: "carbonDioxide",
      type: "number",
      needed: false,
      note: "mole fraction; from 0 to 1; 0 when left out",
      shape: null,
    });
  });

  it("names a shape that has a table of its own instead of repeating it", () => {
    const rows = request("wellstream");
    expect(rows.find(({ path }) => path === "separatorTest")?.shape).toBe("SeparatorTest");
    expect(rows.some(({ path }) => path.startsWith("separatorTest."))).toBe(false);
  });

  it("calls a number that may be missing a number or null", () => {
    const rows = describeSchema(sharedShapes.DepletionTable.schema, "input");
    expect(rows.find(({ path }) => path === "rows[].liquidPercent")?.type).toBe("number or null");
    expect(rows.filter(({ type }) => type === "any")).toEqual([]);
  });

  it("lists every alternative of a choice by its kind", () => {
    const paths = describeSchema(sharedShapes.Distribution.schema, "input").map(({ path }) => path);
    expect(paths).toContain("(constant).value");
    expect(paths).toContain("(lognormalP90P10).p90");
  });
});
