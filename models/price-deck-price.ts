import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "./sequelize";
import type { PriceCase, PriceUnit, Product } from "./vocabulary";

/** One flat real price, in the deck's currency per `unit`. What the company realises is benchmark + differential. */
export class PriceDeckPrice extends Model<
  InferAttributes<PriceDeckPrice>,
  InferCreationAttributes<PriceDeckPrice>
> {
  declare id: CreationOptional<string>;
  declare priceDeckId: string;
  declare product: Product;
  declare priceCase: PriceCase;
  declare benchmark: number;
  declare differential: number;
  declare unit: PriceUnit;
}

/** PostgreSQL hands numeric over as text, so that nothing is lost on the way; four decimals fit a double exactly enough. */
function numeric(name: "benchmark" | "differential") {
  return {
    type: DataTypes.DECIMAL(14, 4),
    allowNull: false,
    get(this: PriceDeckPrice): number {
      return Number(this.getDataValue(name));
    },
  };
}

PriceDeckPrice.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    priceDeckId: { type: DataTypes.UUID, allowNull: false },
    product: { type: DataTypes.TEXT, allowNull: false },
    priceCase: { type: DataTypes.TEXT, allowNull: false },
    benchmark: numeric("benchmark"),
    differential: numeric("differential"),
    unit: { type: DataTypes.TEXT, allowNull: false },
  },
  { sequelize, modelName: "PriceDeckPrice", tableName: "price_deck_prices" },
);
