import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
} from "sequelize";
import { sequelize } from "./sequelize";
import type { PriceDeckState } from "./vocabulary";
import type { PriceDeckPrice } from "./price-deck-price";
import type { User } from "./user";

export class PriceDeck extends Model<
  InferAttributes<PriceDeck>,
  InferCreationAttributes<PriceDeck>
> {
  declare id: CreationOptional<string>;
  declare name: string;
  declare versionNumber: number;
  declare currency: string;
  declare asOfOn: string;
  declare state: PriceDeckState;
  declare note: CreationOptional<string>;
  declare createdBy: string;
  declare publishedBy: CreationOptional<string | null>;
  declare publishedAt: CreationOptional<Date | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  declare prices?: NonAttribute<PriceDeckPrice[]>;
  declare creator?: NonAttribute<User>;
  declare publisher?: NonAttribute<User | null>;
}

PriceDeck.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    name: { type: DataTypes.TEXT, allowNull: false },
    versionNumber: { type: DataTypes.INTEGER, allowNull: false },
    currency: { type: DataTypes.TEXT, allowNull: false },
    asOfOn: { type: DataTypes.DATEONLY, allowNull: false },
    state: { type: DataTypes.TEXT, allowNull: false },
    note: { type: DataTypes.TEXT, allowNull: false, defaultValue: "" },
    createdBy: { type: DataTypes.UUID, allowNull: false },
    publishedBy: DataTypes.UUID,
    publishedAt: DataTypes.DATE,
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    updatedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: "PriceDeck", tableName: "price_decks" },
);
