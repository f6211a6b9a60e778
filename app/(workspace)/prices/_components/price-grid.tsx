"use client";

import { Fragment } from "react";
import type { PriceDeckView } from "@/app/api/v1/price-decks/schema";
import { NumberField } from "@/components/ui/field";
import { ColumnHeading, GroupRow, LedgerTable } from "@/components/ui/table";
import { VisuallyHidden } from "@/components/ui/text";
import { readPrice, type DeckText, type PriceFaults, type PriceText } from "./deck-text";
import {
  deckName,
  formatPrice,
  priceCases,
  priceOf,
  priceUnit,
  productNames,
  products,
  realisedOf,
  type PriceCase,
  type Product,
} from "./deck-words";

export interface PriceGridProps {
  text: DeckText;
  faults: PriceFaults;
  before: PriceDeckView | null;
  onChange: (product: Product, priceCase: PriceCase, part: keyof PriceText, value: string) => void;
}

/** The prices of a draft, typed where they will stand; the realised price follows at once. */
export function PriceGrid({ text, faults, before, onChange }: PriceGridProps) {
  return (
    <LedgerTable caption="Prices of the draft" framed className="price-table price-grid">
      <thead>
        <tr>
          <ColumnHeading>Price</ColumnHeading>
          {priceCases.map((priceCase) => (
            <ColumnHeading key={priceCase} align="right">
              {priceCase[0].toUpperCase() + priceCase.slice(1)}
            </ColumnHeading>
          ))}
        </tr>
      </thead>
      <tbody>
        {products.map((product) => (
          <Fragment key={product}>
            <GroupRow columns={4}>
              {productNames[product]}, {priceUnit(text.currency, product)}
              {product === "plant_liquids" && "; leave empty where there is no plant"}
            </GroupRow>
            {(["benchmark", "differential"] as const).map((part) => (
              <tr key={part}>
                <th scope="row" className="plain">
                  {part === "benchmark" ? "Benchmark" : "Differential"}
                </th>
                {priceCases.map((priceCase) => (
                  <td key={priceCase}>
                    <NumberField
                      label={`${productNames[product]}, ${part}, ${priceCase}`}
                      labelHidden
                      value={text.prices[product][priceCase][part]}
                      error={faults[`${product}.${priceCase}.${part}`]}
                      onChange={(event) => onChange(product, priceCase, part, event.target.value)}
                    />
                  </td>
                ))}
              </tr>
            ))}
            <tr className="realised">
              <th scope="row">
                Realised
                {before && <small>{deckName(before)} above</small>}
              </th>
              {priceCases.map((priceCase) => (
                <td key={priceCase} className="right">
                  <span className="before-after">
                    {before && (
                      <span>
                        <VisuallyHidden>before </VisuallyHidden>
                        {formatPrice(priceOf(before, product, priceCase)?.realised)}
                      </span>
                    )}
                    <output>{formatPrice(realisedText(text.prices[product][priceCase]))}</output>
                  </span>
                </td>
              ))}
            </tr>
          </Fragment>
        ))}
      </tbody>
    </LedgerTable>
  );
}

/** Benchmark plus differential as typed; null while the two cannot be added. */
function realisedText({ benchmark, differential }: PriceText): number | null {
  const market = readPrice(benchmark, { negative: false });
  const added = readPrice(differential, { negative: true });
  if (market.state !== "read" || added.state === "wrong") return null;
  return realisedOf(market.value, added.state === "read" ? added.value : 0);
}
