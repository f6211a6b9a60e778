import { describe, expect, it } from "vitest";
import type { Problem } from "@/app/_server/problem";
import type { PriceDeckView } from "@/app/api/v1/price-decks/schema";
import { as, buildPriceDeck, deckPrices, ifMatch, made } from "../factories";
import { visitor } from "../support/api";
import { queryRows } from "../support/database";

const pathOf = ({ id }: { id: string }) => `/api/v1/price-decks/${id}`;

async function buildPublished(): Promise<PriceDeckView> {
  const planner = await as("planner");
  const deck = await buildPriceDeck();
  return made(
    await planner.post<PriceDeckView>(`${pathOf(deck)}/publish`, undefined, ifMatch(deck)),
  );
}

describe("POST /api/v1/price-decks", () => {
  it("begins version 1 of a deck, with units and what the company is paid", async () => {
    const deck = await buildPriceDeck();
    expect(deck).toMatchObject({ versionNumber: 1, state: "draft", currency: "USD" });
    expect(deck.prices).toHaveLength(6);
    expect(deck.prices[1]).toEqual({
      product: "condensate",
      priceCase: "mid",
      benchmark: 68.5,
      differential: -3.2,
      unit: "per_stb",
      realised: 65.3,
    });
  });

  it("makes a deck of a known name its next version", async () => {
    const first = await buildPriceDeck();
    const second = await buildPriceDeck(first.name);
    expect(second.versionNumber).toBe(2);
  });

  it("answers 422 to two prices of one product and case", async () => {
    const planner = await as("planner");
    const deck = await buildPriceDeck();
    const prices = [...deckPrices(), deckPrices()[0]];
    const answer = await planner.patch<Problem>(pathOf(deck), { prices }, ifMatch(deck));
    expect(answer.status).toBe(422);
    expect(answer.body.errors?.[0].pointer).toBe("#/prices/6");
  });

  it("answers 403 to everybody but a planner and 401 to a visitor", async () => {
    const body = { name: "Deck", currency: "USD", asOfOn: "2026-10-01" };
    for (const role of ["engineer", "reviewer", "executive", "administrator"] as const) {
      expect((await (await as(role)).post("/api/v1/price-decks", body)).status).toBe(403);
    }
    expect((await visitor().post("/api/v1/price-decks", body)).status).toBe(401);
  });
});

describe("POST /api/v1/price-decks/:id/publish", () => {
  it("publishes a whole deck, after which it answers 409 to a change", async () => {
    const planner = await as("planner");
    const deck = await buildPublished();
    expect(deck).toMatchObject({ state: "published", publisher: { name: "Marit Sundeholt" } });
    const answer = await planner.patch(pathOf(deck), { note: "late" }, ifMatch(deck));
    expect(answer).toMatchObject({ status: 409, body: { code: "immutable" } });
  });

  it("answers 422 when a case is missing or out of order", async () => {
    const planner = await as("planner");
    const deck = await buildPriceDeck();
    const missing = deckPrices().filter(({ product }) => product !== "gas");
    const partial = made(
      await planner.patch<PriceDeckView>(pathOf(deck), { prices: missing }, ifMatch(deck)),
    );
    const path = `${pathOf(deck)}/publish`;
    const refused = await planner.post<Problem>(path, undefined, ifMatch(partial));
    expect(refused.status).toBe(422);
    expect(refused.body.errors?.[0].detail).toMatch(/gas has no low/);

    const swapped = deckPrices().map((price) =>
      price.product === "gas" && price.priceCase === "low" ? { ...price, benchmark: 9 } : price,
    );
    const disordered = made(
      await planner.patch<PriceDeckView>(pathOf(deck), { prices: swapped }, ifMatch(partial)),
    );
    const again = await planner.post<Problem>(path, undefined, ifMatch(disordered));
    expect(again.body.errors?.[0].detail).toMatch(/ascending/);
  });

  it("holds in the database: a published deck and its prices stand still", async () => {
    const { id } = await buildPublished();
    const immutable = /published and cannot be changed/;
    await expect(
      queryRows("update price_decks set note = 'x' where id = $1", [id]),
    ).rejects.toThrow(immutable);
    await expect(
      queryRows("update price_deck_prices set benchmark = 1 where price_deck_id = $1", [id]),
    ).rejects.toThrow(immutable);
    await expect(
      queryRows("delete from price_deck_prices where price_deck_id = $1", [id]),
    ).rejects.toThrow(immutable);
    await expect(queryRows("delete from price_decks where id = $1", [id])).rejects.toThrow(
      immutable,
    );
  });
});

describe("GET /api/v1/price-decks", () => {
  it("lists published decks to everybody", async () => {
    const deck = await buildPublished();
    const executive = await as("executive");
    const { body } = await executive.get<{ items: PriceDeckView[]; total: number }>(
      "/api/v1/price-decks?state=published&limit=200",
    );
    expect(body.items.map(({ id }) => id)).toContain(deck.id);
    expect(body.items.every(({ state }) => state === "published")).toBe(true);
  });
});
