import { withRoute } from "@/app/_server/with-route";
import { createPriceDeck, listPriceDecks } from "@/services/price-decks";
import { presentPage } from "../common-presenter";
import { presentPriceDeck } from "./presenter";
import { newPriceDeckSchema, priceDecksQuery } from "./schema";

export const GET = withRoute({
  may: "priceDeck.read",
  query: priceDecksQuery,
  handler: ({ actor, query: { state, ...page } }) => listPriceDecks(actor, { state }, page),
  present: presentPage(presentPriceDeck),
});

/** Begin a deck; the name of an existing one makes it that one's next version. */
export const POST = withRoute({
  may: "priceDeck.create",
  body: newPriceDeckSchema,
  status: 201,
  handler: ({ actor, body }) => createPriceDeck(actor, body),
  present: presentPriceDeck,
});
