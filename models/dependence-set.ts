import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
} from "sequelize";
import type { Dependence } from "@/analytics/portfolio/dependence-schema";
import { sequelize } from "./sequelize";
import type { User } from "./user";

/** A named answer to how reservoirs move together. Exactly one is the default; an index holds that line. */
export class DependenceSet extends Model<
  InferAttributes<DependenceSet>,
  InferCreationAttributes<DependenceSet>
> {
  declare id: CreationOptional<string>;
  declare name: string;
  declare note: CreationOptional<string>;
  declare isDefault: CreationOptional<boolean>;
  declare dependence: Dependence;
  declare updatedBy: CreationOptional<string | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  declare updater?: NonAttribute<User | null>;
}

DependenceSet.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    name: { type: DataTypes.TEXT, allowNull: false },
    note: { type: DataTypes.TEXT, allowNull: false, defaultValue: "" },
    isDefault: { type: DataTypes.BOOLEAN, allowNull: false, defaultValue: false },
    dependence: { type: DataTypes.JSONB, allowNull: false },
    updatedBy: DataTypes.UUID,
    version: { type: DataTypes.INTEGER, allowNull: false, defaultValue: 1 },
    createdAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
    updatedAt: { type: DataTypes.DATE, allowNull: false, defaultValue: DataTypes.NOW },
  },
  { sequelize, modelName: "DependenceSet", tableName: "dependence_sets" },
);
