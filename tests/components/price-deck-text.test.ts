import { describe, expect, it } from "vitest";
import {
  deckTextOf,
  readDeckText,
  readPrice,
} from "@/app/(workspace)/prices/_components/deck-text";
import {
  condensateMove,
  formatPrice,
  previousVersion,
  realisedOf,
} from "@/app/(workspace)/prices/_components/deck-words";
import type { PriceDeckView } from "@/app/api/v1/price-decks/schema";

const deck = (versionNumber: number, benchmark: number, currency = "USD"): PriceDeckView => ({
  id: "7f8c1f5e-6f1b-4a57-9f3e-2f3f7f0f9a10",
  name: "Planning deck",
  versionNumber,
  currency,
  asOfOn: "2026-11-02",
  state: "published",
  note: "",
  creator: null,
  publisher: null,
  publishedAt: null,
  prices: [
    {
      product: "condensate",
      priceCase: "mid",
      benchmark,
      differential: -4.2,
      unit: "per_stb",
      realised: realisedOf(benchmark, -4.2),
    },
  ],
  version: 1,
});

describe("readPrice", () => {
  it.each([
    ["64.80", 64.8],
    ["1,064.5", 1064.5],
    ["\u22124.2", -4.2],
    [" +0.35 ", 0.35],
  ])("reads %j as %d", (text, value) => {
    expect(readPrice(text, { negative: true })).toEqual({ state: "read", value });
  });

  it("refuses words, more than four decimals, and a benchmark below zero, each with its reason", () => {
    expect(readPrice("about 60", { negative: true })).toMatchObject({ state: "wrong" });
    expect(readPrice("1.23456", { negative: true })).toMatchObject({
      reason: "Give at most four decimals.",
    });
    expect(readPrice("-1", { negative: false })).toMatchObject({
      reason: "A benchmark is 0 or more.",
    });
  });
});

describe("readDeckText", () => {
  it("gives back the prices that a deck was written out from, and leaves empty ones out", () => {
    const { body, faults } = readDeckText(deckTextOf(deck(3, 69)));
    expect(faults).toEqual({});
    expect(body.prices).toEqual([
      { product: "condensate", priceCase: "mid", benchmark: 69, differential: -4.2 },
    ]);
  });

  it("takes an empty differential for none, and names a differential without its benchmark", () => {
    const text = deckTextOf(deck(3, 69));
    text.prices.condensate.mid.differential = "";
    text.prices.gas.low.differential = "-0.3";
    const { body, faults } = readDeckText(text);
    expect(body.prices?.[0].differential).toBe(0);
    expect(Object.keys(faults)).toEqual(["gas.low.benchmark"]);
  });
});

describe("previousVersion", () => {
  it("is the latest earlier version in the same currency", () => {
    const decks = [deck(1, 71), deck(2, 66, "EUR"), deck(3, 69)];
    expect(previousVersion(decks[2], decks)?.versionNumber).toBe(1);
    expect(previousVersion(decks[0], decks)).toBeNull();
  });
});

describe("condensateMove", () => {
  it("says what the mid price did since the version before", () => {
    expect(condensateMove(deck(3, 69), deck(2, 65.6))).toBe("rises from 61.40 to 64.80");
    expect(condensateMove(deck(3, 69), deck(2, 69))).toBe("stays at 64.80");
    expect(condensateMove(deck(3, 69), null)).toBeNull();
  });
});

describe("formatPrice", () => {
  it("shows two decimals, and four where they are used", () => {
    expect([formatPrice(64.8), formatPrice(0.3275), formatPrice(-4.2)]).toEqual([
      "64.80",
      "0.3275",
      "\u22124.20",
    ]);
  });
});
