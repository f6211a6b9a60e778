import { withRoute } from "@/app/_server/with-route";
import { publishPriceDeck } from "@/services/price-decks";
import { idParams } from "../../../common-schema";
import { presentPriceDeck } from "../../presenter";

/** Publish it, for good. */
export const POST = withRoute({
  may: "priceDeck.publish",
  params: idParams,
  versioned: true,
  handler: ({ actor, params, expectedVersion }) =>
    publishPriceDeck(actor, params.id, expectedVersion),
  present: presentPriceDeck,
});
