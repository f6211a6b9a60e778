import { describe, expect, it } from "vitest";
import { budgetLayout } from "@/services/exports/budget-layout";

const names = budgetLayout.map(({ name }) => name);

describe("budgetLayout", () => {
  it("has unique snake_case names", () => {
    expect(new Set(names).size).toBe(names.length);
    for (const name of names) expect(name).toMatch(/^[a-z][a-z0-9]*(_[a-z0-9]+)*$/);
  });

  it("explains every column", () => {
    for (const { meaning } of budgetLayout) expect(meaning.length).toBeGreaterThan(2);
  });

  // Programs read this file by these names: a change here is a change of a contract.
  it("keeps the names that programs rely on, in their places", () => {
    expect(names.slice(0, 4)).toEqual(["row_kind", "field_id", "field_name", "basin"]);
    for (const name of [
      "wet_gas_in_place_p90_mmscf",
      "sales_gas_mean_mmscf",
      "condensate_recoverable_p50_stb",
      "liquid_value_p10",
      "gas_value_mean",
      "currency",
      "price_deck_as_of",
      "estimate_ids",
      "estimates_effective_on",
    ]) {
      expect(names).toContain(name);
    }
  });
});
