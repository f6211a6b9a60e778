import { describe, expect, it } from "vitest";
import type { ReviewView } from "@/app/api/v1/review/schema";
import { as } from "../factories";
import { visitor } from "../support/api";

/** Barrels of 42 US gallons in a cubic metre: 1 / 0.158987294928 (NIST SP 811, appendix B.8). */
const BARRELS_PER_CUBIC_METRE = 1 / 0.158987294928;

async function review(search = "", role: "reviewer" | "engineer" = "reviewer") {
  return (await (await as(role)).get<ReviewView>(`/api/v1/review${search}`)).body;
}

describe("GET /api/v1/review", () => {
  it("lists what waits and what went back, each beside the approved revision it would replace", async () => {
    const { items, unit } = await review();
    expect(unit).toBe("MMSTB");
    const pellow = items.find(({ field }) => field.name === "Pellow North");
    expect(pellow).toMatchObject({ state: "submitted", canDecide: true });
    expect(pellow?.approved?.revision).toBeLessThan(pellow?.revision ?? 0);
    const returned = items.find(({ state }) => state === "returned");
    expect(returned?.decisionNote).not.toBe("");
    expect(returned?.canDecide).toBe(false);
  });

  it("has no approved revision beside a first estimate", async () => {
    const { items } = await review();
    const first = items.find(({ field }) => field.name === "Hesper Reach");
    expect(first?.revision).toBe(1);
    expect(first?.approved).toBeNull();
  });

  it("states the same barrels in cubic metres when asked", async () => {
    const [field, metric] = [await review(), await review("?units=metric")];
    expect(metric.unit).toBe("10⁶ m³");
    const ratio = field.items[0].condensate.p50 / metric.items[0].condensate.p50;
    expect(ratio).toBeCloseTo(BARRELS_PER_CUBIC_METRE, 9);
  });

  it("takes the company's share of the gross volume, and nothing for risk", async () => {
    const [gross, net] = [await review("?interest=gross"), await review("?interest=net")];
    gross.items.forEach(({ condensate }, index) => {
      const share = net.items[index].condensate.mean / condensate.mean;
      expect(share).toBeGreaterThan(0);
      expect(share).toBeLessThanOrEqual(1);
      expect(net.items[index].condensate.p90 / condensate.p90).toBeCloseTo(share, 12);
    });
  });

  it("lets nobody but a reviewer decide", async () => {
    const { items } = await review("", "engineer");
    expect(items.length).toBeGreaterThan(0);
    expect(items.every(({ canDecide }) => !canDecide)).toBe(true);
  });

  it("answers 401 to a visitor and 400 to a basis that is none", async () => {
    expect((await visitor().get("/api/v1/review")).status).toBe(401);
    expect((await (await as("reviewer")).get("/api/v1/review?units=furlongs")).status).toBe(400);
  });
});
