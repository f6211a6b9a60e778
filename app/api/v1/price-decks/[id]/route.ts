import { withRoute } from "@/app/_server/with-route";
import { discardPriceDeck, getPriceDeck, updatePriceDeck } from "@/services/price-decks";
import { idParams } from "../../common-schema";
import { presentPriceDeck } from "../presenter";
import { priceDeckPatchSchema } from "../schema";

export const GET = withRoute({
  may: "priceDeck.read",
  params: idParams,
  handler: ({ actor, params }) => getPriceDeck(actor, params.id),
  present: presentPriceDeck,
});

/** Change a draft; `prices` replaces all of them. */
export const PATCH = withRoute({
  may: "priceDeck.update",
  params: idParams,
  body: priceDeckPatchSchema,
  versioned: true,
  handler: ({ actor, params, body, expectedVersion }) =>
    updatePriceDeck(actor, params.id, body, expectedVersion),
  present: presentPriceDeck,
});

/** Throw a draft away; a published deck stays. */
export const DELETE = withRoute({
  may: "priceDeck.update",
  params: idParams,
  versioned: true,
  handler: ({ actor, params, expectedVersion }) =>
    discardPriceDeck(actor, params.id, expectedVersion),
});
