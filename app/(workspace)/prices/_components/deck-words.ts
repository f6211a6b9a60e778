import type { PriceDeckView } from "@/app/api/v1/price-decks/schema";
import { formatFigure } from "@/components/ui/format";

type Price = PriceDeckView["prices"][number];
export type Product = Price["product"];
export type PriceCase = Price["priceCase"];

export const products: Product[] = ["condensate", "gas", "plant_liquids"];
export const priceCases: PriceCase[] = ["low", "mid", "high"];

export const productNames: Record<Product, string> = {
  condensate: "Condensate",
  gas: "Gas",
  plant_liquids: "Plant liquids",
};

const perWords: Record<Product, string> = {
  condensate: "STB",
  gas: "Mscf",
  plant_liquids: "bbl",
};

/** "USD per STB" */
export const priceUnit = (currency: string, product: Product) =>
  `${currency} per ${perWords[product]}`;

export const deckName = ({ name, versionNumber }: PriceDeckView) => `${name} v${versionNumber}`;

export function priceOf(
  deck: PriceDeckView | null | undefined,
  product: Product,
  priceCase: PriceCase,
): Price | undefined {
  return deck?.prices.find((price) => price.product === product && price.priceCase === priceCase);
}

/** The version before this one of the same deck, in the same currency: what a change is measured against. */
export function previousVersion(
  deck: PriceDeckView,
  decks: readonly PriceDeckView[],
): PriceDeckView | null {
  const earlier = decks.filter(
    ({ name, currency, versionNumber }) =>
      name === deck.name && currency === deck.currency && versionNumber < deck.versionNumber,
  );
  return earlier.sort((a, b) => b.versionNumber - a.versionNumber)[0] ?? null;
}

/** Prices are money: two decimals, four where they are used. */
export function formatPrice(value: number | null | undefined): string {
  if (value === null || value === undefined) return formatFigure(null);
  const needsMore = Math.abs(value * 100 - Math.round(value * 100)) > 1e-6;
  return formatFigure(value, { decimals: needsMore ? 4 : 2 });
}

/** Benchmark plus differential, as the database adds them: to four decimals. */
export const realisedOf = (benchmark: number, differential: number) =>
  Math.round((benchmark + differential) * 10_000) / 10_000;

/** "from 64.80 to 67.10": what the mid case of condensate did, for a heading; null when it is not known. */
export function condensateMove(deck: PriceDeckView, before: PriceDeckView | null): string | null {
  const now = priceOf(deck, "condensate", "mid")?.realised;
  const was = priceOf(before, "condensate", "mid")?.realised;
  if (now === undefined || was === undefined) return null;
  if (now === was) return `stays at ${formatPrice(now)}`;
  return `${now > was ? "rises" : "falls"} from ${formatPrice(was)} to ${formatPrice(now)}`;
}
