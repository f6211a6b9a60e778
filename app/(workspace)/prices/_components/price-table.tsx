import { Fragment } from "react";
import type { PriceDeckView } from "@/app/api/v1/price-decks/schema";
import { ColumnHeading, GroupRow, LedgerTable } from "@/components/ui/table";
import { Unit, VisuallyHidden } from "@/components/ui/text";
import {
  deckName,
  formatPrice,
  priceCases,
  priceOf,
  priceUnit,
  productNames,
  products,
  type PriceCase,
  type Product,
} from "./deck-words";

export interface PriceTableProps {
  deck: PriceDeckView;
  /** its realised prices stand softly above the new ones */
  before: PriceDeckView | null;
  /** the case that the basis uses now, when this deck is the one it uses */
  caseInUse?: PriceCase;
}

/** What each product fetches: benchmark, differential, and the two together. */
export function PriceTable({ deck, before, caseInUse }: PriceTableProps) {
  const priced = products.filter((product) =>
    priceCases.some((priceCase) => priceOf(deck, product, priceCase)),
  );
  return (
    <LedgerTable caption={`Prices of ${deckName(deck)}`} framed className="price-table">
      <thead>
        <tr>
          <ColumnHeading>Price</ColumnHeading>
          {priceCases.map((priceCase) => (
            <ColumnHeading key={priceCase} align="right">
              {priceCase[0].toUpperCase() + priceCase.slice(1)}
              {priceCase === caseInUse && <Unit> on the basis</Unit>}
            </ColumnHeading>
          ))}
        </tr>
      </thead>
      <tbody>
        {priced.map((product) => (
          <Fragment key={product}>
            <GroupRow columns={4}>
              {productNames[product]}, {priceUnit(deck.currency, product)}
            </GroupRow>
            <PriceRow deck={deck} product={product} part="benchmark" label="Benchmark" />
            <PriceRow deck={deck} product={product} part="differential" label="Differential" />
            <PriceRow
              deck={deck}
              product={product}
              part="realised"
              label="Realised"
              before={before}
            />
          </Fragment>
        ))}
      </tbody>
    </LedgerTable>
  );
}

interface PriceRowProps {
  deck: PriceDeckView;
  product: Product;
  part: "benchmark" | "differential" | "realised";
  label: string;
  before?: PriceDeckView | null;
}

function PriceRow({ deck, product, part, label, before }: PriceRowProps) {
  const isSum = part === "realised";
  return (
    <tr className={isSum ? "realised" : undefined}>
      <th scope="row" className={isSum ? undefined : "plain"}>
        {label}
        {isSum && before && <small>{deckName(before)} above</small>}
      </th>
      {priceCases.map((priceCase) => {
        const value = priceOf(deck, product, priceCase)?.[part];
        const text = part === "differential" ? signed(value) : formatPrice(value);
        if (!isSum || !before) {
          return (
            <td key={priceCase} className={isSum ? "right strong" : "right"}>
              {text}
            </td>
          );
        }
        return (
          <td key={priceCase} className="right">
            <span className="before-after">
              <span>
                <VisuallyHidden>before </VisuallyHidden>
                {formatPrice(priceOf(before, product, priceCase)?.realised)}
              </span>
              <span>
                <VisuallyHidden>now </VisuallyHidden>
                {text}
              </span>
            </span>
          </td>
        );
      })}
    </tr>
  );
}

const signed = (value: number | undefined) =>
  value !== undefined && value > 0 ? `+${formatPrice(value)}` : formatPrice(value);
