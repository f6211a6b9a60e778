import type { BaseName } from "@/analytics/units/reporting-units";
import type { UnitSystem } from "@/analytics/units/conversions";
import type { PriceDeck } from "@/models/price-deck";
import { findCurrentPriceDeck, findPriceDeckWithPrices } from "@/models/queries/price-decks";
import type { EstimateChoice } from "@/models/queries/portfolio";
import type { PriceCase, Product } from "@/models/vocabulary";
import { NotFoundError } from "../errors";

/** On what every number of a roll-up stands, as the address of a page has it. */
export interface PortfolioBasis {
  /** id of a published price deck, or `latest`: the published one with the latest as-of date */
  deck: string;
  case: PriceCase;
  estimates: EstimateChoice;
  /** `gross`: the whole field; `net`: times the company's net revenue interest */
  interest: "gross" | "net";
  /** `risked`: every trial times the chance of commerciality; `yesNo`: a field is there or not, drawn trial by trial */
  risk: "unrisked" | "risked" | "yesNo";
  /** id of a dependence set, or `default`: the book's own */
  dependence: string;
  units: UnitSystem;
  base: BaseName;
}

/** The prices a basis comes to: flat and real, the benchmark plus its differential. */
export interface ChosenPrices {
  deckId: string;
  deckName: string;
  deckVersion: number;
  /** YYYY-MM-DD */
  asOfOn: string;
  currency: string;
  case: PriceCase;
  /** currency per STB; null when the deck has no such price */
  condensatePerStb: number | null;
  /** currency per Mscf (14.696 psia, 60 degF); null when the deck has no such price */
  gasPerMscf: number | null;
}

/**
 * The prices of a basis.
 *
 * @returns null when no deck has been published yet: volumes are still known, values are not
 * @throws {NotFoundError} when the deck that was asked for is not there, or is still a draft
 */
export async function findPrices(
  basis: Pick<PortfolioBasis, "deck" | "case">,
): Promise<ChosenPrices | null> {
  if (basis.deck === "latest") {
    const current = await findCurrentPriceDeck();
    return current && pricesOf(current, basis.case);
  }
  const deck = await findPriceDeckWithPrices(basis.deck);
  if (!deck || deck.state !== "published") throw new NotFoundError("published price deck");
  return pricesOf(deck, basis.case);
}

function pricesOf(deck: PriceDeck, priceCase: PriceCase): ChosenPrices {
  const realised = (product: Product): number | null => {
    const price = deck.prices?.find(
      (candidate) => candidate.product === product && candidate.priceCase === priceCase,
    );
    // Prices have four decimals; a sum of two doubles has more.
    return price ? Math.round((price.benchmark + price.differential) * 1e4) / 1e4 : null;
  };
  return {
    deckId: deck.id,
    deckName: deck.name,
    deckVersion: deck.versionNumber,
    asOfOn: deck.asOfOn,
    currency: deck.currency,
    case: priceCase,
    condensatePerStb: realised("condensate"),
    gasPerMscf: realised("gas"),
  };
}
