import type { PriceDeck } from "@/models/price-deck";
import type { PriceDeckPrice } from "@/models/price-deck-price";
import { priceCases, products } from "@/models/vocabulary";
import { presentMoment, presentPerson } from "../common-presenter";
import type { PriceDeckView } from "./schema";

/** @param deck  loaded with its prices and people */
export function presentPriceDeck(deck: PriceDeck): PriceDeckView {
  const { id, name, versionNumber, currency, asOfOn, state, note, version } = deck;
  return {
    id,
    name,
    versionNumber,
    currency,
    asOfOn,
    state,
    note,
    creator: presentPerson(deck.creator),
    publisher: presentPerson(deck.publisher),
    publishedAt: presentMoment(deck.publishedAt),
    prices: [...(deck.prices ?? [])].sort(byProductAndCase).map(presentPrice),
    version,
  };
}

/** Sums of two four-decimal numbers are rounded to four decimals, as the database would add them. */
function presentPrice(price: PriceDeckPrice) {
  const { product, priceCase, benchmark, differential, unit } = price;
  const realised = Math.round((benchmark + differential) * 10_000) / 10_000;
  return { product, priceCase, benchmark, differential, unit, realised };
}

function byProductAndCase(a: PriceDeckPrice, b: PriceDeckPrice): number {
  return (
    products.indexOf(a.product) - products.indexOf(b.product) ||
    priceCases.indexOf(a.priceCase) - priceCases.indexOf(b.priceCase)
  );
}
