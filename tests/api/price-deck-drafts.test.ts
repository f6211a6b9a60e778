import { describe, expect, it } from "vitest";
import type { PriceDeckView } from "@/app/api/v1/price-decks/schema";
import { as, buildPriceDeck, ifMatch, made } from "../factories";
import { queryRows } from "../support/database";

const pathOf = ({ id }: { id: string }) => `/api/v1/price-decks/${id}`;

describe("DELETE /api/v1/price-decks/:id", () => {
  it("throws a draft away and keeps what it held in the audit trail", async () => {
    const planner = await as("planner");
    const deck = await buildPriceDeck();
    expect((await planner.delete(pathOf(deck), ifMatch(deck))).status).toBe(204);
    expect((await planner.get(pathOf(deck))).status).toBe(404);
    const [event] = await queryRows<{ before: { name: string; prices: unknown[] } }>(
      "select before from audit_events where entity_id = $1 and action = 'priceDeck.discarded'",
      [deck.id],
    );
    expect(event.before.name).toBe(deck.name);
    expect(event.before.prices).toHaveLength(deck.prices.length);
  });

  it("answers 409 to a published deck, which stays", async () => {
    const planner = await as("planner");
    const deck = await buildPriceDeck();
    const published = made(
      await planner.post<PriceDeckView>(`${pathOf(deck)}/publish`, undefined, ifMatch(deck)),
    );
    expect((await planner.delete(pathOf(deck), ifMatch(published))).status).toBe(409);
    expect((await planner.get(pathOf(deck))).status).toBe(200);
  });

  it("answers 412 to a draft that somebody changed meanwhile, and 428 without a version", async () => {
    const planner = await as("planner");
    const deck = await buildPriceDeck();
    made(await planner.patch(pathOf(deck), { note: "Later view." }, ifMatch(deck)));
    expect((await planner.delete(pathOf(deck), ifMatch(deck))).status).toBe(412);
    expect((await planner.delete(pathOf(deck))).status).toBe(428);
  });

  it("answers 403 to everybody but a planner", async () => {
    const deck = await buildPriceDeck();
    for (const role of ["engineer", "reviewer", "executive", "administrator"] as const) {
      expect((await (await as(role)).delete(pathOf(deck), ifMatch(deck))).status).toBe(403);
    }
  });
});
