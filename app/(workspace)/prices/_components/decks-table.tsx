"use client";

import Link from "next/link";
import type { PriceDeckView } from "@/app/api/v1/price-decks/schema";
import { useBasis } from "@/components/basis/use-basis";
import { formatDate, MISSING } from "@/components/ui/format";
import { ColumnHeading, LedgerTable } from "@/components/ui/table";
import { StateMark } from "@/components/ui/text";
import { Icon } from "@/components/ui/icon";
import { deckName, formatPrice, priceCases, priceOf, type Product } from "./deck-words";

export interface DecksTableProps {
  decks: readonly PriceDeckView[];
  /** the one that the basis uses */
  usedId: string | undefined;
}

export function DecksTable({ decks, usedId }: DecksTableProps) {
  const { withBasis } = useBasis();
  return (
    <LedgerTable
      caption="Price decks: realised prices, low, mid and high"
      framed
      className="stacking-table"
    >
      <thead>
        <tr>
          <ColumnHeading>Deck</ColumnHeading>
          <ColumnHeading>State</ColumnHeading>
          <ColumnHeading>As of</ColumnHeading>
          <ColumnHeading align="right" unit="realised low, mid, high">
            Condensate
          </ColumnHeading>
          <ColumnHeading align="right" unit="realised low, mid, high">
            Gas
          </ColumnHeading>
          <ColumnHeading>Published</ColumnHeading>
          <ColumnHeading>Note</ColumnHeading>
        </tr>
      </thead>
      <tbody>
        {decks.map((deck) => (
          <tr key={deck.id} aria-selected={deck.id === usedId || undefined}>
            <th scope="row">
              <Link href={withBasis(`/prices/${deck.id}`)}>{deckName(deck)}</Link>
            </th>
            <td>
              {deck.state === "draft" ? (
                <StateMark state="draft" />
              ) : (
                <span className="state-mark" data-state="approved">
                  <Icon name="tick" />
                  {deck.id === usedId ? "On the basis" : "Published"}
                </span>
              )}
            </td>
            <td data-label="As of">{formatDate(deck.asOfOn)}</td>
            <td className="right" data-label={`Condensate, ${deck.currency} per STB`}>
              {threePrices(deck, "condensate")}
            </td>
            <td className="right" data-label={`Gas, ${deck.currency} per Mscf`}>
              {threePrices(deck, "gas")}
            </td>
            <td data-label="Published">
              {deck.publishedAt
                ? `${formatDate(deck.publishedAt)}, ${deck.publisher?.name ?? MISSING}`
                : MISSING}
            </td>
            <td className="wrap soft">{deck.note}</td>
          </tr>
        ))}
      </tbody>
    </LedgerTable>
  );
}

function threePrices(deck: PriceDeckView, product: Product) {
  const prices = priceCases.map((priceCase) =>
    formatPrice(priceOf(deck, product, priceCase)?.realised),
  );
  return (
    <span className="price-trio">
      {prices.map((price, index) => (
        <span key={index}>{price}</span>
      ))}
    </span>
  );
}
