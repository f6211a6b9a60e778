import type { PriceDeckPatchRequest, PriceDeckView } from "@/app/api/v1/price-decks/schema";
import { priceCases, priceOf, products, type PriceCase, type Product } from "./deck-words";

/** A price as it is typed. */
export interface PriceText {
  benchmark: string;
  differential: string;
}

/** A draft as it stands in the fields. */
export interface DeckText {
  asOfOn: string;
  currency: string;
  note: string;
  prices: Record<Product, Record<PriceCase, PriceText>>;
}

export type ReadPrice =
  | { state: "empty" }
  | { state: "wrong"; reason: string }
  | { state: "read"; value: number };

/** A number as people type it: thousands separators, a real minus. At most four decimals, as prices are kept. */
export function readPrice(text: string, { negative }: { negative: boolean }): ReadPrice {
  const plain = text.replace(/[,\s]/g, "").replace("\u2212", "-");
  if (plain === "") return { state: "empty" };
  if (!/^[+-]?(\d+\.?\d*|\.\d+)$/.test(plain)) {
    return { state: "wrong", reason: "Give a number, such as 64.80." };
  }
  if ((plain.split(".")[1] ?? "").length > 4) {
    return { state: "wrong", reason: "Give at most four decimals." };
  }
  const value = Number(plain);
  if (!negative && value < 0) return { state: "wrong", reason: "A benchmark is 0 or more." };
  return { state: "read", value };
}

const textOf = (value: number | undefined) => (value === undefined ? "" : String(value));

export function deckTextOf(deck: PriceDeckView): DeckText {
  const pricesOf = (product: Product) =>
    Object.fromEntries(
      priceCases.map((priceCase) => {
        const price = priceOf(deck, product, priceCase);
        return [
          priceCase,
          { benchmark: textOf(price?.benchmark), differential: textOf(price?.differential) },
        ];
      }),
    ) as Record<PriceCase, PriceText>;
  return {
    asOfOn: deck.asOfOn,
    currency: deck.currency,
    note: deck.note,
    prices: Object.fromEntries(
      products.map((product) => [product, pricesOf(product)]),
    ) as DeckText["prices"],
  };
}

/** Where a price is wrong, by "product.case.part". */
export type PriceFaults = Partial<Record<string, string>>;

/**
 * The change to send, or what is wrong with it. A price with an empty benchmark is no price; an empty differential is 0.
 */
export function readDeckText({ asOfOn, currency, note, prices }: DeckText): {
  body: PriceDeckPatchRequest;
  faults: PriceFaults;
} {
  const faults: PriceFaults = {};
  const body: PriceDeckPatchRequest = { asOfOn, currency, note, prices: [] };
  for (const product of products) {
    for (const priceCase of priceCases) {
      const text = prices[product][priceCase];
      const benchmark = readPrice(text.benchmark, { negative: false });
      const differential = readPrice(text.differential, { negative: true });
      const at = `${product}.${priceCase}`;
      if (benchmark.state === "wrong") faults[`${at}.benchmark`] = benchmark.reason;
      if (differential.state === "wrong") faults[`${at}.differential`] = differential.reason;
      if (
        benchmark.state === "empty" &&
        differential.state === "read" &&
        differential.value !== 0
      ) {
        faults[`${at}.benchmark`] = "There is a differential, but no benchmark.";
      }
      if (benchmark.state !== "read" || differential.state === "wrong") continue;
      body.prices?.push({
        product,
        priceCase,
        benchmark: benchmark.value,
        differential: differential.state === "read" ? differential.value : 0,
      });
    }
  }
  return { body, faults };
}
